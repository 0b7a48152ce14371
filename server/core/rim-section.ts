/**
 * Stiffness of a rim from its outline, for rims whose maker states none: a thin-walled trapezoid of bed, two walls, nose and two hooks.
 * @source wheel reference 3.1 (DERIVED): moduli and walls are assumptions tuned so that the mass is realistic; ±30 % on bending and twisting, which moves
 *   rider limits by 5 to 9 %
 */

interface Build {
  eGpa: number
  gGpa: number
  densityKgM3: number
  wallMm: number
  bedMm: number
  noseMm: number
  hookMm: number
  hookHeightMm: number
  noseWidthMm: (depthMm: number) => number
}

const carbon: Build = {
  eGpa: 55,
  gGpa: 16,
  densityKgM3: 1550,
  wallMm: 0.85,
  bedMm: 1.1,
  noseMm: 2.2,
  hookMm: 2.3,
  hookHeightMm: 5.5,
  noseWidthMm: () => 13,
}
/** Wide carbon for mountain use. */
const stoutCarbon: Build = {
  ...carbon,
  wallMm: 0.9,
  bedMm: 1.2,
  noseMm: 2.4,
  hookMm: 3,
  hookHeightMm: 5,
  noseWidthMm: () => 18,
}
const alloy: Build = {
  eGpa: 69,
  gGpa: 26,
  densityKgM3: 2700,
  wallMm: 0.95,
  bedMm: 0.9,
  noseMm: 1.7,
  hookMm: 1.4,
  hookHeightMm: 5.5,
  // 15 mm at 14 mm deep, 14 at 18, 12 from 24 on; straight lines between
  noseWidthMm: (depth) =>
    depth <= 14 ? 15 : depth <= 18 ? 15 - (depth - 14) / 4 : depth <= 24 ? 14 - (depth - 18) / 3 : 12,
}
const builds = { alloy, carbon, 'stout-carbon': stoutCarbon } as const
export type RimBuild = keyof typeof builds

export interface RimSection {
  massKg: number
  eaN: number
  eiRadialNm2: number
  eiLateralNm2: number
  gjNm2: number
  centroidRadiusM: number
  nippleRadiusM: number
}

/**
 * @param rim build: kind of section; depthMm from nose to the top of the hooks, 12 to 100; widthMm outside, 15 to 60; beadSeatMm 400 to 622
 * @returns section stiffness in N and N·m², radii in m
 * @throws RangeError outside those ranges
 * @example rimSection({ build: 'carbon', depthMm: 45, widthMm: 28, beadSeatMm: 622 }) // EI in the plane 2336 N·m², 439 g
 */
export function rimSection(rim: { build: RimBuild; depthMm: number; widthMm: number; beadSeatMm: number }): RimSection {
  const { depthMm, widthMm, beadSeatMm } = rim
  if (!(depthMm >= 12 && depthMm <= 100 && widthMm >= 15 && widthMm <= 60 && beadSeatMm >= 400 && beadSeatMm <= 622))
    throw new RangeError('rimSection: out of range')
  const { wallMm, bedMm, noseMm, hookMm, hookHeightMm, ...b } = builds[rim.build]
  const noseWidthMm = b.noseWidthMm(depthMm)
  const noseY = -(depthMm - hookHeightMm)
  const [half, halfNose] = [widthMm / 2, noseWidthMm / 2]
  // Each straight wall: its two ends (x across, y outward from the middle of the bed) and its thickness.
  const walls: readonly (readonly [x1: number, y1: number, x2: number, y2: number, t: number])[] = [
    [-half, 0, half, 0, bedMm],
    [-halfNose, noseY, halfNose, noseY, noseMm],
    [-half, 0, -halfNose, noseY, wallMm],
    [half, 0, halfNose, noseY, wallMm],
    [-half, 0, -half, hookHeightMm, hookMm],
    [half, 0, half, hookHeightMm, hookMm],
  ]
  const lengths = walls.map(([x1, y1, x2, y2]) => Math.hypot(x2 - x1, y2 - y1))
  const sum = (of: (wall: (typeof walls)[number], length: number, index: number) => number) =>
    walls.reduce((total, wall, i) => total + of(wall, lengths[i] ?? 0, i), 0)
  const areaMm2 = sum(([, , , , t], l) => l * t)
  const centroidMm = sum(([, y1, , y2, t], l) => (l * t * (y1 + y2)) / 2) / areaMm2
  const second = (p: number, q: number) => (p * p + p * q + q * q) / 3
  const inPlaneMm4 = sum(([, y1, , y2, t], l) => l * t * second(y1 - centroidMm, y2 - centroidMm))
  const lateralMm4 = sum(([x1, , x2, , t], l) => l * t * second(x1, x2))
  // Bredt: the closed cell of bed, walls and nose; the open hooks add their own little.
  const cellMm2 = ((widthMm + noseWidthMm) / 2) * -noseY
  const around = sum(([, , , , t], l, i) => (i < 4 ? l / t : 0))
  const torsionMm4 = (4 * cellMm2 ** 2) / around + (2 * hookHeightMm * hookMm ** 3) / 3
  const bedRadiusMm = beadSeatMm / 2 - 1
  const centroidRadiusM = (bedRadiusMm + centroidMm) / 1000
  return {
    massKg: b.densityKgM3 * areaMm2 * 1e-6 * 2 * Math.PI * centroidRadiusM,
    eaN: b.eGpa * 1e3 * areaMm2,
    eiRadialNm2: b.eGpa * 1e-3 * inPlaneMm4,
    eiLateralNm2: b.eGpa * 1e-3 * lateralMm4,
    gjNm2: b.gGpa * 1e-3 * torsionMm4,
    centroidRadiusM,
    nippleRadiusM: (bedRadiusMm + noseY + noseMm / 2) / 1000,
  }
}
