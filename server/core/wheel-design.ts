/** From the parts of the catalogue to the design that the structural model reads. */
import { rimSection } from './rim-section.ts'
import type { WheelDesign } from './wheel-geometry.ts'

export interface WheelParts {
  rim: {
    material: 'carbon' | 'alloy'
    depthMm: number
    outerWidthMm: number
    beadSeatMm: number
    nippleSeatDiameterMm: number
    offsetMm: number
  }
  hub: { pcdLeftMm: number; pcdRightMm: number; flangeLeftMm: number; flangeRightMm: number }
  spoke: { eaKn: number }
  spokeCount: number
  crossesLeft: number
  crossesRight: number
}

/** From this outer width on a carbon rim has the stout walls of mountain rims. */
const STOUT_FROM_MM = 33
/** Holes of alloy rims are staggered to their sides; moulded carbon rims are drilled on the centre line. */
const STAGGER_MM = { alloy: 2, carbon: 0 } as const

/**
 * Section stiffness from the rim's outline, as no maker's figures are kept: ±30 %, which moves rider limits by 5 to 9 %.
 * @throws RangeError for an outline that is no rim
 * @source wheel reference 3.1 (DERIVED) for the section, 3.6 for the stagger
 */
export function designFromParts(parts: WheelParts): WheelDesign {
  const { rim, hub, spoke, spokeCount, crossesLeft, crossesRight } = parts
  const build = rim.material === 'alloy' ? 'alloy' : rim.outerWidthMm >= STOUT_FROM_MM ? 'stout-carbon' : 'carbon'
  const section = rimSection({
    build,
    depthMm: rim.depthMm,
    widthMm: rim.outerWidthMm,
    beadSeatMm: rim.beadSeatMm,
  })
  return {
    spokeCount,
    rimEaN: section.eaN,
    rimEiRadialNm2: section.eiRadialNm2,
    rimEiLateralNm2: section.eiLateralNm2,
    rimGjNm2: section.gjNm2,
    centroidRadiusM: section.centroidRadiusM,
    nippleRadiusM: rim.nippleSeatDiameterMm / 2000,
    pcdLeftMm: hub.pcdLeftMm,
    pcdRightMm: hub.pcdRightMm,
    flangeLeftMm: hub.flangeLeftMm,
    flangeRightMm: hub.flangeRightMm,
    crossesLeft,
    crossesRight,
    spokeEaN: spoke.eaKn * 1000,
    rimOffsetMm: rim.offsetMm,
    staggerMm: STAGGER_MM[rim.material],
  }
}
