/**
 * The gate that every wheelset passes at the basket, at the order, when payment starts and when it is paid: does it fit the bike, and does its
 * limit in force carry the rider? Judged afresh each time, from the kept fitting, under today's rules and limits.
 */
import type { BasketProblem, LineOptions } from '#contract/basket.ts'
import { riderAnswers, type Advice, type RiderAnswers } from '#contract/advisor.ts'
import type { Deps } from '../../deps.ts'
import { AdviceSnapshot } from '../../models/advice-snapshot.ts'
import { giveAdvice } from '../advisor/service.ts'
import type { StoredWheelset } from '../catalogue/read.ts'

export interface GateLine {
  sku: string
  quantity: number
  options: LineOptions
  adviceId: string | null
}

export interface GateResult {
  limitCheck: 'within' | 'no-margin' | 'over-limit' | 'unconfirmed'
  readyToRideKg: number | null
  marginKg: number | null
  options: LineOptions
  problems: BasketProblem[]
}

export type OptionName = keyof LineOptions
export const optionNames: readonly OptionName[] = ['frontAxle', 'rearAxle', 'freehub', 'rotorMount']

export const optionChoices = (set: StoredWheelset): Record<OptionName, string[]> => ({
  frontAxle: set.front.axles,
  rearAxle: set.rear.axles,
  freehub: set.rear.freehubs,
  rotorMount: [...new Set([set.front.rotorMount, set.rear.rotorMount].filter((mount) => mount !== null))],
})

/** The kept fittings behind a basket's lines, each judged once. */
export class Fittings {
  private readonly deps: Pick<Deps, 'db' | 'clock'>
  private readonly known = new Map<string, Promise<{ answers: RiderAnswers; advice: Advice } | null>>()

  constructor(deps: Pick<Deps, 'db' | 'clock'>) {
    this.deps = deps
  }

  of(adviceId: string) {
    const known = this.known.get(adviceId)
    if (known) return known
    const fresh = this.judge(adviceId)
    this.known.set(adviceId, fresh)
    return fresh
  }

  private async judge(adviceId: string) {
    const snapshot = await AdviceSnapshot.findByPk(adviceId, { raw: true })
    if (!snapshot) return null
    const answers = riderAnswers.parse(snapshot.answers)
    return { answers, advice: await giveAdvice(this.deps, answers) }
  }
}

/** @param adviceId the line's own fitting, or the last one the basket saw */
export async function passGate(
  line: GateLine,
  set: StoredWheelset | undefined,
  adviceId: string | null,
  fittings: Fittings,
  path: string,
): Promise<GateResult> {
  const problems: BasketProblem[] = []
  const problem = (code: string, field = '', data: Record<string, unknown> = {}) => {
    problems.push({ code, path: field === '' ? path : `${path}.${field}`, data })
  }
  if (!set?.onSale) {
    problem('not-on-sale')
    return { limitCheck: 'unconfirmed', readyToRideKg: null, marginKg: null, options: line.options, problems }
  }
  const fitting = adviceId === null ? null : await fittings.of(adviceId)
  const options = chosenOptions(line.options, set, fitting?.answers, problem)
  if (!fitting) return { limitCheck: 'unconfirmed', readyToRideKg: null, marginKg: null, options, problems }

  const { advice } = fitting
  const readyToRideKg = advice.systemMassKg
  const marginKg = set.limitKg - readyToRideKg
  const verdict = advice.wheelsets.find(({ sku }) => sku === set.sku)
  if (advice.outcome === 'out-of-scope') problem('out-of-scope')
  // The plain sum is checked whatever else rules the wheelset out: nothing may hide that it is over the limit.
  if (marginKg < 0) problem('over-limit', '', { totalKg: readyToRideKg, limitKg: set.limitKg, gapKg: -marginKg })
  else if (verdict && (verdict.verdict === 'mismatch' || verdict.verdict === 'pressure')) {
    problem('does-not-fit', '', { reason: verdict.codes[0] ?? verdict.verdict })
  }
  const limitCheck = marginKg < 0 ? 'over-limit' : verdict?.verdict === 'no-margin' ? 'no-margin' : 'within'
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
    else if (value !== undefined && bike !== null && bike !== value && name !== 'rotorMount') {
      problem('option-differs-from-bike', `options.${name}`, { bike })
    }
  }
  return chosen
}
