/** Loaded into every child before its own code: when the launcher is gone, even by kill -9, the child stops in its usual order. */
process.on('disconnect', () => process.kill(process.pid, 'SIGTERM'))
process.channel?.unref()
