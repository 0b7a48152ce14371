/**
 * Where the advice turns, and which answers it hangs on. Tipping points: the nearest values of a number at which something a rider would act on
 * changes. Influence: what one plain step of each answer moves, the strongest first. Both ask the advice itself again and again, so they can say
 * nothing that it would not; nothing here has a formula of its own.
 */
import { advise, type Advice } from './advise.ts'
import type { Answers } from './answers.ts'
import type { WheelsetFacts } from './catalogue.ts'
import type { Rules } from './rules.ts'

export const tippingInputs = ['bodyMassKg', 'tyreWidthMm', 'luggageKg', 'bikeMassKg', 'flatSpeedKmh'] as const
export type TippingInput = (typeof tippingInputs)[number]

/** What a rider would act on; a tipping point is where one of these is another. */
export const tippingWhats = [
  'outcome',
  'first',
  'offered',
  'depth-front',
  'depth-rear',
  'spokes-front',
  'spokes-rear',
  'pressure',
] as const
export type TippingWhat = (typeof tippingWhats)[number]

export interface TippingPoint {
  input: TippingInput
  /** The rider's own value, or the one assumed. */
  from: number
  /** The nearest value at which the advice is another, to `resolution`. */
  at: number
  direction: 'down' | 'up'
  changes: { what: TippingWhat; before: string; after: string }[]
}

interface Axis {
  input: TippingInput
  least: number
  most: number
  /** First look is at every `stride`; the point is then found to `resolution`. */
  stride: number
  resolution: number
  value: (answers: Answers, advice: Advice) => number | null
  with: (answers: Answers, value: number) => Answers
}

const axes: readonly Axis[] = [
  {
    input: 'bodyMassKg',
    least: 30,
    most: 180,
    stride: 2,
    resolution: 0.1,
    value: (_, advice) => advice.parts.bodyMassKg,
    with: ({ bodyMassBandKg: _, ...answers }, bodyMassKg) => ({ ...answers, bodyMassKg }),
  },
  {
    input: 'tyreWidthMm',
    least: 20,
    most: 75,
    stride: 1,
    resolution: 1,
    value: ({ tyre }) => tyre && tyre.frontWidthMm,
    // Front and rear move together: a rider buys a pair.
    with: (answers, width) =>
      answers.tyre
        ? {
            ...answers,
            tyre: {
              ...answers.tyre,
              frontWidthMm: width,
              rearWidthMm: Math.min(75, Math.max(20, answers.tyre.rearWidthMm + width - answers.tyre.frontWidthMm)),
            },
          }
        : answers,
  },
  {
    input: 'luggageKg',
    least: 0,
    most: 60,
    stride: 2,
    resolution: 0.1,
    value: (_, advice) => advice.parts.luggageKg,
    with: (answers, luggageKg) => ({ ...answers, luggageKg }),
  },
  {
    input: 'bikeMassKg',
    least: 5,
    most: 35,
    stride: 1,
    resolution: 0.1,
    value: (answers) => answers.bikeMassKg ?? null,
    with: (answers, bikeMassKg) => ({ ...answers, bikeMassKg }),
  },
  {
    input: 'flatSpeedKmh',
    least: 12,
    most: 50,
    stride: 2,
    resolution: 0.5,
    value: (answers) => answers.flatSpeedKmh ?? null,
    with: (answers, flatSpeedKmh) => ({ ...answers, flatSpeedKmh }),
  },
]

/** How far a first look goes each way: beyond it a change is no news for this rider. */
const REACH_STRIDES = 15

const range = (depth: { from: number; to: number } | undefined) => (depth ? `${depth.from}-${depth.to}` : '')

function state(advice: Advice): Record<TippingWhat, string> {
  const offered = advice.wheelsets.filter(({ rank }) => rank !== null)
  return {
    outcome: advice.outcome,
    first: offered[0]?.sku ?? '',
    offered: String(offered.length),
    'depth-front': range(advice.rimDepthMm?.front),
    'depth-rear': range(advice.rimDepthMm?.rear),
    'spokes-front': String(advice.spokes?.front.min ?? ''),
    'spokes-rear': String(advice.spokes?.rear.min ?? ''),
    // Pressures move with every kilogram; what turns is which maximum holds them down.
    pressure: advice.pressure ? `${heldBy(advice, 'front')} ${heldBy(advice, 'rear')}` : 'none',
  }
}

function heldBy({ pressure }: Advice, position: 'front' | 'rear'): string {
  const wheel = pressure?.[position]
  if (!wheel) return 'none'
  return wheel.startBar >= wheel.ceilingBar ? wheel.ceilingFrom : 'free'
}

/**
 * The nearest change below and above the rider's own value of each number.
 * @returns none for a number that nobody gave or assumed (no tyre: no width), and none for an answer out of scope
 * @throws RangeError for answers that the contract should have refused
 */
export function tippingPoints(
  answers: Answers,
  catalogue: readonly WheelsetFacts[],
  rules: Rules,
  rulesVersion: string,
): TippingPoint[] {
  const ask = (changed: Answers) => state(advise(changed, catalogue, rules, rulesVersion))
  const base = advise(answers, catalogue, rules, rulesVersion)
  if (base.outcome === 'out-of-scope') return []
  const found: TippingPoint[] = []
  for (const axis of axes) {
    const from = axis.value(answers, base)
    if (from === null) continue
    // The state along the axis, the rider's own point included, so that a band or an assumed value is compared with itself.
    const before = ask(axis.with(answers, from))
    for (const direction of ['down', 'up'] as const) {
      const point = nearest(axis, answers, from, direction, before, ask)
      if (point) found.push(point)
    }
  }
  return found
}

function nearest(
  axis: Axis,
  answers: Answers,
  from: number,
  direction: 'down' | 'up',
  before: Record<TippingWhat, string>,
  ask: (answers: Answers) => Record<TippingWhat, string>,
): TippingPoint | null {
  const sign = direction === 'up' ? 1 : -1
  const edge = direction === 'up' ? axis.most : axis.least
  let inside = from
  for (let stride = 1; stride <= REACH_STRIDES; stride += 1) {
    const reach = from + sign * stride * axis.stride
    const value = sign * reach > sign * edge ? edge : reach
    if (value === inside) return null
    if (same(ask(axis.with(answers, value)), before)) {
      inside = value
      continue
    }
    let outside = value
    // On whole steps of the resolution, so that the value shown is itself past the turn.
    const steps = (a: number) => Math.round(a / axis.resolution)
    const grid = (k: number) => Number((k * axis.resolution).toFixed(6))
    let [near, far] =
      direction === 'up'
        ? [Math.floor(inside / axis.resolution + 1e-9), Math.ceil(outside / axis.resolution - 1e-9)]
        : [Math.ceil(inside / axis.resolution - 1e-9), Math.floor(outside / axis.resolution + 1e-9)]
    far = sign * grid(far) > sign * edge ? steps(outside) : far
    while (Math.abs(far - near) > 1) {
      const middle = Math.round((near + far) / 2)
      if (same(ask(axis.with(answers, grid(middle))), before)) near = middle
      else far = middle
    }
    outside = grid(far)
    const after = ask(axis.with(answers, outside))
    if (same(after, before)) return null
    return {
      input: axis.input,
      from,
      at: outside,
      direction,
      changes: tippingWhats.flatMap((what) =>
        after[what] === before[what] ? [] : [{ what, before: before[what], after: after[what] }],
      ),
    }
  }
  return null
}

const same = (a: Record<TippingWhat, string>, b: Record<TippingWhat, string>) =>
  tippingWhats.every((what) => a[what] === b[what])

/** What a step of an answer moves, each in the unit in which a rider would notice it. */
export const influenceParts = ['pressure', 'depth', 'spokes', 'margin', 'offers', 'first', 'outcome'] as const
export type InfluencePart = (typeof influenceParts)[number]

export interface Influence {
  input: string
  /** The step that was tried, as words or numbers of the contract. */
  step: unknown
  /** Sum of the parts, 0 where the step moves nothing. */
  score: number
  strongest: InfluencePart | null
  assumed: boolean
}

const next = <T>(list: readonly T[], value: T): T | undefined =>
  list[list.indexOf(value) + 1] ?? list[list.indexOf(value) - 1]

/** One plain step of each answer: what a scale, a tape or an honest second thought could differ by. */
function steps(answers: Answers, advice: Advice): { input: string; step: unknown; answers: Answers }[] {
  const { bodyMassBandKg: _, ...rest } = answers
  const mass = advice.parts.bodyMassKg
  const { tyre } = answers
  const wind = next(['sheltered', 'typical', 'exposed'], answers.wind ?? 'typical')
  const confidence = next(['nervous', 'average', 'confident'], answers.confidence ?? 'nervous')
  const terrain = next(['flat', 'rolling', 'hilly', 'mountain'], answers.terrain ?? 'rolling')
  const surface = next(['smooth', 'mixed', 'rough'] as const, answers.surface ?? 'mixed')
  const speed = answers.flatSpeedKmh ?? 28
  const bike = answers.bikeMassKg ?? advice.parts.bikeMassKg
  const position = answers.position ?? 'drop'
  return [
    { input: 'bodyMassKg', step: 5, answers: { ...rest, bodyMassKg: Math.min(180, mass + 5) } },
    { input: 'kitMassKg', step: 2, answers: { ...answers, kitMassKg: Math.min(15, advice.parts.kitMassKg + 2) } },
    { input: 'bikeMassKg', step: 2, answers: { ...answers, bikeMassKg: Math.min(35, bike + 2) } },
    { input: 'luggageKg', step: 10, answers: { ...answers, luggageKg: Math.min(60, advice.parts.luggageKg + 10) } },
    ...(tyre
      ? [
          {
            input: 'tyre.widthMm',
            step: 2,
            answers: {
              ...answers,
              tyre: {
                ...tyre,
                frontWidthMm: Math.min(75, tyre.frontWidthMm + 2),
                rearWidthMm: Math.min(75, tyre.rearWidthMm + 2),
              },
            },
          },
        ]
      : []),
    { input: 'wind', step: wind, answers: { ...answers, wind } },
    { input: 'confidence', step: confidence, answers: { ...answers, confidence } },
    { input: 'terrain', step: terrain, answers: { ...answers, terrain } },
    { input: 'surface', step: surface, answers: { ...answers, surface } },
    { input: 'flatSpeedKmh', step: 4, answers: { ...answers, flatSpeedKmh: Math.min(50, speed + 4) } },
    {
      input: 'position',
      step: position === 'upright' ? 'drop' : 'upright',
      answers: { ...answers, position: position === 'upright' ? 'drop' : 'upright' },
    },
  ]
}

/**
 * Which answers this rider's advice hangs on, the strongest first; equal ones in the order of the form.
 * A step counts by what it moves: pressures in halves of their band, depths by 15 mm (the doubt of the method), spokes by one drilling step of
 * four, the margin by a twentieth of the limit, and one each for another first choice, another outcome and every tenth of the offers.
 * @returns one entry for each answer that was stepped, steps that move nothing included
 */
export function influence(
  answers: Answers,
  catalogue: readonly WheelsetFacts[],
  rules: Rules,
  rulesVersion: string,
): Influence[] {
  const base = advise(answers, catalogue, rules, rulesVersion)
  if (base.outcome === 'out-of-scope') return []
  return steps(answers, base)
    .map(({ input, step, answers: changed }) => {
      const parts = moved(base, advise(changed, catalogue, rules, rulesVersion))
      let score = 0
      let strongest: InfluencePart | null = null
      for (const part of influenceParts) {
        score += parts[part]
        if (parts[part] > (strongest ? parts[strongest] : 0)) strongest = part
      }
      const assumed = base.assumed.includes(input)
      return { input, step, score, strongest, assumed }
    })
    .sort((a, b) => b.score - a.score)
}

function moved(a: Advice, b: Advice): Record<InfluencePart, number> {
  const apart = (x: number | undefined, y: number | undefined) => Math.abs((x ?? 0) - (y ?? 0))
  const [first, second] = [a, b].map((one) => one.wheelsets.find(({ rank }) => rank === 1))
  const [offersA = 0, offersB = 0] = [a, b].map((one) => one.wheelsets.filter(({ rank }) => rank !== null).length)
  const pressureOf = (position: 'front' | 'rear') => {
    const [p, q] = [a.pressure?.[position], b.pressure?.[position]]
    if (!p || !q) return p === q || (!p && !q) ? 0 : 1
    return Math.abs(p.startBar - q.startBar) / Math.max(0.05, (p.highBar - p.lowBar) / 2)
  }
  return {
    pressure: Math.max(pressureOf('front'), pressureOf('rear')),
    depth:
      Math.max(
        apart(a.rimDepthMm?.front.to, b.rimDepthMm?.front.to),
        apart(a.rimDepthMm?.rear.to, b.rimDepthMm?.rear.to),
        apart(a.rimDepthMm?.front.from, b.rimDepthMm?.front.from),
      ) / 15,
    spokes:
      Math.max(apart(a.spokes?.front.min, b.spokes?.front.min), apart(a.spokes?.rear.min, b.spokes?.rear.min)) / 4,
    margin: first ? Math.abs(a.systemMassKg - b.systemMassKg) / (0.05 * first.limitKg) : 0,
    offers: (10 * Math.abs(offersA - offersB)) / Math.max(1, a.wheelsets.length),
    first: Number(first?.sku !== second?.sku),
    outcome: Number(a.outcome !== b.outcome),
  }
}
