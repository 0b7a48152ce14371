/** Every answer that stands behind the findings, in the groups they are shown in, with how each is given. */
import {
  assists,
  brakeKinds,
  confidences,
  luggagePlaces,
  positions,
  rides,
  rimSeats,
  terrains,
  tyreSetups,
  winds,
  type Advice,
} from '#contract/advisor.ts'
import { bikeChoices } from '../../lib/bike-choices.ts'
import type { Draft } from '../../lib/fitting.ts'

export type Field =
  | { path: string; kind: 'choice'; options: readonly (string | number | boolean)[]; required?: boolean }
  | {
      path: string
      kind: 'number'
      unit: 'mass' | 'pressure' | 'width' | 'speed' | 'share'
      least: number
      most: number
    }

const choice = (path: string, options: readonly (string | number | boolean)[], required = false): Field => ({
  path,
  kind: 'choice',
  options,
  required,
})
const number = (
  path: string,
  unit: 'mass' | 'pressure' | 'width' | 'speed' | 'share',
  least: number,
  most: number,
): Field => ({ path, kind: 'number', unit, least, most })

const yesNo = [true, false] as const

/** Bounds as the contract has them. The body mass has a question of its own. */
export const groups: readonly { name: 'load' | 'roads' | 'tyre' | 'bike'; fields: readonly Field[] }[] = [
  {
    name: 'load',
    fields: [
      number('kitMassKg', 'mass', 0, 15),
      number('bikeMassKg', 'mass', 5, 35),
      number('luggageKg', 'mass', 0, 60),
      choice('luggagePlace', luggagePlaces),
      choice('position', positions),
      number('frontLoadShare', 'share', 0.25, 0.6),
    ],
  },
  {
    name: 'roads',
    fields: [
      choice('ride', rides, true),
      choice('wind', winds),
      choice('confidence', confidences),
      choice('terrain', terrains),
      number('flatSpeedKmh', 'speed', 12, 50),
    ],
  },
  {
    name: 'tyre',
    fields: [
      number('tyre.frontWidthMm', 'width', 20, 75),
      number('tyre.rearWidthMm', 'width', 20, 75),
      choice('tyre.setup', tyreSetups, true),
      choice('tyre.measured', yesNo),
      number('tyre.maxBar', 'pressure', 0.3, 15),
      choice('tyre.hooklessApproved', yesNo),
      choice('rim.seat', rimSeats),
      number('rim.innerWidthMm', 'width', 13, 40),
      number('rim.maxBar', 'pressure', 0.3, 15),
      choice('beadSeatMm', [622, 584, 571, 559]),
    ],
  },
  {
    name: 'bike',
    fields: [
      choice('brakes', brakeKinds, true),
      choice('assist', assists),
      choice('ridersOnBike', [1, 2]),
      choice('bike.frontAxle', bikeChoices.frontAxle),
      choice('bike.rearAxle', bikeChoices.rearAxle),
      choice('bike.freehub', bikeChoices.freehub),
      choice('bike.rotorMount', bikeChoices.rotorMount),
      number('bike.maxTyreMm', 'width', 18, 90),
      number('bike.caliperOpeningMm', 'width', 15, 60),
    ],
  },
]

/** Questions that make no sense with the other answers are left out. */
export function asked({ path }: Field, draft: Draft): boolean {
  if (path === 'bike.rotorMount') return draft.brakes !== 'rim'
  if (path === 'bike.caliperOpeningMm') return draft.brakes !== 'disc'
  if (path.startsWith('tyre.') && !path.endsWith('WidthMm')) return Boolean(draft.tyre)
  return true
}

type Tree = Record<string, unknown>

export function readPath(draft: Draft, path: string): unknown {
  const [head = '', tail] = path.split('.')
  const branch = (draft as Tree)[head]
  return tail === undefined ? branch : (branch as Tree | null | undefined)?.[tail]
}

/** @param value undefined takes the answer away. A tyre needs both widths and a set-up before it counts. */
export function writePath(draft: Draft, path: string, value: unknown, usualSetup: string): Draft {
  const [head = '', tail] = path.split('.')
  if (tail === undefined) return { [head]: value }
  const branch = { ...((draft as Tree)[head] as Tree | null | undefined), [tail]: value }
  if (head === 'tyre') {
    branch.setup ??= usualSetup
    branch.frontWidthMm ??= branch.rearWidthMm
    branch.rearWidthMm ??= branch.frontWidthMm
    if (value === undefined && tail.endsWith('WidthMm')) return { tyre: null }
  }
  return { [head]: branch }
}

/** What the server took where nothing was said, as far as the working shows it. */
export function assumedValue(advice: Advice, path: string): unknown {
  const name = path.split('.').at(-1) ?? path
  if (path === 'ridersOnBike') return 1
  if (name in advice.parts) return advice.parts[name as keyof Advice['parts']]
  for (const reason of Object.values(advice.reasons)) if (name in reason.inputs) return reason.inputs[name]
  return undefined
}
