// Runs before the first paint, so that a dark room stays dark. The settings panel writes the same key.
;(function () {
  var kept = null
  try {
    kept = JSON.parse(localStorage.getItem('felloe.preferences') || '{}').theme
  } catch {
    // Storage may be refused; the system's own choice then counts.
  }
  var dark = kept === 'dark' || (kept !== 'light' && matchMedia('(prefers-color-scheme: dark)').matches)
  document.documentElement.dataset.theme = dark ? 'dark' : 'light'
})()
