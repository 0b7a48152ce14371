/**
 * What a solved wheel carries: a limit in kg by each criterion, the lowest wins. Advice on durability, ±25 %, never a guarantee and never above the
 * maker's own limit. Masses in kg, forces in N.
 * @source wheel reference 2.10 (criteria DERIVED, thresholds of mixed label: 6.2)
 */
import type { Rules } from './rules.ts'
import { STANDARD_GRAVITY } from './units.ts'
import type { WheelStructure } from './wheel-structure.ts'

/** What the criteria read of a solved wheel; kept with the wheel. */
export interface WheelStrength {
  firstSlackN: number
  /** Mean over the positions of the lacing, N/mm. */
  lateralNPerMm: number
  /** Range of tension in one turn for each newton of load, the worse side. */
  rangePerN: number
  /** System weight that slackens a first spoke in the torque case of this position, N. */
  torqueWeightN: number
  /** One spoke gone: sideways shift at its hole and least tension left, the worse side. */
  brokenShiftMm: number
  brokenLeastTensionN: number
  lateralFirstSlackN: number
  /** Part of the load that the bottom spoke loses. */
  share: number
}

/** The part of a solution that the criteria need. */
export function strengthOf(structure: WheelStructure, position: 'front' | 'rear'): WheelStrength {
  const { left, right } = structure.brokenSpoke
  return {
    firstSlackN: structure.firstSlackN,
    lateralNPerMm: structure.lateralNPerMm.mean,
    rangePerN: Math.max(structure.rangePerN.left, structure.rangePerN.right),
    torqueWeightN: structure.torqueWeightN[position],
    brokenShiftMm: Math.max(left.shiftMm, right.shiftMm),
    brokenLeastTensionN: Math.min(left.leastTensionN, right.leastTensionN),
    lateralFirstSlackN: structure.lateralFirstSlackN,
    share: structure.share,
  }
}

export type WheelUse = 'road-rim' | 'road-disc' | 'gravel' | 'mountain'

export function useOf(ride: string, brakes: 'rim' | 'disc'): WheelUse {
  if (ride === 'cross-country' || ride === 'trail') return 'mountain'
  if (ride === 'gravel' || ride === 'cyclocross' || ride === 'bikepacking') return 'gravel'
  return brakes === 'rim' ? 'road-rim' : 'road-disc'
}

/** In the order in which equal ones are named. */
export const criteria = ['tension-reserve', 'side-stiffness', 'fatigue', 'torque'] as const
export type Criterion = (typeof criteria)[number]

export interface RiderLimit {
  /** Rider alone, on the bike and kit that the table adds. */
  riderKg: number
  /** The same as a ready-to-ride total, with its band. */
  systemKg: number
  bandKg: { low: number; high: number }
  governedBy: Criterion
  /** Rider limit of each criterion; null where it is not applied. */
  byCriterion: Record<Criterion, number | null>
  /** Stays rideable with one spoke gone and slackens no spoke under a hard side load; false: not advised for this use at any mass. */
  robust: boolean
}

/**
 * A tension reserve: η·P_slack/(k·s·g) − extra; B side stiffness: ratio·K_lat·δ/(c·g); C fatigue: N_elbow/(k_f·r·s·g) − extra;
 * E torque: (1 − tyre loss)·W/g − extra, not in front on rim brakes; D robust: shift ≤ 4 mm, no second spoke slack, side load ≥ the norm's.
 * @throws Error when the rules lack the use
 */
export function riderLimit(
  strength: WheelStrength,
  position: 'front' | 'rear',
  use: WheelUse,
  rules: Pick<Rules, 'wheel-criteria'>,
): RiderLimit {
  const table = rules['wheel-criteria']
  const row = table.byUse[use]
  if (!row) throw new Error(`wheel criteria have no row ${use}`)
  const perKg = row.loadShare[position] * STANDARD_GRAVITY
  const kept = (1 - row.tyreLoss) * (1 - table.buildScatter)
  const byCriterion: RiderLimit['byCriterion'] = {
    'tension-reserve': (kept * strength.firstSlackN) / (row.dynamicFactor * perKg) - row.extraKg,
    'side-stiffness': (table.realStiffness * strength.lateralNPerMm * row.sideMm) / (row.sideShare * STANDARD_GRAVITY),
    fatigue: table.elbowRangeN / (row.fatigueFactor * strength.rangePerN * perKg) - row.extraKg,
    torque:
      use === 'road-rim' && position === 'front'
        ? null
        : ((1 - row.tyreLoss) * strength.torqueWeightN) / STANDARD_GRAVITY - row.extraKg,
  }
  let governedBy: Criterion = 'tension-reserve'
  for (const criterion of criteria)
    if ((byCriterion[criterion] ?? Infinity) < (byCriterion[governedBy] ?? Infinity)) governedBy = criterion
  const riderKg = byCriterion[governedBy] ?? 0
  const systemKg = riderKg + row.extraKg
  return {
    riderKg,
    systemKg,
    bandKg: { low: systemKg * (1 - table.bandShare), high: systemKg * (1 + table.bandShare) },
    governedBy,
    byCriterion,
    robust:
      strength.brokenShiftMm <= table.brokenShiftMm &&
      strength.brokenLeastTensionN > 0 &&
      strength.lateralFirstSlackN >= row.leastSideN,
  }
}
