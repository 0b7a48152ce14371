/** Where the demo's mails are read: a list, each mail as its reader sees it and as text, and the same as JSON for tests. */
import express, { type Express } from 'express'
import en from '../../../locales/en/mail-sink.json' with { type: 'json' }
import pt from '../../../locales/pt/mail-sink.json' with { type: 'json' }
import { escaped, paperPage, sendPaper, servePaper } from '../paper.ts'

export interface KeptMail {
  id: number
  /** ISO 8601, UTC */
  at: string
  from: string
  to: string
  subject: string
  text: string
  html: string
}

const wordsFor = (lng: unknown) =>
  lng === 'pt'
    ? { t: pt, language: 'pt', region: 'pt-PT', other: 'en' }
    : { t: en, language: 'en', region: 'en-GB', other: 'pt' }

const when = (region: string, at: string) =>
  new Intl.DateTimeFormat(region, { dateStyle: 'medium', timeStyle: 'medium', timeZone: 'UTC' }).format(new Date(at))

/** @param mails oldest first; grows while the pages are up */
export function pages(mails: readonly KeptMail[]): Express {
  const app = express()
  app.disable('x-powered-by')
  servePaper(app)
  const mailOf = (id: string) => mails.find((mail) => String(mail.id) === id)

  app.get('/', (req, res) => {
    const { t, language, region, other } = wordsFor(req.query.lng)
    const rows = mails.toReversed().map((mail) => row(mail, language, region))
    const list =
      rows.length === 0 ? `<p class="soft">${escaped(t.none)}</p>` : `<table><tbody>${rows.join('')}</tbody></table>`
    const switcher = `<p><a href="/?lng=${other}" lang="${other}" hreflang="${other}">${escaped(t.otherLanguage)}</a></p>`
    const body = `<h1>${escaped(t.title)}</h1>${switcher}${list}`
    sendPaper(res, 200, paperPage({ language, title: t.title, note: t.note, body, wide: true }))
  })

  app.get('/mails/:id', (req, res) => {
    const { t, language, region } = wordsFor(req.query.lng)
    const mail = mailOf(req.params.id)
    if (!mail) {
      const body = `<h1>${escaped(t.unknown)}</h1><p><a href="/?lng=${language}">${escaped(t.back)}</a></p>`
      sendPaper(res, 404, paperPage({ language, title: t.title, note: t.note, body }))
      return
    }
    const asPage = `<h2>${escaped(t.asPage)}</h2><iframe sandbox title="${escaped(mail.subject)}" src="/mails/${mail.id}/html"></iframe>`
    const body = [
      `<p><a href="/?lng=${language}">${escaped(t.back)}</a></p><h1>${escaped(mail.subject)}</h1>`,
      `<p class="soft">${escaped(t.to)} ${escaped(mail.to)} · ${escaped(when(region, mail.at))} UTC</p>`,
      mail.html === '' ? '' : asPage,
      `<h2>${escaped(t.asText)}</h2><pre>${escaped(mail.text)}</pre>`,
    ].join('')
    sendPaper(res, 200, paperPage({ language, title: mail.subject, note: t.note, body, wide: true }))
  })

  // What a mail brings along runs nothing, loads nothing and belongs to no origin, framed or opened by itself.
  app.get('/mails/:id/html', (req, res) => {
    const mail = mailOf(req.params.id)
    res.set({
      'Content-Security-Policy':
        "default-src 'none'; style-src 'unsafe-inline'; img-src data:; frame-ancestors 'self'; sandbox",
      'Referrer-Policy': 'no-referrer',
      'X-Content-Type-Options': 'nosniff',
    })
    res
      .status(mail ? 200 : 404)
      .type('html')
      .send(mail?.html ?? '')
  })

  app.get('/api/mails', (req, res) => {
    const { to } = req.query
    res.json(mails.filter((mail) => typeof to !== 'string' || mail.to.includes(to)))
  })
  return app
}

const row = ({ id, to, subject, at }: KeptMail, language: string, region: string) =>
  `<tr><td><a href="/mails/${id}?lng=${language}">${escaped(subject)}</a><br><span class="soft">${escaped(to)}</span></td><td class="soft">${escaped(when(region, at))}</td></tr>`
