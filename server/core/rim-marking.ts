/** What speaks against a rim as it is entered: its marked maximum and its tyre range, held against the rule tables. */
import type { Rules } from './rules.ts'
import { hooklessRow, markedMaximumAllowed } from './tyre-pressure.ts'
import { pairTyre } from './tyre-rim.ts'

export interface RimMarking {
  seat: 'hooked' | 'hookless'
  innerWidthMm: number
  /** Maximum marked on the rim, bar gauge. */
  maxPressureBar: number
  tyreMinMm: number
  tyreMaxMm: number
}

export type RimFault = 'above-proof' | 'above-hookless-cap' | 'tyre-range' | 'tyre-too-narrow' | 'tyre-too-wide'

/**
 * @returns above-proof: 110 % of the marking would pass the proof inflation; above-hookless-cap: over the cap of the narrowest tyre it takes;
 *   tyre-range: empty; tyre-too-narrow, tyre-too-wide: an end of the range that the pairing table refuses. None for a rim that may be sold.
 * @source rule tables rim-proof, hookless-ceilings, tyre-rim-pairing
 */
export function rimFaults(rim: RimMarking, rules: Rules): RimFault[] {
  const { seat, innerWidthMm, maxPressureBar, tyreMinMm, tyreMaxMm } = rim
  const faults: RimFault[] = []
  if (!markedMaximumAllowed(maxPressureBar, rules['rim-proof'])) faults.push('above-proof')
  if (seat === 'hookless') {
    const caps = rules['hookless-ceilings']
    if (maxPressureBar > Math.min(caps.road.maxBar, hooklessRow(caps, tyreMinMm).maxBar))
      faults.push('above-hookless-cap')
  }
  if (!(tyreMinMm > 0 && tyreMinMm <= tyreMaxMm)) faults.push('tyre-range')
  const refused = (widthMm: number) =>
    pairTyre({ seat, innerWidthMm, widthMm, setup: 'tubeless', hooklessApproved: true }, rules['tyre-rim-pairing'])
      .verdict === 'no'
  if (refused(tyreMinMm)) faults.push('tyre-too-narrow')
  if (refused(tyreMaxMm)) faults.push('tyre-too-wide')
  return faults
}
