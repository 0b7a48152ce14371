/** Where the demo's mails end: an SMTP server that keeps what it gets, and pages to read it on. Nothing leaves this machine. */
import { appendFileSync, readFileSync } from 'node:fs'
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import express, { type Express } from 'express'
import { simpleParser } from 'mailparser'
import { SMTPServer } from 'smtp-server'
import en from '../../../locales/en/mail-sink.json' with { type: 'json' }
import pt from '../../../locales/pt/mail-sink.json' with { type: 'json' }
import { escaped, paperPage, servePaper } from '../paper.ts'

export interface KeptMail {
  id: number
  at: string
  from: string
  to: string
  subject: string
  text: string
  html: string
}

export interface MailSinkOptions {
  smtpPort: number
  webPort: number
  host: string
  /** JSON lines; null keeps mails in the process only. */
  file?: string | null
}

export function createMailSink(options: MailSinkOptions) {
  const mails = read(options.file ?? null)
  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    onData(stream, _session, done) {
      simpleParser(stream).then((mail) => {
        const to = Array.isArray(mail.to) ? mail.to.map(({ text }) => text).join(', ') : (mail.to?.text ?? '')
        const kept: KeptMail = {
          id: mails.length + 1,
          at: new Date().toISOString(),
          from: mail.from?.text ?? '',
          to,
          subject: mail.subject ?? '',
          text: mail.text ?? '',
          html: typeof mail.html === 'string' ? mail.html : '',
        }
        mails.push(kept)
        if (options.file) appendFileSync(options.file, `${JSON.stringify(kept)}\n`, { mode: 0o600 })
        done()
      }, done)
    },
  })
  const web: Server = createServer(pages(mails))
  const listen = (server: Server | SMTPServer, port: number) =>
    new Promise<void>((resolve, reject) => {
      server.once('error', reject)
      server.listen(port, options.host, () => {
        resolve()
      })
    })
  return {
    start: async () => {
      await listen(smtp, options.smtpPort)
      await listen(web, options.webPort)
      return { smtpPort: (smtp.server.address() as AddressInfo).port, webPort: (web.address() as AddressInfo).port }
    },
    stop: async () => {
      await new Promise<void>((resolve) => {
        smtp.close(resolve)
      })
      await new Promise((resolve) => {
        web.close(resolve)
        web.closeAllConnections()
      })
    },
  }
}

function read(file: string | null): KeptMail[] {
  if (file === null) return []
  try {
    return readFileSync(file, 'utf8')
      .split('\n')
      .filter((line) => line !== '')
      .map((line) => JSON.parse(line) as KeptMail)
  } catch {
    return []
  }
}

function pages(mails: readonly KeptMail[]): Express {
  const app = express()
  app.disable('x-powered-by')
  servePaper(app)
  const words = (lng: unknown) => (lng === 'pt' ? { t: pt, language: 'pt' } : { t: en, language: 'en' })
  const when = (language: string, at: string) =>
    new Intl.DateTimeFormat(language === 'pt' ? 'pt-PT' : 'en-GB', { dateStyle: 'medium', timeStyle: 'medium' }).format(
      new Date(at),
    )

  app.get('/', (req, res) => {
    const { t, language } = words(req.query.lng)
    const rows = [...mails]
      .reverse()
      .map(
        ({ id, to, subject, at }) =>
          `<tr><td><a href="/mails/${id}?lng=${language}">${escaped(subject)}</a><br><span class="soft">${escaped(to)}</span></td><td class="soft">${escaped(when(language, at))}</td></tr>`,
      )
      .join('')
    const body = `<h1>${escaped(t.title)}</h1>${rows === '' ? `<p class="soft">${escaped(t.none)}</p>` : `<table><tbody>${rows}</tbody></table>`}`
    res.send(paperPage({ language, title: t.title, note: t.note, body, wide: true }))
  })
  app.get('/api/mails', (req, res) => {
    const { to } = req.query
    res.json(mails.filter((mail) => typeof to !== 'string' || mail.to.includes(to)))
  })
  app.get('/mails/:id', (req, res) => {
    const { t, language } = words(req.query.lng)
    const mail = mails[Number(req.params.id) - 1]
    if (!mail) {
      res
        .status(404)
        .send(paperPage({ language, title: t.title, note: t.note, body: `<h1>${escaped(t.unknown)}</h1>` }))
      return
    }
    const body = `<p><a href="/?lng=${language}">${escaped(t.back)}</a></p><h1>${escaped(mail.subject)}</h1><p class="soft">${escaped(t.to)} ${escaped(mail.to)} · ${escaped(when(language, mail.at))}</p><h2>${escaped(t.asPage)}</h2><iframe sandbox title="${escaped(mail.subject)}" src="/mails/${mail.id}/html"></iframe><h2>${escaped(t.asText)}</h2><pre>${escaped(mail.text)}</pre>`
    res.send(paperPage({ language, title: mail.subject, note: t.note, body, wide: true }))
  })
  app.get('/mails/:id/html', (req, res) => {
    const mail = mails[Number(req.params.id) - 1]
    res.set('Content-Security-Policy', "default-src 'none'; style-src 'unsafe-inline'; img-src data:; sandbox")
    res.status(mail ? 200 : 404).send(mail?.html ?? '')
  })
  return app
}
