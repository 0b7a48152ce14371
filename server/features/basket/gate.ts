/**
 * The gate that every wheelset passes at the basket, at the order, when payment starts and when it is paid: does it fit the bike, and does its
 * limit in force carry the rider? Judged afresh each time, from the kept fitting, under today's rules and limits.
 */
import type { Transaction } from 'sequelize'
import type { BasketProblem, LineOptions } from '#contract/basket.ts'
import { riderAnswers, type Advice, type RiderAnswers } from '#contract/advisor.ts'
import type { Deps } from '../../deps.ts'
import { AdviceSnapshot } from '../../models/advice-snapshot.ts'
import { giveAdvice } from '../advisor/service.ts'
import type { StoredWheelset } from '../catalogue/read.ts'

export interface GateResult {
  limitCheck: 'within' | 'no-margin' | 'over-limit' | 'unconfirmed'
  readyToRideKg: number | null
  marginKg: number | null
  options: LineOptions
  problems: BasketProblem[]
}

export type OptionName = keyof LineOptions
const optionNames: readonly OptionName[] = ['frontAxle', 'rearAxle', 'freehub', 'rotorMount']

/** What the hubs leave open. Front and rear with different rotor mounts are a fact of the pair, not a choice. */
export const optionChoices = (set: StoredWheelset): Record<OptionName, string[]> => {
  const mounts = [...new Set([set.front.rotorMount, set.rear.rotorMount].filter((mount) => mount !== null))]
  return {
    frontAxle: set.front.axles,
    rearAxle: set.rear.axles,
    freehub: set.rear.freehubs,
    rotorMount: mounts.length === 1 ? mounts : [],
  }
}

/** The kept fittings behind a basket's lines, each judged once. */
export class Fittings {
  private readonly deps: Pick<Deps, 'db' | 'clock'>
  private readonly transaction: Transaction | undefined
  private readonly known = new Map<string, Promise<{ answers: RiderAnswers; advice: Advice } | null>>()

  /** @param transaction reads on its connection: a second one might never come free while it is held */
  constructor(deps: Pick<Deps, 'db' | 'clock'>, transaction?: Transaction) {
    this.deps = deps
    this.transaction = transaction
  }

  of(adviceId: string) {
    const known = this.known.get(adviceId)
    if (known) return known
    const fresh = this.judge(adviceId)
    this.known.set(adviceId, fresh)
    return fresh
  }

  private async judge(adviceId: string) {
    const { transaction } = this
    const snapshot = await AdviceSnapshot.findByPk(adviceId, { raw: true, ...(transaction ? { transaction } : {}) })
    // Answers of an older shape cannot be judged by today's rules; the rider is asked again.
    const answers = riderAnswers.safeParse(snapshot?.answers)
    if (!answers.success) return null
    return { answers: answers.data, advice: await giveAdvice(this.deps, answers.data, transaction) }
  }
}

/**
 * @param asked what the shopper picked; undefined or null where nothing was
 * @param adviceId the line's own fitting, or the one the basket remembers; null only where the basket never saw one
 * @param path where the line stands, for the problems' paths: `lines.0`
 */
export async function passGate(
  asked: LineOptions,
  set: StoredWheelset,
  adviceId: string | null,
  fittings: Fittings,
  path: string,
): Promise<GateResult> {
  const problems: BasketProblem[] = []
  const problem = (code: string, field = '', data: Record<string, unknown> = {}) => {
    problems.push({ code, path: field === '' ? path : `${path}.${field}`, data })
  }
  const fitting = adviceId === null ? null : await fittings.of(adviceId)
  const options = chosenOptions(asked, set, fitting?.answers, problem)
  if (!set.onSale) problem('not-on-sale')
  if (!fitting) {
    if (adviceId !== null) problem('fitting-gone')
    return { limitCheck: 'unconfirmed', readyToRideKg: null, marginKg: null, options, problems }
  }
  const { advice } = fitting
  const readyToRideKg = advice.systemMassKg
  const verdict = advice.wheelsets.find(({ sku }) => sku === set.sku)
  // The lowest of its limits for this rider: the stated one, or what its structure or an axle carries.
  const limitKg = Math.min(set.limitKg, verdict?.limitKg ?? set.limitKg)
  const marginKg = limitKg - readyToRideKg
  if (advice.outcome === 'out-of-scope') problem('out-of-scope')
  // The plain sum is checked whatever else rules the wheelset out: nothing may hide that it is over the limit.
  const over = marginKg < 0 || verdict?.verdict === 'over-limit'
  if (over) problem('over-limit', '', { totalKg: readyToRideKg, limitKg, gapKg: Math.max(0, -marginKg) })
  else if (verdict && (verdict.verdict === 'mismatch' || verdict.verdict === 'pressure'))
    problem('does-not-fit', '', { reason: verdict.codes[0] ?? verdict.verdict })
  // The advice covers all that is on sale: a wheelset it does not name has only just come or gone, and was not judged.
  else if (!verdict && set.onSale && advice.outcome !== 'out-of-scope') problem('not-judged')
  const limitCheck = over ? 'over-limit' : verdict?.verdict === 'no-margin' ? 'no-margin' : 'within'
  return { limitCheck, readyToRideKg, marginKg, options, problems }
}

/** Options as chosen, filled in where the hub leaves no choice or the rider's bike has made it. */
function chosenOptions(
  asked: LineOptions,
  set: StoredWheelset,
  answers: RiderAnswers | undefined,
  problem: (code: string, field: string, data: Record<string, unknown>) => void,
): LineOptions {
  const choices = optionChoices(set)
  const chosen: LineOptions = {}
  for (const name of optionNames) {
    const offered = choices[name]
    const bike = answers?.bike?.[name] ?? null
    const value =
      asked[name] ?? (offered.length === 1 ? offered[0] : bike !== null && offered.includes(bike) ? bike : undefined)
    if (value !== undefined) chosen[name] = value
    if (value === undefined && offered.length > 1) problem('option-missing', `options.${name}`, { choices: offered })
    else if (value !== undefined && !offered.includes(value))
      problem('option-not-offered', `options.${name}`, { choices: offered })
    // A six-bolt rotor goes onto a centre-lock hub by an adapter: the fit of the rotor is judged with the advice.
    else if (value !== undefined && bike !== null && bike !== value && name !== 'rotorMount')
      problem('option-differs-from-bike', `options.${name}`, { bike })
  }
  return chosen
}
