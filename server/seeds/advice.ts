/** The advice an invented order was bought on. */
import { catalogue, type SeedWheelset } from './catalogue.ts'
import type { inventAnswers } from './order-answers.ts'

export interface DemoAdvice {
  advice: Record<string, unknown>
  rulesVersion: string
  /** Wheelsets that may be bought on this advice, in its own order. */
  offers: { wheelset: SeedWheelset; noMargin: boolean }[]
}

export function demoAdvice(answers: ReturnType<typeof inventAnswers>): DemoAdvice {
  const { bodyMassKg, kitMassKg, bikeMassKg, luggageKg } = answers
  const systemMassKg = bodyMassKg + kitMassKg + bikeMassKg + luggageKg
  const offers = catalogue
    .filter((w) => w.rides.includes(answers.ride) && w.brake === answers.brakes && w.beadSeatMm === answers.beadSeatMm)
    .filter((w) => w.limitKg >= systemMassKg && (w.assistRated || answers.assist === 'none'))
    .map((wheelset) => ({ wheelset, noMargin: wheelset.limitKg - systemMassKg < 5 }))
  const wheelsets = offers.map(({ wheelset }) => ({ sku: wheelset.sku, limitKg: wheelset.limitKg }))
  return { advice: { rulesVersion: 'demo', systemMassKg, wheelsets }, rulesVersion: 'demo', offers }
}
