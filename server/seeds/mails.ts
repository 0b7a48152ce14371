/** Mails that the invented orders once caused, as sent. Stored history: real mails come from the mail templates. */
interface MailOrder {
  number: string
  name: string
  locale: 'en' | 'pt'
  currency: string
  totalCents: number
  taxCents: number
  draftLines: { wheelset: { name: string }; quantity: number }[]
}

const money = ({ locale, currency }: MailOrder, cents: number) =>
  new Intl.NumberFormat(locale === 'pt' ? 'pt-PT' : 'en-GB', { style: 'currency', currency }).format(cents / 100)

const withHtml = (subject: string, lines: string[]) => ({
  subject,
  text: lines.join('\n\n'),
  html: lines.map((line) => `<p>${line.replaceAll('&', '&amp;').replaceAll('<', '&lt;')}</p>`).join(''),
})

export function receiptWords(order: MailOrder) {
  const goods = order.draftLines.map(({ wheelset, quantity }) => `${quantity} × ${wheelset.name}`).join(', ')
  const [total, tax] = [money(order, order.totalCents), money(order, order.taxCents)]
  return order.locale === 'pt'
    ? withHtml(`Recibo da encomenda ${order.number}`, [
        `Olá ${order.name},`,
        `Recebemos o pagamento de ${total} (dos quais IVA ${tax}) por: ${goods}.`,
        'Pode devolver as rodas até 14 dias depois de chegarem. Encomenda de demonstração, inventada.',
      ])
    : withHtml(`Receipt for order ${order.number}`, [
        `Hello ${order.name},`,
        `We have your payment of ${total} (tax in it ${tax}) for: ${goods}.`,
        'You may return the wheels within 14 days after they arrive. An invented demo order.',
      ])
}

export function refundWords(order: MailOrder) {
  const total = money(order, order.totalCents)
  return order.locale === 'pt'
    ? withHtml(`Reembolso da encomenda ${order.number}`, [
        `Olá ${order.name},`,
        `A encomenda foi anulada e devolvemos ${total} pelo mesmo meio de pagamento. Costuma demorar cinco a dez dias.`,
      ])
    : withHtml(`Refund for order ${order.number}`, [
        `Hello ${order.name},`,
        `The order is dropped and ${total} goes back the way it was paid. This usually takes five to ten days.`,
      ])
}
