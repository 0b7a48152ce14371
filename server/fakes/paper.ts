/** Plain pages of the stand-ins: the shop's paper and type, without a build and without a script, and never to be taken for the shop. */
import { createRequire } from 'node:module'
import path from 'node:path'
import express, { type Express, type Response } from 'express'

export const escaped = (text: string) =>
  text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replaceAll("'", '&#39;')

const css = `
@font-face{font-family:Manrope;font-weight:400;src:url(/paper/manrope-latin-400-normal.woff2) format("woff2")}
@font-face{font-family:Manrope;font-weight:600;src:url(/paper/manrope-latin-600-normal.woff2) format("woff2")}
@font-face{font-family:Manrope;font-weight:700;src:url(/paper/manrope-latin-700-normal.woff2) format("woff2")}
:root{color-scheme:light dark;--ground:#efebe1;--sheet:#fbf9f4;--ink:#1d2226;--soft:#59636a;--line:#d6cfbf;--strong:#a89f8c;--note:#3b5b7c;--wash:#e3e9ef}
@media (prefers-color-scheme:dark){:root{--ground:#131618;--sheet:#1b1f22;--ink:#ece7dc;--soft:#a2a9ab;--line:#33393d;--strong:#5d656a;--note:#86a9cf;--wash:#1d2833}}
*{box-sizing:border-box}body{margin:0;background:var(--ground);color:var(--ink);font:400 16px/1.5 Manrope,system-ui,sans-serif;font-feature-settings:"tnum"}
main{max-width:40rem;margin:0 auto;background:var(--sheet);min-height:100vh;border-inline:1px solid var(--strong)}
.wide{max-width:64rem}.in{padding:24px clamp(18px,5vw,40px)}
.note{background:var(--wash);color:var(--note);border-bottom:1px solid var(--note);padding:12px clamp(18px,5vw,40px);font-weight:600;margin:0}
h1{font-size:1.7rem;line-height:1.15;letter-spacing:-.02em;margin:0 0 6px}h2{font-size:1.1rem;margin:26px 0 8px}p{margin:8px 0}.soft{color:var(--soft)}
table{width:100%;border-collapse:collapse;border-top:1px solid var(--ink);margin-top:18px}th,td{text-align:start;overflow-wrap:anywhere;padding:9px 0;border-bottom:1px solid var(--line);vertical-align:top}td:last-child,th.end{text-align:end}table.sums th{font-weight:400;padding-inline-end:16px}table.sums td{white-space:nowrap}table.sums tr.total th,table.sums tr.total td{border-bottom:1px solid var(--ink);font-weight:700;font-size:1.25rem}
form{display:block;margin-top:12px}button,.button{display:block;width:100%;min-height:52px;font:600 1rem Manrope,system-ui,sans-serif;border:1px solid var(--ink);background:var(--sheet);color:var(--ink);padding:12px 18px;text-align:center;text-decoration:none;cursor:pointer}button.main,.button.main{background:var(--ink);color:var(--sheet)}
:focus-visible{outline:3px solid var(--note);outline-offset:2px}a{color:inherit;text-underline-offset:.2em}.stop{border:2px solid var(--ink);padding:12px 16px;margin-top:18px;font-weight:600}
pre{white-space:pre-wrap;overflow-wrap:anywhere;font:inherit;border:1px solid var(--line);padding:16px}iframe{width:100%;height:44rem;border:1px solid var(--strong);background:#fff}
`

/** Serves the type and the style that `paperPage` asks for. */
export function servePaper(app: Express) {
  const fonts = path.join(
    path.dirname(createRequire(import.meta.url).resolve('@fontsource/manrope/package.json')),
    'files',
  )
  app.get('/paper/style.css', (_req, res) => {
    res.type('css').send(css)
  })
  app.use('/paper', express.static(fonts, { index: false, maxAge: '1d' }))
}

export const paperPage = (page: { language: string; title: string; note: string; body: string; wide?: boolean }) =>
  `<!doctype html><html lang="${page.language}"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1"><meta name="robots" content="noindex"><title>${escaped(page.title)}</title><link rel="stylesheet" href="/paper/style.css"></head><body><main${page.wide ? ' class="wide"' : ''}><p class="note">${escaped(page.note)}</p><div class="in">${page.body}</div></main></body></html>`

/** A page of its own: no script, nothing from elsewhere, in no frame, and never out of a cache. */
export function sendPaper(res: Response, status: number, page: string) {
  res
    .status(status)
    .set({
      'Content-Security-Policy':
        "default-src 'none'; style-src 'self'; font-src 'self'; frame-src 'self'; frame-ancestors 'none'; base-uri 'none'",
      'Cache-Control': 'no-store',
      'Referrer-Policy': 'no-referrer',
      'X-Content-Type-Options': 'nosniff',
    })
    .type('html')
    .send(page)
}
