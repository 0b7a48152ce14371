/** The hosted payment page of the stand-in: plain forms, no script, and it says what it is. */
import type { Express, Request, Response } from 'express'
import en from '../../../locales/en/pay-stand-in.json' with { type: 'json' }
import pt from '../../../locales/pt/pay-stand-in.json' with { type: 'json' }
import { escaped, paperPage, sendPaper, servePaper } from '../paper.ts'
import { amountOf, type Session } from './state.ts'

interface Till {
  find: (id: string) => Session | null
  pay: (session: Session) => void
  decline: (session: Session) => void
}

const wordsFor = (language: string) =>
  language.startsWith('pt') ? { t: pt, language: 'pt', region: 'pt-PT' } : { t: en, language: 'en', region: 'en-GB' }

const successUrl = ({ id, successUrl: url }: Session) => url.replaceAll('{CHECKOUT_SESSION_ID}', id)

/** Minor units to words: the number of decimals is the currency's own. */
function moneyIn(region: string, currency: string) {
  const format = new Intl.NumberFormat(region, { style: 'currency', currency })
  const decimals = format.resolvedOptions().maximumFractionDigits ?? 2
  return (minor: number) => format.format(minor / 10 ** decimals)
}

function show(res: Response, session: Session, declined: boolean) {
  const { t, language, region } = wordsFor(session.locale)
  const money = moneyIn(region, session.currency)
  const order = session.clientReferenceId
  const body = [
    `<h1>${escaped(t.title)}</h1>`,
    `<p class="soft">${escaped(order === null ? t.lede : t.ledeOrder.replace('{{order}}', order))}</p>`,
    sums(session, money, t.total),
    session.status === 'open' ? openParts(session, money, t, declined) : overParts(session, t),
  ].join('')
  sendPaper(res, 200, paperPage({ language, title: t.title, note: t.note, body }))
}

function sums(session: Session, money: (minor: number) => string, total: string) {
  const row = (name: string, minor: number, className = '') =>
    `<tr${className}><th scope="row">${escaped(name)}</th><td>${escaped(money(minor))}</td></tr>`
  const rows = [
    ...session.lines.map(({ name, quantity, unitAmount }) => row(`${quantity} × ${name}`, unitAmount * quantity)),
    session.shipping ? row(session.shipping.name, session.shipping.amount) : '',
    row(total, amountOf(session), ' class="total"'),
  ]
  return `<table class="sums"><tbody>${rows.join('')}</tbody></table>`
}

function openParts(session: Session, money: (minor: number) => string, t: typeof en, declined: boolean) {
  const form = (action: string, word: string, main = false) =>
    `<form method="post" action="/pay/${session.id}/${action}"><button${main ? ' class="main"' : ''}>${escaped(word)}</button></form>`
  return [
    declined ? `<p class="stop" role="alert">${escaped(t.declined)}</p>` : '',
    form('pay', t.pay.replace('{{amount}}', money(amountOf(session))), true),
    form('decline', t.decline),
    form('leave', t.leave),
    `<p class="soft">${escaped(t.open)}</p>`,
  ].join('')
}

function overParts(session: Session, t: typeof en) {
  const paid = session.status === 'complete'
  return `<p class="stop">${escaped(paid ? t.complete : t.expired)}</p><p><a class="button main" href="${escaped(paid ? successUrl(session) : session.cancelUrl)}">${escaped(t.back)}</a></p>`
}

export function mountPayPage(app: Express, till: Till) {
  servePaper(app)
  const withSession = (req: Request<{ id: string }>, res: Response, work: (session: Session) => void) => {
    const session = till.find(req.params.id)
    if (session) {
      work(session)
      return
    }
    const { t, language } = wordsFor(req.acceptsLanguages('en', 'pt') || 'en')
    sendPaper(res, 404, paperPage({ language, title: t.title, note: t.note, body: `<h1>${escaped(t.unknown)}</h1>` }))
  }
  app.get('/pay/:id', (req, res) => {
    withSession(req, res, (session) => show(res, session, false))
  })
  app.post('/pay/:id/pay', (req, res) => {
    withSession(req, res, (session) => {
      till.pay(session)
      // A second click finds it paid and goes the same way; an expired page shows itself.
      res.redirect(303, session.status === 'complete' ? successUrl(session) : `/pay/${session.id}`)
    })
  })
  app.post('/pay/:id/decline', (req, res) => {
    withSession(req, res, (session) => {
      till.decline(session)
      show(res, session, session.status === 'open')
    })
  })
  app.post('/pay/:id/leave', (req, res) => {
    withSession(req, res, (session) => res.redirect(303, session.cancelUrl))
  })
}
