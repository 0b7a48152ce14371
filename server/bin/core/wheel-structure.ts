/** One wheel design through the structural model, under the names of the published check cases: stiffness, tension shares, first slack, buckling. */
import { z } from 'zod'
import { LATERAL, RADIAL, TANGENTIAL } from '#core/wheel-rings.ts'
import { bucklingSeries, lateralSeries, ringSeries, straightBeam } from '#core/wheel-series.ts'
import {
  inflate,
  pointStiffness,
  radialProfile,
  solveWheel,
  torqueProfile,
  withoutPretension,
  type Inner,
} from '#core/wheel-structure.ts'

export const wheelStructureInput = z.strictObject({
  n: z.number().int(),
  EA: z.number(),
  EI_rad: z.number(),
  EI_lat: z.number(),
  GJ: z.number(),
  R_c: z.number(),
  R_nipple: z.number(),
  d_left_mm: z.number(),
  d_right_mm: z.number(),
  w_left_mm: z.number(),
  w_right_mm: z.number(),
  x_left: z.number().int(),
  x_right: z.number().int(),
  EA_spoke: z.number(),
  T_avg: z.number(),
  rim_offset_mm: z.number().default(0),
  stagger_mm: z.number().default(0),
  /** Pressure in bar and width in mm of a tyre, for what it takes from the spokes. */
  tyre_bar_mm: z.tuple([z.number().positive(), z.number().positive()]).optional(),
  /** Rim elements for each spoke gap, even; two unless said. */
  elements_per_gap: z.union([z.literal(2), z.literal(4)]).default(2),
})

const least = (values: readonly number[]) => Math.min(...values)
const greatest = (values: readonly number[]) => Math.max(...values)

/** @throws RangeError for a design outside the model, or one that buckles below its tension */
export function wheelStructure(input: z.input<typeof wheelStructureInput>) {
  const given = wheelStructureInput.parse(input)
  const perGap = given.elements_per_gap
  const { structure: s, inner } = solveWheel(designOf(given), { averageN: given.T_avg }, perGap)
  const { design, lines, tensions } = inner
  const { left, right, average } = s.tensionN
  const nodes = Array.from({ length: 4 * perGap }, (_, node) => node)
  const torque = nodes.map((node) => torqueProfile(inner, node))
  const ring = ringSeries(design, lines, tensions)
  const beam = straightBeam(design, lines)
  const buckling = bucklingSeries(design, lines, tensions)
  const bare = withoutPretension(inner)
  const [radial, lateral, tangential] = [RADIAL, LATERAL, TANGENTIAL].map((part) => pointStiffness(inner, part))
  const spread = (of: { mean: number; least: number; greatest: number }, at: readonly number[] = []) => ({
    mean: of.mean,
    min: of.least,
    max: of.greatest,
    at_spoke0: at[0],
    at_spoke1: at[perGap],
    at_mid_0_1: at[perGap / 2],
  })
  return {
    spoke_length_left_mm: s.spokeLengthMm.left,
    spoke_length_right_mm: s.spokeLengthMm.right,
    bracing_left_deg: s.bracingDeg.left,
    bracing_right_deg: s.bracingDeg.right,
    tension_ratio_left_over_right: s.tensionRatio,
    T_left_N: left,
    T_right_N: right,
    T_avg_N: average,
    rim_compression_N: s.rimCompressionN,
    k_rad_N_per_mm: spread(s.radialNPerMm, radial),
    k_lat_N_per_mm: spread(s.lateralNPerMm, lateral),
    profile_under_left_spoke0: profile(s.profile.underLeft),
    profile_under_right_spoke1: profile(s.profile.underRight),
    worst_min_fraction: -s.share,
    worst_max_fraction: s.gain,
    P_first_slack_N: s.firstSlackN,
    P_first_slack_at_spokes_only_N: slackAtSpokes(inner),
    first_slack_spoke_side: s.firstSlackSide,
    F_lateral_first_slack_N: s.lateralFirstSlackN,
    range_per_N_left: s.rangePerN.left,
    range_per_N_right: s.rangePerN.right,
    ...(given.tyre_bar_mm ? { tyre: tyre(inner, average, ...given.tyre_bar_mm) } : {}),
    T_buckling_avg_N: s.bucklingTensionN,
    T_buckling_avg_series_N: buckling.scale * average,
    buckling_mode_series: buckling.mode,
    k_tan_N_per_mm: { mean: s.tangentialNPerMm.mean, at_spoke0: tangential?.[0] },
    torque: {
      r_roll_m: 0.336,
      min_fraction: least(torque.flat()),
      max_fraction: greatest(torque.flat()),
      at_spoke0_min: least(torque[0] ?? []),
      at_spoke0_max: greatest(torque[0] ?? []),
    },
    without_pretension_stiffness_at_spoke0: bare
      ? { k_rad_N_per_mm: bare.radialNPerMm, k_lat_N_per_mm: bare.lateralNPerMm, min_fraction: -bare.share }
      : null,
    broken_spoke: Object.fromEntries(
      Object.entries(s.brokenSpoke).map(([side, { shiftMm, runOutMm, leastTensionN }]) => [
        side,
        { shift_mm: shiftMm, run_out_mm: runOutMm, least_tension_N: leastTensionN },
      ]),
    ),
    torque_system_weight_N: s.torqueWeightN,
    closed_form: {
      boef_share: beam.share,
      boef_k_rad_N_per_mm: beam.radialNPerMm,
      lambda_R: beam.lambdaR,
      lambda_s: beam.lambdaS,
      ring_min_fraction_at_0: ring.shareLeft,
      ring_min_fraction_at_1: ring.shareRight,
      ring_k_rad_N_per_mm: ring.radialNPerMm,
      series_k_lat_N_per_mm: lateralSeries(design, lines, tensions),
    },
  }
}

export const designOf = (given: z.output<typeof wheelStructureInput>) => ({
  spokeCount: given.n,
  rimEaN: given.EA,
  rimEiRadialNm2: given.EI_rad,
  rimEiLateralNm2: given.EI_lat,
  rimGjNm2: given.GJ,
  centroidRadiusM: given.R_c,
  nippleRadiusM: given.R_nipple,
  pcdLeftMm: given.d_left_mm,
  pcdRightMm: given.d_right_mm,
  flangeLeftMm: given.w_left_mm,
  flangeRightMm: given.w_right_mm,
  crossesLeft: given.x_left,
  crossesRight: given.x_right,
  spokeEaN: given.EA_spoke,
  rimOffsetMm: given.rim_offset_mm,
  staggerMm: given.stagger_mm,
})

const profile = (shares: readonly number[]) => ({
  min_fraction: least(shares),
  min_spoke: shares.indexOf(least(shares)),
  max_fraction: greatest(shares),
  dT_over_P: shares,
})

const slackAtSpokes = (inner: Inner) =>
  least(
    [0, 1, 2, 3].flatMap((spoke) =>
      radialProfile(inner, spoke * inner.ring.perGap).map((change, i) =>
        change < 0 ? (inner.tensions[i % 4] ?? 0) / -change : Infinity,
      ),
    ),
  )

function tyre(inner: Inner, averageN: number, bar: number, widthMm: number) {
  const { hoopN, meanChangeN, boundN } = inflate(inner, bar, widthMm)
  return {
    p_bar: bar,
    width_mm: widthMm,
    hoop_load_N: hoopN,
    mean_dT_elastic_N: meanChangeN,
    pct_of_avg: (100 * meanChangeN) / averageN,
    upper_bound_dT_no_hoop_stiffness_N: boundN,
  }
}
