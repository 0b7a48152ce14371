import type { Wheelset, WheelFactsView } from '#contract/catalogue.ts'
import type { DrawnWheel } from '../ui/WheelLines.tsx'

/** Everyday road width where the rim takes it, else the narrowest that it takes. */
const EVERYDAY_TYRE_MM = 28
export const drawnTyreMm = ({ tyreMinMm, tyreMaxMm }: WheelFactsView) =>
  Math.max(tyreMinMm, Math.min(EVERYDAY_TYRE_MM, tyreMaxMm))

/** One wheel of a set as the drawings take it. */
export const drawn = (set: Wheelset, position: 'front' | 'rear'): DrawnWheel => ({
  ...set[position],
  beadSeatMm: set.beadSeatMm,
  tyreWidthMm: drawnTyreMm(set[position]),
})
