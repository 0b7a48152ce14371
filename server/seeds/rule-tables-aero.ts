/** Policy behind depth, wind and brake heat, dated like every other table. */
import type { RuleTableSeed } from './rule-tables.ts'

const rides = (values: Record<string, number>, rest: number) => ({
  ...Object.fromEntries(['road-fast', 'road-long', 'time-trial'].map((ride) => [ride, rest])),
  ...values,
})

export const aeroRuleTables: readonly RuleTableSeed[] = [
  {
    name: 'wind',
    label: 'derived',
    source:
      'Words to wind at bike height: Rayleigh mean, and design gust from the windiest tenth of the hours times 1.8, that of sheltered places raised for gateways and passing vehicles; the correction a rider accepts, in degrees, is judgement set on common practice, ±15 mm of depth; no published threshold was found',
    data: {
      meanMs: { sheltered: 1.2, typical: 2.2, exposed: 3.5 },
      gustMs: { sheltered: 5, typical: 7, exposed: 10 },
      correctionDeg: { nervous: 2.2, average: 3, confident: 3.8 },
      aeroBarsFactor: 0.95,
      speedMs: 10,
      mountainSpeedMs: 12.5,
      capBandMm: 15,
    },
  },
  {
    name: 'depth-clamps',
    label: 'practice',
    source: 'Deepest rim by use, whatever the wind: policy on impact, mass and handling, common practice, no source',
    data: {
      byRide: rides(
        { climbing: 50, gravel: 50, cyclocross: 50, bikepacking: 45, commute: 45, 'cross-country': 35, trail: 35 },
        80,
      ),
      aeroBarsMm: 90,
      race: {
        row: 'race-rim-height',
        depthMm: 65,
        from: '2026-01-01',
        label: 'read',
        source:
          'Statement of the UCI on changes to equipment: rims at most 65 mm high in mass-start road events from 1 January 2026; to be confirmed against the rule text',
      },
    },
  },
  {
    name: 'terrain',
    label: 'practice',
    source: 'Share of the way on the flat and uphill, gradient of the climbs and of the steepest long descents; policy',
    data: {
      flatShare: { flat: 0.95, rolling: 0.75, hilly: 0.55, mountain: 0.35 },
      climbShare: { flat: 0.03, rolling: 0.15, hilly: 0.3, mountain: 0.5 },
      gradient: { flat: 0.03, rolling: 0.04, hilly: 0.06, mountain: 0.08 },
      descent: { flat: 0.03, rolling: 0.06, hilly: 0.08, mountain: 0.12 },
    },
  },
  {
    name: 'depth-method',
    label: 'practice',
    source:
      'Policy of the depth range: 85 % of the gain, rear 20 mm deeper at most, steps of 5 mm; front and rear wheel 0.9 and 0.6 of a wheel standing free (second-hand in Malizia et al. 2021); drag by position against the hoods: aero bars 0.75, upright touring 0.40 to 0.32 m², tops 0.40 to 0.35 m² (open code constants, first source not stated); rolling coefficients: 0.0032 in the example of Martin et al. 1998, 0.004 the usual road, twice that on rough tarmac (common practice); rim mass from typical carbon rims, ±1 g per mm (from memory); bunch 0.6 (judgement)',
    data: {
      gainShare: 0.85,
      frontFactor: 0.9,
      rearFactor: 0.6,
      rearExtraMm: 20,
      pairStepMm: 10,
      leastRangeMm: 10,
      stepMm: 5,
      bandShare: 0.35,
      wideTyre: { fromMm: 33, sailShare: 0.5, bandShare: 0.6 },
      positionDrag: { drop: 1, aero: 0.75, upright: 1.25, mountain: 1.14 },
      rolling: { smooth: 0.0032, mixed: 0.004, rough: 0.008 },
      rimGramPerMm: 3.8,
      climbBandShare: 0.1,
      bunchFactor: 0.6,
      speedKmh: [20, 50],
      lightBelowKg: 55,
    },
  },
  {
    name: 'brake-heat',
    label: 'derived',
    source:
      'Policy on carbon rim brakes on long descents by total mass, beside the lumped rim model, ±30 % of the rise; the two disagree on purpose: policy takes carbon up to 90 kg with the right pads, tubes and braking, while the model passes the limit on a 12 % descent from about 83 kg on, and then a caution is given; butyl tubes serve to about 120 °C (MEMORY)',
    data: {
      warnAboveKg: 90,
      steerAboveKg: 105,
      nervousSteerAboveKg: 90,
      limitC: 120,
      airC: 20,
      frontShareAlloy: 0.6,
      frontShareCarbon: 0.7,
      mostSpeedKmh: 40,
      bandShare: 0.3,
      surfaceShare: 0.2,
      rig: {
        row: 'rig-500-w',
        watts: 500,
        speedKmh: 30,
        stillAirFactor: 0.5,
        label: 'practice',
        source: 'Rims are dragged with a motor of 500 W on test rigs: common practice, no public document found',
      },
      rotor160AboveKg: 85,
      rotor180AboveKg: 120,
    },
  },
]
