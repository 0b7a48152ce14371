/** The riders that figures are measured over: the invented answers behind the demo's orders, from a fixed seed, so that two runs ask the same. */
import { riderAnswers, type RiderAnswers } from '#contract/advisor.ts'
import { inventAnswers } from '../../server/seeds/order-answers.ts'
import { prng } from '../../server/seeds/prng.ts'

export function riders(count: number): RiderAnswers[] {
  const random = prng(20261201)
  return Array.from({ length: count }, () => riderAnswers.parse(inventAnswers(random)))
}
