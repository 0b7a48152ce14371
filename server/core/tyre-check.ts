/** The rider's tyre on one wheelset's own rims: approved range, pairing, pressure. What does not go together names the smallest change that would. */
import type { Filled } from './answers.ts'
import type { WheelFacts, WheelsetFacts } from './catalogue.ts'
import type { Rules } from './rules.ts'
import { pairTyre } from './tyre-rim.ts'
import { wheelPressure } from './wheel-pressure.ts'

export interface NearestChange {
  code: string
  field: string
  to: unknown
}

export interface Removal {
  verdict: 'mismatch' | 'pressure' | 'over-limit'
  code: string
  change?: NearestChange
}

export interface TyreCheck {
  removal: Removal | null
  codes: string[]
  /** Start values on these rims; null without a tyre, outside the model and where it is ruled out. */
  startBar: { front: number; rear: number } | null
}

type Tyre = NonNullable<Filled['tyre']>
interface Loaded {
  filled: Filled
  loadsKg: { front: number; rear: number }
  rules: Rules
}

const positions = ['front', 'rear'] as const
const widthOf = (tyre: Tyre, position: 'front' | 'rear') =>
  position === 'front' ? tyre.frontWidthMm : tyre.rearWidthMm

function onWheel(
  wheel: WheelFacts,
  tyre: Tyre,
  { filled, loadsKg, rules }: Loaded,
): { removal: Removal | null; codes: string[]; startBar: number | null } {
  const { position, seat, innerWidthMm, maxPressureBar, tyreMinMm, tyreMaxMm } = wheel
  const widthMm = widthOf(tyre, position)
  const no = (code: string, verdict: 'mismatch' | 'pressure' = 'mismatch') => ({
    removal: { verdict, code },
    codes: [],
    startBar: null,
  })
  const pairing = pairTyre({
    seat,
    innerWidthMm,
    widthMm,
    setup: tyre.setup,
    hooklessApproved: tyre.hooklessApproved ?? null,
    leastOnHookless: rules['hookless-least-tyres'].rows,
  })
  if (pairing.verdict === 'no') return no(pairing.code)
  if (widthMm < tyreMinMm) return no('tyre-too-narrow-for-rim')
  if (widthMm > tyreMaxMm) return no('tyre-too-wide-for-rim')
  const result = wheelPressure(
    { ...filled, tyre },
    position,
    loadsKg[position],
    { seat, innerWidthMm, maxBar: maxPressureBar },
    rules,
  )
  if (result.verdict === 'not-suitable') return no('pressure-not-suitable', 'pressure')
  const codes = [
    ...(pairing.verdict === 'check' ? [pairing.code] : []),
    // The narrow or wide row may be the one that answered: the tyre's approval still has to be asked for.
    ...(seat === 'hookless' && (tyre.hooklessApproved ?? null) === null ? ['confirm-hookless-tyre'] : []),
    ...(result.verdict === 'ok' ? [] : [result.verdict]),
  ]
  return { removal: null, codes, startBar: result.pressure?.startBar ?? null }
}

/** The tyre that another width would be: its own maximum, minimum and measure are not known. */
const otherTyre = (tyre: Tyre, widths: Partial<Pick<Tyre, 'frontWidthMm' | 'rearWidthMm'>>): Tyre => ({
  ...tyre,
  ...widths,
  minBar: null,
  maxBar: null,
  measured: false,
})

/**
 * The smallest change of the tyre that lets this wheelset take it: the nearest whole width, else another set-up, else an approved tyre.
 * @returns undefined where none of them does
 */
function wayBack(set: WheelsetFacts, tyre: Tyre, loaded: Loaded): NearestChange | undefined {
  const takes = (changed: Tyre) => positions.every((position) => !onWheel(set[position], changed, loaded).removal)
  const wrong = positions.filter((position) => onWheel(set[position], tyre, loaded).removal)
  const rims = wrong.map((position) => set[position])
  const least = Math.ceil(Math.max(...rims.map(({ tyreMinMm }) => tyreMinMm)))
  const most = Math.floor(Math.min(loaded.filled.bike.maxTyreMm ?? Infinity, ...rims.map(({ tyreMaxMm }) => tyreMaxMm)))
  const distance = (widthMm: number) =>
    Math.max(...wrong.map((position) => Math.abs(widthMm - widthOf(tyre, position))))
  const widthMm = Array.from({ length: Math.max(0, most - least + 1) }, (_, index) => least + index)
    .sort((a, b) => distance(a) - distance(b))
    .find((width) => takes(otherTyre(tyre, Object.fromEntries(wrong.map((position) => [`${position}WidthMm`, width])))))
  if (widthMm !== undefined) {
    const change = { code: 'other-tyre', field: 'tyre.widthMm', to: widthMm }
    return wrong.length === 2 ? change : { ...change, field: `tyre.${wrong[0] ?? 'rear'}WidthMm` }
  }
  if (tyre.setup !== 'tubeless' && takes({ ...tyre, setup: 'tubeless' }))
    return { code: 'other-fact', field: 'tyre.setup', to: 'tubeless' }
  if (tyre.hooklessApproved === false && takes({ ...tyre, hooklessApproved: true }))
    return { code: 'other-fact', field: 'tyre.hooklessApproved', to: true }
  return undefined
}

/** @returns the first rule by which these rims do not take the tyre, or the pressures to start from on them */
export function tyreCheck(set: WheelsetFacts, loaded: Loaded): TyreCheck {
  const { tyre } = loaded.filled
  if (!tyre) return { removal: null, codes: ['tyre-unknown'], startBar: null }
  const [front, rear] = [onWheel(set.front, tyre, loaded), onWheel(set.rear, tyre, loaded)]
  const removal = front.removal ?? rear.removal
  if (removal) {
    const change = wayBack(set, tyre, loaded)
    return { removal: change ? { ...removal, change } : removal, codes: [], startBar: null }
  }
  return {
    removal: null,
    codes: [...new Set([...front.codes, ...rear.codes])],
    startBar: front.startBar === null || rear.startBar === null ? null : { front: front.startBar, rear: rear.startBar },
  }
}
