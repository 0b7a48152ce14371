/** The working behind depth, trade-off and brake heat: each sum with what went into it. Values are plain, so that a page can list them by name. */
import { airDensity } from './air-density.ts'
import type { AeroAdvice } from './aero-advice.ts'
import type { Filled } from './answers.ts'
import {
  brakingPower,
  COOLING,
  DESCENT_AIR_DENSITY,
  DESCENT_ROLLING,
  descentOf,
  freeSpeed,
  massAtRimC,
  rimHeat,
  rimTemperature,
  timeConstant,
  worstRim,
  worstRimSpeed,
  type RimHeatAdvice,
} from './brake-heat.ts'
import { CHAIN_EFFICIENCY } from './power.ts'
import type { Reason } from './reasons.ts'
import {
  CLIMB_AIR_DENSITY,
  FLAT_AIR_DENSITY,
  FRONT_SHARE,
  gustMoment,
  LEVER_M,
  steeringStiffness,
  TRAIL_M,
} from './rim-depth.ts'
import type { Rules } from './rules.ts'
import { wattsBand } from './trade-off.ts'
import { kmhToMs } from './units.ts'
import { sideArea, WHEEL_RADIUS_M } from './wheel-drag.ts'
import { yawQuantiles } from './wind.ts'

const percent = (share: number) => `±${Math.round(share * 100)} %`

/** Front and rear end where the gust asks for as much correction as the rider accepts; the lower end is set by the gain. */
export function depthReason(f: Filled, aero: AeroAdvice, position: 'front' | 'rear', rules: Rules): Reason {
  const { given, riding, depth, pair } = aero
  const { method } = given
  const clamps = rules['depth-clamps']
  const moment = gustMoment(depth.front.to, given.referenceSpeedMs, given.gustMs)
  const stiffness = steeringStiffness(given.bodyMassKg, given.bikeMassKg)
  return {
    formula:
      'φ = a · ½ρ(v² + w²) · CsA(d) / (N_f · t) ≤ φ_max; CsA = min(2.2 · sin β, 1.2) · A_side; from: least depth with 85 % of the gain; rear: front + 20 mm',
    inputs: {
      bodyMassKg: f.bodyKg,
      bikeMassKg: f.bikeKg,
      wind: f.wind,
      confidence: f.confidence,
      terrain: f.terrain,
      surface: f.surface,
      flatSpeedKmh: given.flatSpeedKmh,
      riderWatts: riding.watts,
      climbSpeedKmh: riding.climbSpeedMs * 3.6,
      gustMs: given.gustMs,
      meanWindMs: given.meanWindMs,
      correctionDeg: given.correctionDeg,
      gustYawDeg: (Math.atan2(given.gustMs, given.referenceSpeedMs) * 180) / Math.PI,
      sideAreaM2: sideArea(depth.front.to),
      gustMomentNm: moment,
      stiffnessNm: stiffness,
      askedDeg: ((moment / stiffness) * 180) / Math.PI,
      stallDeg: given.stallDeg,
      capMm: Number.isFinite(depth.capMm) ? depth.capMm : null,
      clampMm: given.clampMm,
      ...(position === 'rear' ? { pairWatts: pair.wattsSaved, matchedWatts: pair.matchedWattsSaved } : {}),
    },
    constants: {
      leverM: LEVER_M,
      trailM: TRAIL_M,
      wheelRadiusM: WHEEL_RADIUS_M,
      frontLoadShare: FRONT_SHARE,
      airDensity: FLAT_AIR_DENSITY,
      referenceSpeedMs: given.referenceSpeedMs,
      rimGramPerMm: method.rimGramPerMm,
      gainShare: method.gainShare,
      rearExtraMm: method.rearExtraMm,
      stepMm: method.stepMm,
      raceMm: clamps.race.depthMm,
    },
    source: [
      'Gust model of our own (derived): lever ±20 mm of 60 mm, from one unreviewed record and the fork’s rake; the accepted correction is judgement',
      'wheel drag after Greenwell et al. 1995 (from memory) and Crane & Morton 2018 (abstract, read)',
      'power after Martin et al. 1998 (form read via open transcriptions)',
      'deepest by use, 85 % and terrain mix: policy, in dated tables',
    ].join('; '),
    label: 'practice',
    uncertainty: `±${rules.wind.capBandMm} mm`,
    wouldChangeIf: [
      'wind',
      'confidence',
      'bodyMassKg',
      'bikeMassKg',
      'terrain',
      'ride',
      'position',
      'flatSpeedKmh',
      'surface',
      'tyre.frontWidthMm',
    ],
  }
}

export function tradeOffReason(f: Filled, { given, riding, pair }: AeroAdvice): Reason {
  const { method } = given
  const yaw = yawQuantiles(given.meanWindMs / riding.flatSpeedMs)
  const sea = airDensity(0)
  return {
    formula: 'P = Σ weight · ½ρ(0.9·ΔCdA(d_f, β) + 0.6·ΔCdA(d_r, β)) · V_rel² · v / E_c, against a 25 mm pair',
    inputs: {
      flatSpeedKmh: given.flatSpeedKmh,
      meanWindMs: given.meanWindMs,
      yawMedianDeg: yaw.medianDeg,
      yawNineTenthsDeg: yaw.nineTenthsDeg,
      stallDeg: given.stallDeg,
      riderWatts: riding.watts,
      movingMassKg: riding.massKg,
      dragAreaM2: riding.cdaM2,
      surface: f.surface,
      gradient: given.terrain.gradient,
      climbSpeedKmh: riding.climbSpeedMs * 3.6,
      pairFrontMm: pair.frontMm,
      pairRearMm: pair.rearMm,
      pairWatts: pair.wattsSaved,
      matchedWatts: pair.matchedWattsSaved,
      addedMassG: pair.addedMassG,
      breakEvenGradient: pair.breakEvenGradient,
      thinAirShare: airDensity(1000) / sea - 1,
      coldAirShare: airDensity(0, 0) / sea - 1,
    },
    constants: {
      airDensity: FLAT_AIR_DENSITY,
      climbAirDensity: CLIMB_AIR_DENSITY,
      chainEfficiency: CHAIN_EFFICIENCY,
      rollingCoefficient: given.rollingCoefficient,
      positionDrag: given.positionDrag,
      frontFactor: method.frontFactor,
      rearFactor: method.rearFactor,
      sailFactor: given.wideTyre ? method.wideTyre.sailShare : 1,
      rimGramPerMm: method.rimGramPerMm,
      climbDoubtShare: method.climbBandShare,
      bunchFactor: method.bunchFactor,
    },
    source: [
      'Martin et al. 1998, J. Appl. Biomech. 14(3):276–291 (form read via open transcriptions)',
      'rider’s drag by mass: Heil 2002 (abstract, read); wind: Rayleigh spread from all sides (derived)',
      'wheel drag by depth and yaw: semi-empirical, of our own, after Greenwell et al. 1995 (from memory) and Crane & Morton 2018 (abstract, read)',
      'rim mass by depth: typical carbon rims (from memory)',
      'front 0.9 and rear 0.6: second-hand in Malizia et al. 2021; position, surface and bunch factors: policy and practice',
    ].join('; '),
    label: 'practice',
    uncertainty: percent(wattsBand(given)),
    wouldChangeIf: [
      'flatSpeedKmh',
      'wind',
      'terrain',
      'surface',
      'position',
      'bodyMassKg',
      'bikeMassKg',
      'luggageKg',
      'tyre.frontWidthMm',
    ],
  }
}

export function brakeHeatReason(f: Filled, totalKg: number, heat: RimHeatAdvice, rules: Rules): Reason {
  const policy = rules['brake-heat']
  const { airC, rig } = policy
  const mostMs = kmhToMs(policy.mostSpeedKmh)
  const descent = descentOf(f.bodyKg, totalKg, heat.gradient)
  const free = freeSpeed(descent)
  const speedMs = Math.min(worstRimSpeed(free), mostMs)
  const rigMs = kmhToMs(rig.speedKmh)
  const onRig = (material: 'alloy' | 'carbon', cooling: number) =>
    rimTemperature(rimHeat[material], rig.watts, 1, rigMs, airC, null, cooling)
  const limitMassKg = massAtRimC(descent, 'carbon', policy.frontShareCarbon, policy.limitC, airC, mostMs)
  return {
    formula:
      'T = T_air + f·P_b/((21·√v + h_rad)·A), P_b = (m·g·sin θ − C_rr·m·g·cos θ − ½ρCdA·v²)·v, at v = v_free/√5, at most 40 km/h',
    inputs: {
      systemMassKg: totalKg,
      gradient: heat.gradient,
      dragAreaM2: descent.cdaM2,
      freeSpeedKmh: free * 3.6,
      worstSpeedKmh: speedMs * 3.6,
      brakingWatts: brakingPower(descent, speedMs),
      rimC: heat.rimC,
      lowC: heat.lowC,
      highC: heat.highC,
      surfaceC: airC + (1 + policy.surfaceShare) * (heat.rimC - airC),
      oneBrakeAlloyC: worstRim(descent, 'alloy', 1, airC, mostMs),
      oneBrakeCarbonC: worstRim(descent, 'carbon', 1, airC, mostMs),
      secondsAlloy: speedMs > 0 ? timeConstant(rimHeat.alloy, speedMs) : null,
      secondsCarbon: speedMs > 0 ? timeConstant(rimHeat.carbon, speedMs) : null,
      limitMassKg: Number.isFinite(limitMassKg) ? limitMassKg : null,
      policyMassKg: policy.warnAboveKg,
      rigAlloyC: onRig('alloy', 1),
      rigCarbonC: onRig('carbon', 1),
      rigStillAlloyC: onRig('alloy', rig.stillAirFactor),
      rigStillCarbonC: onRig('carbon', rig.stillAirFactor),
    },
    constants: {
      airC,
      limitC: policy.limitC,
      frontShareCarbon: policy.frontShareCarbon,
      frontShareAlloy: policy.frontShareAlloy,
      cooling: COOLING,
      areaAlloyM2: rimHeat.alloy.areaM2,
      areaCarbonM2: rimHeat.carbon.areaM2,
      capacityAlloy: rimHeat.alloy.capacity,
      capacityCarbon: rimHeat.carbon.capacity,
      radiationAlloy: rimHeat.alloy.radiation,
      radiationCarbon: rimHeat.carbon.radiation,
      rimPartAlloy: rimHeat.alloy.share,
      rimPartCarbon: rimHeat.carbon.share,
      rollingCoefficient: DESCENT_ROLLING,
      airDensity: DESCENT_AIR_DENSITY,
      rigWatts: rig.watts,
    },
    source: [
      'A lumped rim of our own, cooled like a flat plate (derived); no measured road temperature was found in print',
      'heat to the rim and what tubes and tapes bear: from memory',
      'policy and model disagree: carbon is taken up to the policy mass with the right pads, tubes and braking, yet the model passes the limit from the lower mass on, and then we say so',
      'a rig that drags with 500 W: common practice, no public document found; its figures here are the model’s',
    ].join('; '),
    label: 'practice',
    uncertainty: percent(policy.bandShare),
    wouldChangeIf: ['bodyMassKg', 'bikeMassKg', 'kitMassKg', 'luggageKg', 'terrain', 'brakes', 'confidence'],
  }
}

/** The working of depth, trade-off and, for rim brakes, heat. */
export function aeroReasons(
  into: Record<string, Reason>,
  f: Filled,
  aero: AeroAdvice,
  totalKg: number,
  rules: Rules,
): void {
  into['rimDepthMm.front'] = depthReason(f, aero, 'front', rules)
  into['rimDepthMm.rear'] = depthReason(f, aero, 'rear', rules)
  into.tradeOff = tradeOffReason(f, aero)
  if (aero.brakeHeat) into.brakeHeat = brakeHeatReason(f, totalKg, aero.brakeHeat, rules)
}
