/** The hosted payment page of the stand-in: plain forms, no script, and it says what it is. */
import type { Express, Response } from 'express'
import en from '../../../locales/en/pay-stand-in.json' with { type: 'json' }
import pt from '../../../locales/pt/pay-stand-in.json' with { type: 'json' }
import { escaped, paperPage, servePaper } from '../paper.ts'
import { amountOf, type Session } from './state.ts'

interface Till {
  find: (id: string) => Session | null
  pay: (session: Session) => void
  decline: (session: Session) => void
}

const successUrl = ({ id, successUrl: url }: Session) => url.replaceAll('{CHECKOUT_SESSION_ID}', id)

function show(res: Response, session: Session, declined: boolean) {
  const portuguese = session.locale.startsWith('pt')
  const t = portuguese ? pt : en
  const money = (cents: number) =>
    escaped(
      new Intl.NumberFormat(portuguese ? 'pt-PT' : 'en-GB', { style: 'currency', currency: session.currency }).format(
        cents / 100,
      ),
    )
  const rows = session.lines
    .map(
      ({ name, quantity, unitAmount }) =>
        `<tr><th scope="row" style="font-weight:400">${quantity} × ${escaped(name)}</th><td>${money(unitAmount * quantity)}</td></tr>`,
    )
    .join('')
  const form = (action: string, word: string, main = false) =>
    `<form method="post" action="/pay/${session.id}/${action}"><button${main ? ' class="main"' : ''}>${escaped(word)}</button></form>`
  const total = money(amountOf(session))
  const sums = `<table><tbody>${rows}<tr class="total"><th scope="row">${escaped(t.total)}</th><td>${total}</td></tr></tbody></table>`
  const open = `${declined ? `<p class="stop" role="alert">${escaped(t.declined)}</p>` : ''}${form('pay', t.pay.replace('{{amount}}', new Intl.NumberFormat(portuguese ? 'pt-PT' : 'en-GB', { style: 'currency', currency: session.currency }).format(amountOf(session) / 100)), true)}${form('decline', t.decline)}${form('leave', t.leave)}<p class="soft">${escaped(t.open)}</p>`
  const over = `<p class="stop">${escaped(session.status === 'complete' ? t.complete : t.expired)}</p><p><a class="button main" href="${escaped(session.status === 'complete' ? successUrl(session) : session.cancelUrl)}">${escaped(t.back)}</a></p>`
  const body = `<h1>${escaped(t.title)}</h1><p class="soft">${escaped(t.lede)}${session.clientReferenceId === null ? '' : ` ${escaped(session.clientReferenceId)}.`}</p>${sums}${session.status === 'open' ? open : over}`
  res.status(200).send(paperPage({ language: portuguese ? 'pt' : 'en', title: t.title, note: t.note, body }))
}

export function mountPayPage(app: Express, till: Till) {
  servePaper(app)
  const withSession = (id: string, res: Response, work: (session: Session) => void) => {
    const session = till.find(id)
    if (session) work(session)
    else
      res
        .status(404)
        .send(paperPage({ language: 'en', title: en.title, note: en.note, body: `<h1>${escaped(en.unknown)}</h1>` }))
  }
  app.get('/pay/:id', (req, res) => {
    withSession(req.params.id, res, (session) => {
      show(res, session, false)
    })
  })
  app.post('/pay/:id/pay', (req, res) => {
    withSession(req.params.id, res, (session) => {
      till.pay(session)
      // A second click finds it paid and goes the same way; an expired page shows itself.
      res.redirect(303, session.status === 'complete' ? successUrl(session) : `/pay/${session.id}`)
    })
  })
  app.post('/pay/:id/decline', (req, res) => {
    withSession(req.params.id, res, (session) => {
      till.decline(session)
      show(res, session, session.status === 'open')
    })
  })
  app.post('/pay/:id/leave', (req, res) => {
    withSession(req.params.id, res, (session) => {
      res.redirect(303, session.cancelUrl)
    })
  })
}
