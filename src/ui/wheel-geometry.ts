/**
 * The shapes behind the drawings: rim, spokes and hub of one wheel, and the section of its rim, from plain numbers.
 * In: mm. Out: mm, in the wheel's own frame: the axle at the origin, x to the right and y DOWN as in SVG, z to the drive side.
 */

export interface WheelShape {
  /** Bead seat diameter: 622, 584, … */
  beadSeatMm: number
  tyreWidthMm: number
  depthMm: number
  spokeCount: number
  crossesLeft: number
  crossesRight: number
  /** Pitch-circle diameters: where the spokes hang in the hub's flanges. */
  pcdLeftMm: number
  pcdRightMm: number
  /** Centre plane to flange. */
  flangeLeftMm: number
  flangeRightMm: number
}

export interface RimShape {
  depthMm: number
  outerWidthMm: number
  innerWidthMm: number
  seat: 'hooked' | 'hookless'
}

export interface Point {
  x: number
  y: number
}
export interface Point3 extends Point {
  z: number
}
export interface SpokeLine {
  side: 'left' | 'right'
  hub: Point3
  rim: Point3
}

/** How far the rim's outer edge stands above its bead seat (hook height of the wheel reference, 3.1). */
export const RIM_EDGE_MM = 5.5

/** Radii from the axle, mm. A tyre stands about as high as it is wide; the spokes end where the rim does. */
export function wheelRadii({
  beadSeatMm,
  tyreWidthMm,
  depthMm,
}: Pick<WheelShape, 'beadSeatMm' | 'tyreWidthMm' | 'depthMm'>) {
  const beadSeat = beadSeatMm / 2
  const rimOuter = beadSeat + RIM_EDGE_MM
  return { beadSeat, tyreOuter: beadSeat + tyreWidthMm, rimOuter, rimInner: rimOuter - depthMm }
}

/** A point at `angle` clockwise from the top. @param angle radians */
export const onCircle = (radius: number, angle: number, z = 0): Point3 => ({
  x: radius * Math.sin(angle),
  y: -radius * Math.cos(angle),
  z,
})

/**
 * Every spoke from its hole in the flange to its seat in the rim.
 * Rim angle θ = 2πi/n; even spokes hang on the left flange, odd ones on the right; two lead, two trail (i mod 4);
 * hole angle = θ ± 4πx/n for x crosses.
 * @param nippleSeatDiameterMm where the spokes end; the rim's inner edge when left out
 * @source lacing rule of the wheel reference, 2.2 (derived there)
 */
export function spokeLines(wheel: Omit<WheelShape, 'tyreWidthMm'>, nippleSeatDiameterMm?: number): SpokeLine[] {
  const seat =
    nippleSeatDiameterMm === undefined ? wheelRadii({ ...wheel, tyreWidthMm: 0 }).rimInner : nippleSeatDiameterMm / 2
  const count = wheel.spokeCount
  return Array.from({ length: count }, (_, i) => {
    const side = i % 2 === 0 ? 'left' : 'right'
    const [crosses, pcd, z] =
      side === 'left'
        ? [wheel.crossesLeft, wheel.pcdLeftMm, -wheel.flangeLeftMm]
        : [wheel.crossesRight, wheel.pcdRightMm, wheel.flangeRightMm]
    const angle = (2 * Math.PI * i) / count
    const lead = i % 4 < 2 ? 1 : -1
    return {
      side,
      rim: onCircle(seat, angle),
      hub: onCircle(pcd / 2, angle + (lead * 4 * Math.PI * crosses) / count, z),
    }
  })
}

/** Centre of the hub's hole to the seat in the rim, mm. */
export const spokeLengthMm = ({ hub, rim }: SpokeLine) => Math.hypot(rim.x - hub.x, rim.y - hub.y, rim.z - hub.z)

/** Wall thicknesses and nose width for the section's drawing, mm; near the classes of the wheel reference, 3.1, and thick enough to be seen. */
const WALL = 1.6
const BED = 1.8
const NOSE = 3
const NOSE_WIDTH = 13
const HOOK_UNDERCUT = 0.9

/**
 * Right half of a rim's section as two outlines. Here x = 0 is the middle, y = 0 the rim's outer edge, y grows towards the axle.
 * Widths and depth are the rim's own; how thick the walls are is drawn, not measured.
 * @returns `outside`: from the top of the bead wall round to the nose; `inside`: the hollow; `bedMm`: depth of the tyre's bed
 */
export function rimSection({ depthMm, outerWidthMm, innerWidthMm, seat }: RimShape) {
  const outer = outerWidthMm / 2
  const inner = innerWidthMm / 2
  const nose = Math.min(NOSE_WIDTH / 2, outer - 2)
  const bed = RIM_EDGE_MM
  const well = bed + 2.2
  // The bed falls a little towards its middle, so that a bead finds room when it is fitted.
  const bead: Point[] =
    seat === 'hooked'
      ? [
          { x: inner, y: 0.5 },
          { x: inner, y: 1.5 },
          { x: inner + HOOK_UNDERCUT, y: 2.4 },
          { x: inner + HOOK_UNDERCUT, y: bed - 0.6 },
        ]
      : [
          { x: inner, y: 0.4 },
          { x: inner, y: bed - 0.6 },
        ]
  const shoulder = Math.min(depthMm - NOSE - 2, bed + BED + Math.max(2, depthMm * 0.16))
  const bulge = (depthMm - shoulder) * 0.42
  return {
    outer,
    inner,
    nose,
    bed,
    well,
    bead,
    shoulder,
    bulge,
    hollow: { top: well + BED, bottom: depthMm - NOSE, side: outer - WALL, noseSide: Math.max(1.5, nose - WALL) },
  }
}

/**
 * A tyre's outline over the rim: the circle of its width that passes through both bead walls at the rim's edge.
 * @returns centre above the rim's edge (y negative) and radius, mm; the widest point lies at the centre's height
 */
export function tyreCircle(tyreWidthMm: number, innerWidthMm: number) {
  const radius = tyreWidthMm / 2
  const half = Math.min(innerWidthMm / 2, radius)
  return { radius, half, centreY: -Math.sqrt(radius * radius - half * half) }
}
