/**
 * The usual builds that advised spoke counts are read from: rims, hubs and lacing of the wheel reference 3.1, 3.3 and 3.6, tight side 1200 N.
 * `npm run solve-wheels` puts them through the structural model and keeps the outcome in solved-wheels.json.
 */
import { rimSection } from '#core/rim-section.ts'
import type { WheelUse } from '#core/rider-limits.ts'
import type { WheelDesign } from '#core/wheel-geometry.ts'

export const REFERENCE_TIGHT_N = 1200
export const referenceCounts = [16, 20, 24, 28, 32, 36] as const
/** The rim that a use is advised on: 30 mm carbon, in the mountains 25 mm. */
export const referenceRims = {
  'road-rim': { material: 'carbon', depthMm: 30 },
  'road-disc': { material: 'carbon', depthMm: 30 },
  gravel: { material: 'carbon', depthMm: 30 },
  mountain: { material: 'carbon', depthMm: 25 },
} as const satisfies Record<WheelUse, ReferenceRim>

export interface ReferenceRim {
  material: 'alloy' | 'carbon'
  depthMm: number
}

const alloyWidths: Record<number, number> = { 14: 20, 18: 22, 24: 23, 28: 24 }

/** PCD left, right, flange left, right, mm: generic classes, MEMORY. */
const hubs: Record<WheelUse, Record<'front' | 'rear', readonly [number, number, number, number]>> = {
  'road-rim': { front: [38, 38, 36, 36], rear: [44, 50, 37, 17.5] },
  'road-disc': { front: [58, 52, 23.5, 34], rear: [58, 54, 34, 19] },
  gravel: { front: [58, 52, 23.5, 34], rear: [58, 54, 34, 19] },
  mountain: { front: [58, 58, 27, 37.5], rear: [58, 56, 35, 21] },
}

/** Crosses left and right. */
export function usualLacing(
  brake: 'rim' | 'disc',
  position: 'front' | 'rear',
  count: number,
): [left: number, right: number] {
  if (count >= 32) return [3, 3]
  if (brake === 'disc') return count === 16 ? [1, 1] : count <= 24 ? [2, 2] : [3, 3]
  if (position === 'front') return count <= 24 ? [0, 0] : [2, 2]
  return count === 16 ? [0, 1] : count <= 24 ? [0, 2] : [3, 3]
}

export function referenceDesign(
  use: WheelUse,
  { material, depthMm }: ReferenceRim,
  position: 'front' | 'rear',
  count: number,
): WheelDesign {
  const stout = use === 'mountain' && depthMm === 25
  const section = rimSection({
    build: material === 'alloy' ? 'alloy' : stout ? 'stout-carbon' : 'carbon',
    depthMm,
    widthMm: material === 'alloy' ? (alloyWidths[depthMm] ?? 24) : stout ? 30 : 28,
    beadSeatMm: 622,
  })
  const [pcdLeftMm, pcdRightMm, flangeLeftMm, flangeRightMm] = hubs[use][position]
  const [crossesLeft, crossesRight] = usualLacing(use === 'road-rim' ? 'rim' : 'disc', position, count)
  return {
    spokeCount: count,
    rimEaN: section.eaN,
    rimEiRadialNm2: section.eiRadialNm2,
    rimEiLateralNm2: section.eiLateralNm2,
    rimGjNm2: section.gjNm2,
    centroidRadiusM: section.centroidRadiusM,
    nippleRadiusM: section.nippleRadiusM,
    pcdLeftMm,
    pcdRightMm,
    flangeLeftMm,
    flangeRightMm,
    crossesLeft,
    crossesRight,
    spokeEaN: material === 'alloy' ? 517_800 : use === 'gravel' || use === 'mountain' ? 416_000 : 367_800,
    rimOffsetMm: 0,
    staggerMm: material === 'alloy' ? 2 : 0,
  }
}
