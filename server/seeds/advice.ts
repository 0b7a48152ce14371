/** The advice an invented order was bought on: the real sums over the demo range, so that a frozen fitting shows what a rider would have seen. */
import { advise, type Advice } from '#core/advise.ts'
import { rulesFrom } from '#core/rules.ts'
import { catalogue, type SeedWheelset } from './catalogue.ts'
import { wheelsetFacts } from './facts.ts'
import type { inventAnswers } from './order-answers.ts'
import { RULES_VERSION, ruleTables } from './rule-tables.ts'

export interface DemoAdvice {
  advice: Advice
  /** Wheelsets that may be bought on this advice, best first. */
  offers: { wheelset: SeedWheelset; noMargin: boolean }[]
}

const rules = rulesFrom(ruleTables)

export function demoAdvice(answers: ReturnType<typeof inventAnswers>): DemoAdvice {
  const advice = advise(answers, wheelsetFacts, rules, `${RULES_VERSION}+demo`)
  const offers = advice.wheelsets.flatMap(({ sku, rank, verdict }) => {
    const wheelset = rank === null ? undefined : catalogue.find((one) => one.sku === sku)
    return wheelset ? [{ wheelset, noMargin: verdict === 'no-margin' }] : []
  })
  return { advice, offers: advice.outcome.startsWith('recommend') ? offers : [] }
}
