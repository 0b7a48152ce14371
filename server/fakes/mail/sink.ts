/** Where the demo's mails end: an SMTP server that keeps what it gets, and pages to read it on. Nothing leaves this machine. */
import { appendFileSync, existsSync, readFileSync } from 'node:fs'
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { simpleParser, type ParsedMail } from 'mailparser'
import { SMTPServer } from 'smtp-server'
import { pages, type KeptMail } from './pages.ts'

export interface MailSinkOptions {
  smtpPort: number
  webPort: number
  host: string
  /** JSON lines; null keeps mails in the process only. */
  file?: string | null
}

export function createMailSink(options: MailSinkOptions) {
  const mails = read(options.file ?? null)
  const keep = (mail: ParsedMail) => {
    const kept: KeptMail = {
      id: (mails.at(-1)?.id ?? 0) + 1,
      at: new Date().toISOString(),
      from: mail.from?.text ?? '',
      to: [mail.to ?? []]
        .flat()
        .map(({ text }) => text)
        .join(', '),
      subject: mail.subject ?? '',
      text: mail.text ?? '',
      html: typeof mail.html === 'string' ? mail.html : '',
    }
    if (options.file) appendFileSync(options.file, `${JSON.stringify(kept)}\n`, { mode: 0o600 })
    mails.push(kept)
  }
  const smtp = new SMTPServer({
    authOptional: true,
    // a mailer's idle connection does not hold up the end of the demo
    closeTimeout: 500,
    disabledCommands: ['AUTH', 'STARTTLS'],
    onData(stream, _session, done) {
      simpleParser(stream)
        .then(keep)
        .then(() => done(), done)
    },
  })
  // A caller that hangs up in the middle is no reason to stop.
  smtp.on('error', () => undefined)
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

/** A line cut off by a crash is left out and closed, so that the next mail begins on its own; the mails before it stay. */
function read(file: string | null): KeptMail[] {
  if (file === null || !existsSync(file)) return []
  const lines = readFileSync(file, 'utf8').split('\n')
  if (lines.at(-1) !== '') appendFileSync(file, '\n')
  return lines.flatMap(line)
}

function line(text: string): KeptMail[] {
  try {
    return text === '' ? [] : [JSON.parse(text) as KeptMail]
  } catch {
    return []
  }
}
