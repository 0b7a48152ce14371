/** Holds a reply of the advice against the bounds of a reference rider. Bounds are outer limits for any sane advice, not targets. */
import type { Advice } from '#contract/advisor.ts'
import type { WheelsetFacts } from '#core/catalogue.ts'

export interface Bound {
  field: string
  op: string
  value: unknown
  where?: string
  needs?: string
  semantic?: boolean
}
export interface Persona {
  id: string
  title: string
  inputs: Record<string, unknown>
  bounds: Bound[]
}

const at = (tree: unknown, path: string): unknown =>
  path
    .split('.')
    .reduce<unknown>(
      (branch, name) =>
        typeof branch === 'object' && branch !== null ? (branch as Record<string, unknown>)[name] : undefined,
      tree,
    )

/** Meanings that no single field holds, each looked up where the reply says it. */
function semantic(bound: Bound, reply: Advice, facts: ReadonlyMap<string, WheelsetFacts>): boolean | null {
  const codes = reply.notes.map(({ code }) => code)
  const offers = reply.wheelsets.filter(({ rank }) => rank !== null).map(({ sku }) => facts.get(sku))
  const text = JSON.stringify(reply).toLowerCase()
  const refusal = reply.notes.find(({ severity }) => severity === 'stop')
  switch (`${bound.field} ${bound.op}`) {
    case 'refusal mentions_all':
      return (
        refusal?.code === 'over-every-limit' &&
        ['totalKg', 'limitKg', 'gapKg'].every((name) => typeof refusal.data[name] === 'number')
      )
    case 'refusal mentions':
      return (
        refusal !== undefined &&
        typeof refusal.data.leastTyreMm === 'number' &&
        typeof refusal.data.widestHookedInnerMm === 'number'
      )
    case 'refusal reason is_any_of':
      return refusal?.code === 'tyre-too-narrow-for-rim'
    case 'every text of the reply not_contains':
      return (bound.value as string[]).every((word) => !text.includes(word))
    case 'notes mentions':
      return String(bound.value).startsWith('brake heat')
        ? codes.includes('brake-heat')
        : codes.includes('luggage-counted') && codes.includes('bare-ride-lower-pressure')
    case 'wheelsets[*].verdict offer_requires':
      return offers.every(
        (set) => set && (String(bound.value).includes('assisted') ? set.assistRated : set.brake === 'rim'),
      )
    case 'rear share of the two wheel loads (0-1) >=':
      return reply.loads !== null && 1 - reply.loads.frontShare >= Number(bound.value)
    case 'reply mentions':
      return codes.includes('who-can-help')
    case 'any tyre width the reply suggests, mm >=':
      return reply.notes.every(
        ({ data }) => typeof data.widthThatWouldDoMm !== 'number' || data.widthThatWouldDoMm >= Number(bound.value),
      )
    default:
      return null
  }
}

/** @returns a line for each bound that is not met; bounds tested elsewhere (storage, display, unit entry) are listed in `elsewhere` */
export function checkPersona(
  persona: Persona,
  reply: Advice,
  facts: ReadonlyMap<string, WheelsetFacts>,
): { failures: string[]; elsewhere: string[] } {
  const failures: string[] = []
  const elsewhere: string[] = []
  const shown = reply.outcome === 'recommend' || reply.outcome === 'recommend-with-notes'
  for (const bound of persona.bounds) {
    const { field, op, value } = bound
    const say = `${persona.id} ${field} ${op} ${JSON.stringify(value)}`
    if (bound.needs === 'unknown') {
      elsewhere.push(say)
      continue
    }
    if (field === 'wheelsets[*].limitKg') {
      if (!reply.wheelsets.every(({ rank, limitKg }) => rank === null || limitKg >= Number(value))) failures.push(say)
      continue
    }
    const meaning = semantic(bound, reply, facts)
    if (meaning !== null) {
      if (!meaning) failures.push(say)
      continue
    }
    const got = at(reply, field)
    if (got === undefined && bound.semantic) {
      elsewhere.push(say)
      continue
    }
    // A value that is not shown cannot be wrong, but only a refusal may leave it out.
    if (got === undefined && !shown) continue
    const number = Number(got)
    const range = value as [number, number]
    const met =
      op === 'within'
        ? number >= range[0] && number <= range[1]
        : op === 'equals_within'
          ? Math.abs(number - range[0]) <= range[1]
          : op === 'in'
            ? (value as unknown[]).includes(got)
            : op === '<='
              ? number <= Number(value)
              : op === '>='
                ? number >= Number(value)
                : op === '<=_field'
                  ? number <= Number(at(reply, String(value)))
                  : op === '>=_field'
                    ? number >= Number(at(reply, String(value)))
                    : false
    if (!met) failures.push(`${say}: got ${JSON.stringify(got)}`)
  }
  return { failures, elsewhere }
}
