/**
 * The frozen advice as the desk may see it. Only named parts pass. Body mass stays out, and with it every figure that gives it
 * away by subtraction: total, wheel loads, margins, the values put into the formulas.
 */
import { createHash } from 'node:crypto'
import type { FrozenAdvice } from '#contract/support-desk.ts'
import type { AdviceSnapshot } from '../../models/advice-snapshot.ts'

const massAnswers = ['bodyMassKg', 'bodyMassBandKg'] as const

type Loose = Record<string, unknown>
const isRecord = (value: unknown): value is Loose =>
  typeof value === 'object' && value !== null && !Array.isArray(value)
const records = (value: unknown): Loose[] => (Array.isArray(value) ? value.filter(isRecord) : [])
const text = (value: unknown): string | null => (typeof value === 'string' ? value : null)
const number = (value: unknown): number | null => (typeof value === 'number' ? value : null)
const strings = (value: unknown): string[] =>
  Array.isArray(value) ? value.filter((one) => typeof one === 'string') : []

/** A list or an object of explanations, in words: older rule versions may have kept either. */
const inWords = (value: unknown): string | null => (Array.isArray(value) ? strings(value).join('; ') : text(value))

/**
 * @param skus the wheelsets of the order: the rest of the range is not needed to answer for it
 * @param reveal somebody with a reason asked for the mass; their reason is in the audit
 */
export function frozenAdviceView(snapshot: AdviceSnapshot, skus: readonly string[], reveal: boolean): FrozenAdvice {
  const { answers, advice } = snapshot
  const present = massAnswers.filter((name) => answers[name] !== undefined)
  const shownAnswers = Object.fromEntries(
    Object.entries(answers).filter(([name]) => reveal || !massAnswers.some((one) => one === name)),
  )
  return {
    adviceId: snapshot.id,
    createdAt: snapshot.createdAt.toISOString(),
    rulesVersion: snapshot.rulesVersion,
    sha256: snapshot.sha256,
    intact: createHash('sha256').update(JSON.stringify({ answers, advice })).digest('hex') === snapshot.sha256,
    answers: shownAnswers,
    withheld: reveal ? [] : present,
    outcome: text(advice.outcome),
    assumed: strings(advice.assumed),
    systemMassKg: reveal ? number(advice.systemMassKg) : null,
    pressure: advice.pressure ?? null,
    rimDepthMm: advice.rimDepthMm ?? null,
    spokes: advice.spokes ?? null,
    notes: records(advice.notes).map(({ code, severity }) => ({
      code: text(code) ?? '',
      severity: text(severity) ?? 'info',
    })),
    wheelsets: records(advice.wheelsets)
      .filter(({ sku }) => skus.some((one) => one === sku))
      .map((one) => ({
        sku: text(one.sku) ?? '',
        rank: number(one.rank),
        verdict: text(one.verdict) ?? '',
        limitKg: number(one.limitKg),
        marginKg: reveal ? number(one.marginKg) : null,
        codes: strings(one.codes),
      })),
    reasons: Object.entries(isRecord(advice.reasons) ? advice.reasons : {}).flatMap(([quantity, reason]) =>
      isRecord(reason)
        ? [
            {
              quantity,
              formula: text(reason.formula),
              source: inWords(reason.source),
              label: text(reason.label),
              uncertainty: inWords(reason.uncertainty),
              wouldChangeIf: inWords(reason.wouldChangeIf),
              inputs: reveal && isRecord(reason.inputs) ? reason.inputs : null,
            },
          ]
        : [],
    ),
  }
}
