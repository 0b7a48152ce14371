/** The mail sink, with a real mailer at one end and the reading page at the other. */
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises'
import os from 'node:os'
import path from 'node:path'
import { createTransport } from 'nodemailer'
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { createMailSink, type MailSinkOptions } from '../../server/fakes/mail/sink.ts'
import type { KeptMail } from '../../server/fakes/mail/pages.ts'

const sinkAt = (file: MailSinkOptions['file'] = null) =>
  createMailSink({ smtpPort: 0, webPort: 0, host: '127.0.0.1', file })

let sink: ReturnType<typeof createMailSink>
let ports: { smtpPort: number; webPort: number }

beforeEach(async () => {
  sink = sinkAt()
  ports = await sink.start()
})
afterEach(() => sink.stop())

const mail = {
  from: 'Felloe <workshop@felloe.example>',
  to: 'rider@felloe.example',
  subject: 'A sua encomenda F26-000123 está paga',
  text: 'Olá, a roda está à espera.\n<b>1 299,00 €</b>',
  html: '<p>Olá</p><script>document.title = "changed"</script>',
}
const send = async (more: Partial<typeof mail> = {}, { smtpPort } = ports) => {
  const transport = createTransport({ host: '127.0.0.1', port: smtpPort, secure: false, ignoreTLS: true })
  await transport.sendMail({ ...mail, ...more })
  transport.close()
}
const see = (where: string, { webPort } = ports) => fetch(`http://127.0.0.1:${webPort}${where}`)
const kept = async (where = '/api/mails', at = ports) => (await (await see(where, at)).json()) as KeptMail[]

describe('the mail sink', () => {
  it('keeps what a mailer sends, letter for letter', async () => {
    await send()
    const [one] = await kept()
    expect(one).toMatchObject({ to: mail.to, subject: mail.subject })
    expect(one!.text.trim()).toBe(mail.text)
    expect(one!.html.trim()).toBe(mail.html)
  })

  it('finds mails by their reader', async () => {
    await send({ to: 'a@felloe.example' })
    await send({ to: 'b@felloe.example' })
    expect((await kept('/api/mails?to=b@felloe.example')).map(({ to }) => to)).toEqual(['b@felloe.example'])
    expect(await kept('/api/mails?to=c@felloe.example')).toEqual([])
  })

  it('lists them newest first, subjects as text', async () => {
    await send({ subject: 'First <i>' })
    await send({ subject: 'Second' })
    const page = await (await see('/')).text()
    expect(page.indexOf('Second')).toBeGreaterThan(0)
    expect(page.indexOf('Second')).toBeLessThan(page.indexOf('First'))
    expect(page).toContain('First &lt;i&gt;')
  })

  it('speaks Portuguese on request', async () => {
    expect(await (await see('/?lng=pt')).text()).toContain('lang="pt"')
    expect(await (await see('/')).text()).toContain('lang="en"')
  })

  it('shows a mail in a frame that runs nothing, and its text as text', async () => {
    await send()
    const page = await see('/mails/1')
    const html = await page.text()
    expect(html).toMatch(/<iframe sandbox title="[^"]+" src="\/mails\/1\/html">/)
    expect(html).toContain('&lt;b&gt;1 299,00 €&lt;/b&gt;')
    expect(html).not.toContain('<script')
    expect(page.headers.get('content-security-policy')).toContain("default-src 'none'")
    const frame = await see('/mails/1/html')
    const policy = frame.headers.get('content-security-policy') ?? ''
    expect(policy.split('; ')).toEqual(expect.arrayContaining(["default-src 'none'", 'sandbox']))
    expect(policy).not.toContain('script-src')
    expect((await frame.text()).trim()).toBe(mail.html)
  })

  it('has no page for a mail that never came', async () => {
    expect((await see('/mails/1')).status).toBe(404)
    expect((await see('/mails/1/html')).status).toBe(404)
  })

  it('ends at once although a mailer keeps its line open', async () => {
    const other = sinkAt()
    const { smtpPort } = await other.start()
    const transport = createTransport({ pool: true, host: '127.0.0.1', port: smtpPort, ignoreTLS: true })
    await transport.sendMail(mail)
    const from = performance.now()
    await other.stop()
    transport.close()
    expect(performance.now() - from).toBeLessThan(3_000)
  })
})

describe('its memory', () => {
  let folder = ''
  beforeAll(async () => {
    folder = await mkdtemp(path.join(os.tmpdir(), 'felloe-mail-'))
  })
  afterAll(() => rm(folder, { recursive: true, force: true }))

  it('outlasts a restart and a line cut off by a crash', async () => {
    const file = path.join(folder, 'mails.jsonl')
    const run = async (work: (at: typeof ports) => Promise<void>) => {
      const one = sinkAt(file)
      await work(await one.start())
      await one.stop()
    }
    await run((at) => send({ subject: 'Before' }, at))
    const line = await readFile(file, 'utf8')
    await writeFile(file, `${line}${line.slice(0, 20)}`)
    await run((at) => send({ subject: 'After' }, at))
    await run(async (at) => {
      const mails = await kept('/api/mails', at)
      expect(mails.map(({ subject }) => subject)).toEqual(['Before', 'After'])
      expect(new Set(mails.map(({ id }) => id)).size).toBe(2)
    })
  })
})
