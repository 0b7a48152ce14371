/**
 * Drag and side force of one wheel by rim depth and yaw, and its mean over the wind. Semi-empirical: no wheel-by-wheel table could be
 * read, so the bands are wide (±35 %) and are shown. Depth in mm, yaw in degrees, areas in m².
 * @source aero reference 2.2 and 2.3, DERIVED; anchored on Greenwell et al. 1995 (MEMORY) and Crane & Morton 2018 (READ, abstract)
 */

/** Outer radius with a 28 mm tyre, and its visible height, m. */
const RADIUS_M = 0.336
const TYRE_M = 0.025
const rad = (deg: number) => (deg * Math.PI) / 180

/** Side area of rim and tyre, m²: π[R² − (R − 0.025 − d)²]. */
export const sideArea = (depthMm: number) => Math.PI * (RADIUS_M ** 2 - (RADIUS_M - TYRE_M - depthMm / 1000) ** 2)

/** Side-force area: min(2.2·sin β, 1.2)·A_side. */
export const sideForceArea = (depthMm: number, yawDeg: number) =>
  Math.min(2.2 * Math.sin(rad(yawDeg)), 1.2) * sideArea(depthMm)

/**
 * CdA(d,β) = C0(d) + 0.035·sin²β − η(d)·s(β)·CsA·tan β: the last term is side force turned into push, gone past the stall.
 * @param stallDeg yaw at which the sail term starts to fade: 12 with a tyre ≤ 0.95 of the rim's width, 10 at 1.0, 8 from 1.10 on
 * @param sailShare part of the sail term that counts: 1, or 0.5 where the tyre is far wider than the rim (gravel)
 */
export function wheelDragArea(depthMm: number, yawDeg: number, stallDeg = 12, sailShare = 1): number {
  const yaw = Math.min(Math.abs(yawDeg), 20)
  const base = 0.0165 - 0.005 * (1 - Math.exp(-(depthMm - 25) / 17))
  const recovered = 0.42 * (1 - Math.exp(-(depthMm - 25) / 40))
  const attached = yaw <= stallDeg ? 1 : Math.max(0, 1 - (yaw - stallDeg) / 8)
  const sail = sailShare * recovered * attached * sideForceArea(depthMm, yaw) * Math.tan(rad(yaw))
  return base + 0.035 * Math.sin(rad(yaw)) ** 2 - sail
}

/** Against a 25 mm rim at the same yaw; negative is less drag. */
export const dragChange = (depthMm: number, yawDeg: number, stallDeg = 12, sailShare = 1) =>
  wheelDragArea(depthMm, yawDeg, stallDeg, sailShare) - wheelDragArea(25, yawDeg, stallDeg, sailShare)

const SPEEDS = 24
const ANGLES = 24

/**
 * Mean of −½ρ·ΔCdA·V_rel²·v/E_c over the wind: speeds from a Rayleigh distribution of the given mean, directions even over the half circle.
 * Multiply by 0.9 for the front wheel and 0.6 for the rear (Kyle's 40 %, READ second-hand in Malizia et al. 2021).
 * @returns W saved by one free-standing wheel of this depth
 */
export function meanWattsSaved(given: {
  depthMm: number
  speedMs: number
  meanWindMs: number
  airDensity: number
  chainEfficiency: number
  stallDeg?: number
  sailShare?: number
}): number {
  const { depthMm, speedMs: v, meanWindMs, airDensity, chainEfficiency, stallDeg, sailShare } = given
  const sigma = meanWindMs * Math.sqrt(2 / Math.PI)
  let sum = 0
  for (let i = 0; i < SPEEDS; i += 1) {
    const wind = sigma * Math.sqrt(-2 * Math.log(1 - (i + 0.5) / SPEEDS))
    for (let j = 0; j < ANGLES; j += 1) {
      const angle = (Math.PI * (j + 0.5)) / ANGLES
      const along = v + wind * Math.cos(angle)
      const across = wind * Math.sin(angle)
      const yaw = Math.min(20, (Math.atan2(across, along) * 180) / Math.PI)
      sum -= dragChange(depthMm, yaw, stallDeg, sailShare) * (along ** 2 + across ** 2)
    }
  }
  return (0.5 * airDensity * v * sum) / (SPEEDS * ANGLES * chainEfficiency)
}
