/** Mails: written with what they tell of, handed over once, whatever the mail server does. */
import { createServer, type AddressInfo, type Server, type Socket } from 'node:net'
import { SMTPServer } from 'smtp-server'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { createMailSink } from '../../server/fakes/mail/sink.ts'
import { createMailer, sendOutbox } from '../../server/mail/send.ts'
import { OutboxMail } from '../../server/models/outbox-mail.ts'
import { testApp, type TestApp } from '../support/test-app.ts'
import { answers, pathOf, tillOf, type PlacedReply } from '../support/till.ts'

let shop: TestApp
const till = tillOf(() => shop)
const { paid, fill, fitting, firstChoice, orderIt } = till

beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())
beforeEach(() => shop.database.reset({ seed: 'range' }))

const mailerTo = (port: number, patienceMs?: number) =>
  createMailer({ config: { ...shop.deps.config, SMTP_URL: `smtp://127.0.0.1:${port}` } }, patienceMs)
const queue = (count: number) =>
  OutboxMail.bulkCreate(
    Array.from({ length: count }, (_, at) => ({
      kind: 'receipt',
      ref: `test-${at}`,
      recipient: `reader${at}@mail.example`,
      locale: 'en',
      subject: `Mail ${at}`,
      text: 'Words',
      html: '<p>Words</p>',
      state: 'queued' as const,
    })),
  )

interface Sent {
  to: string
  subject: string
  text: string
  html: string
}
async function withSink<T>(work: (port: number, sent: (to?: string) => Promise<Sent[]>) => Promise<T>): Promise<T> {
  const sink = createMailSink({ smtpPort: 0, webPort: 0, host: '127.0.0.1' })
  const { smtpPort, webPort } = await sink.start()
  try {
    return await work(
      smtpPort,
      async (to = '') => (await (await fetch(`http://127.0.0.1:${webPort}/api/mails?to=${to}`)).json()) as Sent[],
    )
  } finally {
    await sink.stop()
  }
}

describe('the receipt', () => {
  it('reaches the buyer once, with sums that agree, the link to the order, the cautions, and no word of a mass', async () => {
    await withSink(async (port, sent) => {
      const { orderNumber, orderUrl, agent } = await paid()
      const mailer = mailerTo(port)
      expect(await sendOutbox(shop.deps, mailer)).toBe(1)
      expect(await sendOutbox(shop.deps, mailer)).toBe(0)
      mailer.close()
      const [mail, ...more] = await sent('rider@mail.example')
      expect(more).toEqual([])
      const { money } = await till.see(agent, orderUrl)
      const euro = new Intl.NumberFormat('en-GB', { style: 'currency', currency: 'EUR' })
      expect(mail?.subject).toContain(orderNumber)
      for (const words of [mail?.text ?? '', mail?.html ?? '']) {
        expect(words).toContain(euro.format(money.totalCents / 100))
        expect(words).toContain(euro.format(money.deliveryCents / 100))
        expect(words).toContain(euro.format(money.taxCents / 100))
        expect(words.replaceAll('&amp;', '&')).toContain(orderUrl)
        expect(words).toContain('14 days')
        expect(words).toContain('lower one wins')
        expect(words).not.toMatch(/\d\s?(kg|lb)\b/)
        expect(words).not.toContain('{{')
      }
      expect(mail?.html).toContain('<html lang="en">')
      expect(mail?.html).not.toMatch(/<script|<img|http-equiv/)
      expect((await till.see(agent, orderUrl)).mails).toMatchObject([{ kind: 'receipt', state: 'sent' }])
    })
  })

  it('speaks Portuguese to whoever ordered in it', async () => {
    const agent = shop.agent()
    const { basketId } = await fill(agent, await firstChoice(agent), await fitting(agent))
    const { body } = await orderIt(agent, basketId, { locale: 'pt' }).expect(answers(201))
    await till.payOn((body as PlacedReply).payUrl)
    await agent.post(pathOf((body as PlacedReply).orderUrl, '/refresh')).expect(200)
    const mail = await OutboxMail.findOne({ where: { kind: 'receipt' }, rejectOnEmpty: true })
    expect(mail.subject).toMatch(/encomenda/)
    expect(mail.html).toContain('lang="pt"')
  })

  it('shows a hostile name as text', async () => {
    const agent = shop.agent()
    const { basketId } = await fill(agent, await firstChoice(agent), await fitting(agent))
    const name = '<img src=x onerror=alert(1)>'
    const delivery = { name, line1: 'Rua 1', postcode: '3800-000', city: 'Aveiro', country: 'PT' }
    const { body } = await orderIt(agent, basketId, { delivery }).expect(answers(201))
    await till.payOn((body as PlacedReply).payUrl)
    const { orderUrl } = body as PlacedReply
    await agent.post(pathOf(orderUrl, '/refresh')).expect(200)
    const { html } = await OutboxMail.findOne({ where: { kind: 'receipt' }, rejectOnEmpty: true })
    expect(html).not.toContain('<img')
    expect(html).toContain('&lt;img')
  })
})

describe('a mail server', () => {
  it('beside which two senders work hands each mail over once', async () => {
    await queue(30)
    await withSink(async (port, sent) => {
      const mailers = [mailerTo(port), mailerTo(port)]
      const counts = await Promise.all(mailers.map((mailer) => sendOutbox(shop.deps, mailer)))
      const rest = await Promise.all(mailers.map((mailer) => sendOutbox(shop.deps, mailer)))
      mailers.forEach((mailer) => {
        mailer.close()
      })
      expect([...counts, ...rest].reduce((sum, count) => sum + count, 0)).toBe(30)
      const subjects = (await sent()).map(({ subject }) => subject)
      expect(new Set(subjects).size).toBe(30)
      expect(subjects).toHaveLength(30)
    })
  })

  it('that takes the connection and says nothing is given up on; the mail waits, and the shop goes on selling', async () => {
    await queue(1)
    const sockets = new Set<Socket>()
    const silent: Server = createServer((socket) => sockets.add(socket))
    await new Promise<void>((resolve) => silent.listen(0, '127.0.0.1', resolve))
    const mailer = mailerTo((silent.address() as AddressInfo).port, 1_500)
    try {
      const sending = sendOutbox(shop.deps, mailer)
      const { orderNumber } = await paid()
      expect(await till.state(orderNumber)).toBe('cleared')
      expect(await sending).toBe(0)
      const mail = await OutboxMail.findOne({ where: { ref: 'test-0' }, rejectOnEmpty: true })
      expect(mail).toMatchObject({ state: 'queued', attempts: 1, sentAt: null })
      expect(mail.lastError).not.toBeNull()
    } finally {
      mailer.close()
      sockets.forEach((socket) => socket.destroy())
      await new Promise((resolve) => silent.close(resolve))
    }
  })

  it('that refuses is asked eight times, later each time; then the mail is set aside, and others still go', async () => {
    await queue(2)
    const refusing = new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS'],
      onRcptTo: ({ address }, _session, done) => {
        done(address.startsWith('reader0') ? Object.assign(new Error('no such box'), { responseCode: 550 }) : null)
      },
      onData: (stream, _session, done) => {
        stream.on('end', () => {
          done()
        })
        stream.resume()
      },
    })
    await new Promise<void>((resolve) => refusing.listen(0, '127.0.0.1', resolve))
    const mailer = mailerTo((refusing.server.address() as AddressInfo).port)
    const mail = () => OutboxMail.findOne({ where: { ref: 'test-0' }, rejectOnEmpty: true })
    try {
      expect(await sendOutbox(shop.deps, mailer)).toBe(1)
      const waits: number[] = []
      for (let tries = 1; tries < 8; tries += 1) {
        const { attempts, nextTryAt, state } = await mail()
        expect({ attempts, state }).toEqual({ attempts: tries, state: 'queued' })
        const waitMs = (nextTryAt?.getTime() ?? 0) - shop.deps.clock().getTime()
        waits.push(waitMs)
        expect(await sendOutbox(shop.deps, mailer)).toBe(0)
        expect((await mail()).attempts).toBe(tries) // not before its time
        shop.passTime(waitMs + 1_000)
        await sendOutbox(shop.deps, mailer)
      }
      expect(await mail()).toMatchObject({ attempts: 8, state: 'failed' })
      expect(waits.every((wait, at) => at === 0 || wait > (waits[at - 1] ?? 0))).toBe(true)
      shop.passTime(24 * 3_600_000)
      await sendOutbox(shop.deps, mailer)
      expect((await mail()).attempts).toBe(8)
      expect((await mail()).lastError).toContain('no such box')
    } finally {
      mailer.close()
      await new Promise<void>((resolve) => {
        refusing.close(resolve)
      })
    }
  })
})
