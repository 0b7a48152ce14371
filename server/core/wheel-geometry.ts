/**
 * Where the spokes of a wheel run and how their tensions balance. Left is the side of the rotor or away from the sprockets (z < 0); spoke 0 is at
 * the bottom; even spokes are on the left. Local directions at a rim hole: radial outward, tangential towards growing angle, lateral to the right.
 * @source wheel reference 2.1 to 2.3 (DERIVED)
 */

/** One wheel as the structural model reads it. Lengths in m or mm as named, stiffnesses in N and N·m². */
export interface WheelDesign {
  /** 16 to 36, a multiple of 4. */
  spokeCount: number
  /** Stiffness of the rim section: along, bending in the plane of the wheel, bending out of it, twisting. */
  rimEaN: number
  rimEiRadialNm2: number
  rimEiLateralNm2: number
  rimGjNm2: number
  /** Radius of the section's centroid, and radius at which the nipple heads sit. */
  centroidRadiusM: number
  nippleRadiusM: number
  pcdLeftMm: number
  pcdRightMm: number
  /** Centre plane to flange. */
  flangeLeftMm: number
  flangeRightMm: number
  crossesLeft: number
  crossesRight: number
  spokeEaN: number
  /** Nipple line off the centre plane; negative is to the left. */
  rimOffsetMm: number
  /** Holes moved towards their own side. */
  staggerMm: number
}

export type Vector = readonly [radial: number, tangential: number, lateral: number]

/** One of the four spokes that the lacing repeats. */
export interface SpokeLine {
  lengthM: number
  /** Unit vector from hub to rim. */
  along: Vector
  /** From the rim's centroid to the nipple seat, m. */
  lever: Vector
}

const dot = (a: Vector, b: Vector) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
export const cross = (a: Vector, b: Vector): Vector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
]
export { dot }

const positive = [
  'rimEaN',
  'rimEiRadialNm2',
  'rimEiLateralNm2',
  'rimGjNm2',
  'centroidRadiusM',
  'nippleRadiusM',
  'pcdLeftMm',
  'pcdRightMm',
  'flangeLeftMm',
  'flangeRightMm',
  'spokeEaN',
] as const satisfies readonly (keyof WheelDesign)[]

/** @throws RangeError naming the first field that no wheel of this model can have */
export function checkDesign(design: WheelDesign): void {
  for (const field of positive) if (!(design[field] > 0)) throw new RangeError(`${field} must be more than 0`)
  const { spokeCount, crossesLeft, crossesRight, rimOffsetMm, staggerMm } = design
  if (!(spokeCount >= 16 && spokeCount <= 36 && spokeCount % 4 === 0))
    throw new RangeError('spokeCount must be 16, 20, 24, 28, 32 or 36')
  for (const [field, crosses] of Object.entries({ crossesLeft, crossesRight })) {
    if (!(Number.isInteger(crosses) && crosses >= 0 && crosses <= 3)) throw new RangeError(`${field} must be 0 to 3`)
    // Beyond a quarter turn a spoke would run past the hub's own axle line.
    if ((4 * Math.PI * crosses) / spokeCount > Math.PI / 2 + 0.3)
      throw new RangeError(`${field}: ${crosses} crosses need more than ${spokeCount} spokes`)
  }
  if (!(Math.abs(rimOffsetMm) < Math.min(design.flangeLeftMm, design.flangeRightMm)))
    throw new RangeError('rimOffsetMm must stay between the flanges')
  if (!(staggerMm >= 0 && staggerMm <= 10)) throw new RangeError('staggerMm must be 0 to 10')
}

/**
 * The four spokes that repeat around the wheel: left and right leading, left and right trailing.
 * Hub hole at rim angle + lead · 4π·crosses/n; seat at the nipple radius, moved sideways by offset and stagger.
 */
export function spokeLines(design: WheelDesign): [SpokeLine, SpokeLine, SpokeLine, SpokeLine] {
  const line = (left: boolean, lead: 1 | -1): SpokeLine => {
    const crosses = left ? design.crossesLeft : design.crossesRight
    const flangeRadiusM = (left ? design.pcdLeftMm : design.pcdRightMm) / 2000
    const angle = (lead * 4 * Math.PI * crosses) / design.spokeCount
    const flangeM = (left ? -design.flangeLeftMm : design.flangeRightMm) / 1000
    const seatM = (design.rimOffsetMm + (left ? -design.staggerMm : design.staggerMm)) / 1000
    const run: Vector = [
      design.nippleRadiusM - flangeRadiusM * Math.cos(angle),
      -flangeRadiusM * Math.sin(angle),
      seatM - flangeM,
    ]
    const lengthM = Math.sqrt(dot(run, run))
    return {
      lengthM,
      along: [run[0] / lengthM, run[1] / lengthM, run[2] / lengthM],
      lever: [design.nippleRadiusM - design.centroidRadiusM, 0, seatM],
    }
  }
  return [line(true, 1), line(false, 1), line(true, -1), line(false, -1)]
}

export const bracingDeg = ({ along }: SpokeLine) => (Math.asin(Math.abs(along[2])) * 180) / Math.PI

/**
 * Tension of the left side over the right: the sideways pulls of equal counts cancel.
 * T_left/T_right = |n_z right|/|n_z left|
 */
export const tensionRatio = ([left, right]: readonly [SpokeLine, SpokeLine, ...SpokeLine[]]) =>
  Math.abs(right.along[2]) / Math.abs(left.along[2])

/** @param averageN mean over all spokes, > 0 */
export function tensionsFromAverage(ratio: number, averageN: number) {
  const rightN = (2 * averageN) / (1 + ratio)
  return { leftN: ratio * rightN, rightN, averageN }
}

/** @param tightN tension of the tighter side, > 0 */
export function tensionsFromTight(ratio: number, tightN: number) {
  const rightN = ratio <= 1 ? tightN : tightN / ratio
  return { leftN: ratio * rightN, rightN, averageN: (rightN * (1 + ratio)) / 2 }
}

/**
 * Length of a spoke to cut, mm, from the centre of the hub hole to the end at the nipple, less half the hole.
 * L = √(R² + r² + f² − 2·R·r·cos(720°·x/n)) − d/2
 * @param holeMm 0 for straight-pull hubs; offsetMm nipple line towards (+) or away from (−) this flange
 * @throws RangeError where a length is not positive or the count is not
 * @source wheel reference 3.4 (DERIVED; the same form is common practice)
 * @example spokeLengthMm({ erdMm: 602, pcdMm: 38, flangeMm: 36, spokeCount: 36, crosses: 3, holeMm: 2.5 }) // 292.93
 */
export function spokeLengthMm(given: {
  erdMm: number
  pcdMm: number
  flangeMm: number
  spokeCount: number
  crosses: number
  holeMm: number
  offsetMm?: number
}): number {
  const { erdMm, pcdMm, flangeMm, spokeCount, crosses, holeMm, offsetMm = 0 } = given
  if (!(erdMm > 0 && pcdMm > 0 && flangeMm > 0 && spokeCount > 0 && crosses >= 0 && holeMm >= 0))
    throw new RangeError('spokeLengthMm: out of range')
  const [rim, flange] = [erdMm / 2, pcdMm / 2]
  const angle = (4 * Math.PI * crosses) / spokeCount
  return (
    Math.sqrt(rim ** 2 + flange ** 2 + (flangeMm - offsetMm) ** 2 - 2 * rim * flange * Math.cos(angle)) - holeMm / 2
  )
}

/**
 * Moment of inertia of a whole wheel about its axle, kg·m², and the mass that it acts as when it is sped up, kg.
 * I = m_tyre·R_tyre² + m_rim·R_c² + n·m_nip·R_nip² + n·m_spoke·(R_n² + R_n·r_f + r_f²)/3 + m_hub·r_hub²/2
 * @throws RangeError for negative masses or a rolling radius that is not positive
 * @source wheel reference 3.5 (DERIVED; ring and rod formulas are textbook)
 */
export function wheelInertia(given: {
  spokeCount: number
  tyre: { massKg: number; radiusM: number }
  rim: { massKg: number; radiusM: number }
  nipple: { massKg: number; radiusM: number }
  spoke: { massKg: number; flangeRadiusM: number }
  hub: { massKg: number; radiusM: number }
  rollingRadiusM: number
}) {
  const { spokeCount: n, tyre, rim, nipple, spoke, hub, rollingRadiusM } = given
  const massKg = tyre.massKg + rim.massKg + hub.massKg + n * (nipple.massKg + spoke.massKg)
  if (!(rollingRadiusM > 0 && massKg > 0)) throw new RangeError('wheelInertia: out of range')
  const [outer, inner] = [nipple.radiusM, spoke.flangeRadiusM]
  const inertiaKgM2 =
    tyre.massKg * tyre.radiusM ** 2 +
    rim.massKg * rim.radiusM ** 2 +
    n * nipple.massKg * nipple.radiusM ** 2 +
    (n * spoke.massKg * (outer ** 2 + outer * inner + inner ** 2)) / 3 +
    (hub.massKg * hub.radiusM ** 2) / 2
  return { inertiaKgM2, massKg, actsAsKg: massKg + inertiaKgM2 / rollingRadiusM ** 2 }
}
