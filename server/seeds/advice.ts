/**
 * The advice an invented order was bought on: the balance of total against limit over the whole range, in the shape of the
 * advisor's contract. No pressure, depth or spoke advice is made up for it: those stay null.
 */
import type { Advice } from '#contract/advisor.ts'
import { catalogue, type SeedWheelset } from './catalogue.ts'
import type { inventAnswers } from './order-answers.ts'

export interface DemoAdvice {
  advice: Advice
  /** Wheelsets that may be bought on this advice, in its own order. */
  offers: { wheelset: SeedWheelset; noMargin: boolean }[]
}

/** Less than this share of the limit left over reads "no margin" (design words); the wheel reference calls 85 to 100 % near the limit. */
const MARGIN_SHARE = 0.05

export function demoAdvice(answers: ReturnType<typeof inventAnswers>): DemoAdvice {
  const { ride, brakes, beadSeatMm, assist, bodyMassKg, kitMassKg, bikeMassKg, luggageKg } = answers
  const systemMassKg = bodyMassKg + kitMassKg + bikeMassKg + luggageKg
  const verdicts = catalogue.map((w) => {
    const marginKg = w.limitKg - systemMassKg
    const codes = [
      ...(w.brake === brakes ? [] : ['brake']),
      ...(w.beadSeatMm === beadSeatMm ? [] : ['bead-seat']),
      ...(w.rides.includes(ride) ? [] : ['ride']),
      ...(assist === 'none' || w.assistRated ? [] : ['assist']),
    ]
    const verdict =
      codes.length > 0
        ? 'mismatch'
        : marginKg < 0
          ? 'over-limit'
          : marginKg < MARGIN_SHARE * w.limitKg
            ? 'no-margin'
            : 'fits'
    return { w, marginKg, codes, verdict } as const
  })
  const offers = verdicts.filter(({ verdict }) => verdict === 'fits' || verdict === 'no-margin')
  return {
    offers: offers.map(({ w, verdict }) => ({ wheelset: w, noMargin: verdict === 'no-margin' })),
    advice: {
      rulesVersion: 'demo-limits-only',
      assumed: [],
      outcome: offers.length > 0 ? 'recommend' : 'refuse',
      systemMassKg,
      loads: null,
      pressure: null,
      rimDepthMm: null,
      spokes: null,
      wheelsets: verdicts.map((one) => ({
        ...{ sku: one.w.sku, slug: one.w.slug, name: one.w.name, verdict: one.verdict, codes: one.codes },
        ...{
          rank: offers.includes(one) ? offers.indexOf(one) + 1 : null,
          limitKg: one.w.limitKg,
          marginKg: one.marginKg,
        },
      })),
      tradeOff: [],
      brakeHeat: null,
      notes: [],
      reasons: {},
    },
  }
}
