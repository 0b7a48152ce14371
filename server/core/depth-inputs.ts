/** What the depth sums need of a rider, with the words of the answers turned into numbers by the rule tables. */
import { offRoad, type Filled } from './answers.ts'
import type { WheelsetFacts } from './catalogue.ts'
import { lookUp, type Rules } from './rules.ts'
import type { DepthMethod } from './rules-aero.ts'
import { MOST_STALL_DEG } from './wind.ts'
import { stallYawDeg } from './wheel-drag.ts'

export interface DepthInputs {
  bodyMassKg: number
  bikeMassKg: number
  /** Kit and bags: they roll and climb, but the gust's cap does not count them. */
  carriedKg: number
  flatSpeedKmh: number
  /** Drag area by position, against the hoods. */
  positionDrag: number
  rollingCoefficient: number
  meanWindMs: number
  gustMs: number
  correctionDeg: number
  referenceSpeedMs: number
  /** Deepest rim that the use allows, whatever the wind. */
  clampMm: number
  terrain: { flatShare: number; climbShare: number; gradient: number }
  /** The tyre is far wider than the rim, as on gravel. */
  wideTyre: boolean
  /** Yaw from which the push of a deep rim fades, by tyre and rim width. */
  stallDeg: number
  method: DepthMethod
}

/** Aero bars allow more only on the open road: off it, on climbs and in traffic the use keeps its own clamp. */
function clampOf({ ride, position }: Filled, rules: Rules): number {
  const { byRide, aeroBarsMm } = rules['depth-clamps']
  const own = lookUp(byRide, ride)
  return position === 'aero' && own >= lookUp(byRide, 'road-long') ? Math.max(own, aeroBarsMm) : own
}

const widths = new WeakMap<readonly WheelsetFacts[], Map<string, number | null>>()

/**
 * Outside width that the rims for a ride usually have: the middle one of those in the catalogue. The brake plays no part: it must not change
 * what the air does.
 * @returns mm; null where the catalogue holds none
 */
export function usualRimOuterMm(ride: string, catalogue: readonly WheelsetFacts[]): number | null {
  const known = widths.get(catalogue) ?? new Map<string, number | null>()
  widths.set(catalogue, known)
  const found = known.get(ride)
  if (found !== undefined) return found
  const outer = catalogue
    .filter((set) => set.rides.includes(ride))
    .map(({ front }) => front.outerWidthMm)
    .sort((a, b) => a - b)
  const middle = outer[Math.floor(outer.length / 2)] ?? null
  known.set(ride, middle)
  return middle
}

/**
 * @param catalogue for the usual rim width; an empty one counts as rims as wide as the tyre asks for
 * @throws Error where the rule tables do not know a word of the answers
 * @source aero reference 2.8 steps 1 to 3; which words mean which numbers is policy, in the tables
 */
export function depthInputs(filled: Filled, catalogue: readonly WheelsetFacts[], rules: Rules): DepthInputs {
  const { wind, terrain } = rules
  const method = rules['depth-method']
  const [least, most] = method.speedKmh
  const tyreMm = filled.tyre ? Math.max(filled.tyre.frontWidthMm, filled.tyre.rearWidthMm) : null
  const rimMm = usualRimOuterMm(filled.ride, catalogue)
  return {
    bodyMassKg: filled.bodyKg,
    bikeMassKg: filled.bikeKg,
    carriedKg: filled.kitKg + filled.luggageKg,
    flatSpeedKmh: Math.min(most, Math.max(least, filled.flatSpeedKmh)),
    positionDrag: lookUp(method.positionDrag, filled.position),
    rollingCoefficient: lookUp(method.rolling, filled.surface),
    meanWindMs: lookUp(wind.meanMs, filled.wind),
    gustMs: lookUp(wind.gustMs, filled.wind),
    correctionDeg:
      lookUp(wind.correctionDeg, filled.confidence) * (filled.position === 'aero' ? wind.aeroBarsFactor : 1),
    referenceSpeedMs: filled.terrain === 'mountain' ? wind.mountainSpeedMs : wind.speedMs,
    clampMm: clampOf(filled, rules),
    terrain: {
      flatShare: lookUp(terrain.flatShare, filled.terrain),
      climbShare: lookUp(terrain.climbShare, filled.terrain),
      gradient: lookUp(terrain.gradient, filled.terrain),
    },
    wideTyre: tyreMm === null ? offRoad(filled.ride) : tyreMm >= method.wideTyre.fromMm,
    stallDeg: tyreMm === null || rimMm === null ? MOST_STALL_DEG : stallYawDeg(tyreMm, rimMm),
    method,
  }
}
