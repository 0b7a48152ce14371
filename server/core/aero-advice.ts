/** Everything that wind, air and brakes say of one rider: depth range, trade-off curve, pair, rim heat. Each sum is worked once. */
import type { Filled } from './answers.ts'
import { brakeHeatAdvice, type RimHeatAdvice } from './brake-heat.ts'
import type { WheelsetFacts } from './catalogue.ts'
import { depthInputs, type DepthInputs } from './depth-inputs.ts'
import { depthRange, ridingOf, SHALLOWEST_MM, type DepthRange, type Riding } from './rim-depth.ts'
import { lookUp, type Rules } from './rules.ts'
import { mixedPair, tradeOff, type MixedPair, type TradeOffPoint } from './trade-off.ts'
import { MOST_DEPTH_MM } from './wheel-drag.ts'

export interface AeroAdvice {
  given: DepthInputs
  riding: Riding
  depth: DepthRange
  pair: MixedPair
  tradeOff: TradeOffPoint[]
  /** Rim brakes only. */
  brakeHeat: RimHeatAdvice | null
}

const stocked = new WeakMap<readonly WheelsetFacts[], Map<string, readonly number[]>>()

/** Depths that the catalogue holds for a kind of brake, shallowest first, as far as the drag model goes: 25 to 100 mm. */
export function stockedDepths(catalogue: readonly WheelsetFacts[], brakes: string): readonly number[] {
  const known = stocked.get(catalogue) ?? new Map<string, readonly number[]>()
  stocked.set(catalogue, known)
  let depths = known.get(brakes)
  if (!depths) {
    const all = catalogue
      .filter(({ brake }) => brake === brakes)
      .flatMap(({ front, rear }) => [front.depthMm, rear.depthMm])
      .filter((mm) => mm >= SHALLOWEST_MM && mm <= MOST_DEPTH_MM)
    depths = [...new Set(all)].sort((a, b) => a - b)
    known.set(brakes, depths)
  }
  return depths
}

/**
 * @param totalKg everything that rolls, as the limits count it
 * @param catalogue every wheelset on sale
 * @throws RangeError and Error as its parts
 * @source aero reference 2.8
 */
export function aeroAdvice(
  filled: Filled,
  totalKg: number,
  catalogue: readonly WheelsetFacts[],
  rules: Rules,
): AeroAdvice {
  const given = depthInputs(filled, catalogue, rules)
  const riding = ridingOf(given)
  const depth = depthRange(given, riding)
  const rider = {
    bodyMassKg: filled.bodyKg,
    totalKg,
    gradient: lookUp(rules.terrain.descent, filled.terrain),
    mountain: filled.terrain === 'mountain',
    nervous: filled.confidence === 'nervous',
  }
  return {
    given,
    riding,
    depth,
    pair: mixedPair(given, depth, riding),
    tradeOff: tradeOff(given, stockedDepths(catalogue, filled.brakes), riding),
    brakeHeat: filled.brakes === 'rim' ? brakeHeatAdvice(rider, rules['brake-heat']) : null,
  }
}
