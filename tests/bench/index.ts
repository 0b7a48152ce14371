/** `npm run bench`: figures of speed, printed; nothing fails on them, as a machine may be busy. `npm run bench -- core` or `-- http` for one part. */
import { bundle } from './bundle.ts'
import { benchHttp } from './http.ts'

const part = process.argv[2]
if (part === undefined || part === 'core') {
  const { benchCore } = (await import(await bundle('core'))) as { benchCore: () => void }
  benchCore()
}
if (part === undefined || part === 'http') await benchHttp()
