/**
 * Closed forms of the same wheel: a straight beam on springs, and the ring taken mode by mode with the spokes smeared out. Quick, coarser than the
 * elements (first slack 0 to 25 % low), kept as an independent bound and as the first guess for buckling.
 * @source wheel reference 4.2 (DERIVED); the springs of the radial pattern READ in Ford, Zhang & Balogun 2016 and Ford & Balogun 2017
 */
import type { SpokeLine, WheelDesign } from './wheel-geometry.ts'
import { spokeElement, zeros, type Square } from './wheel-stiffness.ts'

const MODES = 60
const LATERAL_MODES = 40
const [R, T, Z, ROT_T, ROT_Z] = [0, 1, 2, 4, 5]

type Lines = readonly [SpokeLine, SpokeLine, SpokeLine, SpokeLine]

/** Spoke stiffness smeared over the rim: 6 × 6 per metre of rim. */
function foundation(design: WheelDesign, lines: Lines, tensionN: readonly number[] | null): Square {
  const sum = zeros(6)
  const perMetre = design.spokeCount / 4 / (2 * Math.PI * design.centroidRadiusM)
  lines.forEach((line, spoke) => {
    const { elastic, perTensionN } = spokeElement(line, design.spokeEaN)
    sum.forEach((row, i) =>
      row.forEach((value, j) => {
        row[j] =
          value +
          perMetre * ((elastic[i]?.[j] ?? 0) + (tensionN ? (tensionN[spoke] ?? 0) * (perTensionN[i]?.[j] ?? 0) : 0))
      }),
    )
  })
  return sum
}
const at = (a: Square, i: number, j: number) => a[i]?.[j] ?? 0

/** Hoop compression of the rim, N: Σ(T·n_r)/2π. */
export const rimCompressionN = (spokeCount: number, lines: Lines, tensionN: readonly number[]) =>
  (lines.reduce((sum, { along }, i) => sum + (tensionN[i] ?? 0) * along[0], 0) * spokeCount) / 4 / (2 * Math.PI)

/**
 * A straight beam on the spokes' radial springs, without pretension.
 * λ = (k_r/4EI)^¼; K = 8·EI·λ³; share of the bottom spoke λ·s/2 over the mean n_r
 */
export function straightBeam(design: WheelDesign, lines: Lines) {
  const { spokeCount, centroidRadiusM, rimEiRadialNm2 } = design
  const kr = at(foundation(design, lines, null), R, R)
  const lambda = (kr / (4 * rimEiRadialNm2)) ** 0.25
  const gapM = (2 * Math.PI * centroidRadiusM) / spokeCount
  const meanRadial = lines.reduce((sum, { along }) => sum + along[0], 0) / 4
  return {
    share: (lambda * gapM) / 2 / meanRadial,
    radialNPerMm: (8 * rimEiRadialNm2 * lambda ** 3) / 1000,
    lambdaR: lambda * centroidRadiusM,
    lambdaS: lambda * gapM,
  }
}

/** Solves a 2 × 2 system. */
function solve2(a: number, b: number, c: number, d: number, f: number, g: number): [number, number] {
  const determinant = a * d - b * c
  return [(f * d - b * g) / determinant, (a * g - c * f) / determinant]
}

/**
 * The ring in its plane: displacement under a unit inward load, and the tension that the spoke there loses.
 * Mode j: w = a·cos jθ inward, v = b·sin jθ against the direction of growing angle.
 */
export function ringSeries(design: WheelDesign, lines: Lines, tensionN: readonly number[]) {
  const { centroidRadiusM: radius, rimEaN, rimEiRadialNm2, spokeEaN } = design
  const k = foundation(design, lines, tensionN)
  const c = rimCompressionN(design.spokeCount, lines, tensionN)
  const kr = at(k, R, R)
  let deflectionM = 1 / (2 * Math.PI * radius * (kr + rimEaN / radius ** 2))
  for (let j = 1; j <= MODES; j += 1) {
    const stretch = rimEaN / radius ** 2
    const bend = rimEiRadialNm2 / radius ** 4
    const [rho1, rho2] = [j / radius, 1 / radius]
    const turn = at(k, ROT_Z, ROT_Z) - c
    const slip = at(k, T, ROT_Z)
    const a11 = stretch + bend * j ** 4 + kr + turn * rho1 * rho1
    const a12 = stretch * j + bend * j ** 2 * j + turn * rho1 * rho2 + slip * rho1
    const a22 = stretch * j * j + bend * j * j + at(k, T, T) + turn * rho2 * rho2 + 2 * slip * rho2
    deflectionM += solve2(a11, a12, a12, a22, 1 / (Math.PI * radius), 0)[0]
  }
  // Right under the load only the inward displacement is not zero: v and the rotation are odd in θ.
  const share = ({ along, lengthM }: SpokeLine) => (-spokeEaN / lengthM) * along[0] * deflectionM
  return { radialNPerMm: 1 / deflectionM / 1000, shareLeft: share(lines[0]), shareRight: share(lines[1]) }
}

/** Matrix of one lateral mode, unknowns (u, φ about the tangent), at `scale` times the pretension. */
function lateralMode(
  design: WheelDesign,
  elastic: Square,
  withTension: Square,
  compressionN: number,
  j: number,
  scale: number,
) {
  const { centroidRadiusM: radius, rimEiLateralNm2: ei, rimGjNm2: gj } = design
  const spring = (p: number, q: number) => at(elastic, p, q) + scale * (at(withTension, p, q) - at(elastic, p, q))
  const [b1, b2] = [j ** 2 / radius ** 2, 1 / radius]
  const [t1, t2] = [j / radius ** 2, j / radius]
  return {
    uu: ei * b1 * b1 + gj * t1 * t1 + spring(Z, Z) - (scale * compressionN * j ** 2) / radius ** 2,
    up: ei * b1 * b2 + gj * t1 * t2 + spring(Z, ROT_T),
    pp: ei * b2 * b2 + gj * t2 * t2 + spring(ROT_T, ROT_T),
  }
}

/** Side stiffness at one point of the rim, N/mm: 1/K = Σ over the modes. */
export function lateralSeries(design: WheelDesign, lines: Lines, tensionN: readonly number[]) {
  const elastic = foundation(design, lines, null)
  const withTension = foundation(design, lines, tensionN)
  const c = rimCompressionN(design.spokeCount, lines, tensionN)
  let flexibility = 0
  for (let j = 0; j <= LATERAL_MODES; j += 1) {
    const { uu, up, pp } = lateralMode(design, elastic, withTension, c, j, 1)
    const load = 1 / ((j === 0 ? 2 : 1) * Math.PI * design.centroidRadiusM)
    flexibility += solve2(uu, up, up, pp, load, 0)[0]
  }
  return 1 / flexibility / 1000
}

/** Least multiple of the pretension at which a lateral mode from 2 on becomes singular, and that mode. */
export function bucklingSeries(design: WheelDesign, lines: Lines, tensionN: readonly number[]) {
  const elastic = foundation(design, lines, null)
  const withTension = foundation(design, lines, tensionN)
  const c = rimCompressionN(design.spokeCount, lines, tensionN)
  let found = { scale: Infinity, mode: 0 }
  for (let j = 2; j <= 12; j += 1) {
    const determinant = (scale: number) => {
      const { uu, up, pp } = lateralMode(design, elastic, withTension, c, j, scale)
      return uu * pp - up * up
    }
    // The determinant is quadratic in the scale: its parabola through three points, and the lower positive root.
    const [y0, y1, y2] = [determinant(0), determinant(1), determinant(2)]
    const a = (y2 - 2 * y1 + y0) / 2
    const b = y1 - y0 - a
    const inside = b * b - 4 * a * y0
    if (inside < 0) continue
    const roots = [(-b - Math.sqrt(inside)) / (2 * a), (-b + Math.sqrt(inside)) / (2 * a)].filter((root) => root > 0)
    const scale = Math.min(...roots)
    if (scale < found.scale) found = { scale, mode: j }
  }
  return found
}

/** Rigid-rim limits of the side stiffness: pushed straight, tilted, and both in series, N/mm. */
export function rigidRimLateral(design: WheelDesign, lines: Lines) {
  const straight =
    (lines.reduce((sum, { along, lengthM }) => sum + (design.spokeEaN / lengthM) * along[2] ** 2, 0) *
      design.spokeCount) /
    4 /
    1000
  return { straight, tilted: straight / 2, series: straight / 3 }
}
