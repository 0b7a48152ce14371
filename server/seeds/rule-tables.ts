/** The first rule tables: dated data with source and label, which product staff may later replace by newer versions. */
import type { TableName } from '#core/rules.ts'
import { aeroRuleTables } from './rule-tables-aero.ts'
import { solvedWheels } from './solved-wheels.ts'

export const RULES_VERSION = '2026-12.2'

export interface RuleTableSeed {
  name: TableName
  source: string
  label: 'read' | 'memory' | 'derived' | 'practice'
  data: unknown
}

const everyRide = (values: Record<string, number>, rest: number) => ({
  ...Object.fromEntries(
    [
      'road-fast',
      'road-long',
      'climbing',
      'time-trial',
      'cyclocross',
      'gravel',
      'bikepacking',
      'commute',
      'cross-country',
      'trail',
    ].map((ride) => [ride, rest]),
  ),
  ...values,
})

type Label = RuleTableSeed['label']

/** A row of the cap table of ISO 5775-1:2023. */
const cap = (fromMm: number, upToMm: number, maxBar: number) => ({
  row: `hookless-cap-${fromMm}`,
  upToMm,
  maxBar,
  source: `ISO 5775-1:2023 table 3, printed width ${fromMm} to ${upToMm} mm on straight-side rims: ${maxBar * 100} kPa; second-hand, to be confirmed against the standard`,
  label: 'memory' as const,
})

const pairing = (
  row: string,
  seat: 'hooked' | 'hookless',
  innerFromMm: number,
  side: 'below' | 'above' | 'within',
  by: 'inner-plus' | 'inner-times' | 'width',
  value: number,
  verdict: 'ok' | 'check' | 'no',
  label: Label,
  source: string,
) => ({ row, seat, innerFromMm, side, by, value, verdict, label, source })

/** Rows that hold for hooked and straight-side rims alike, at every inner width. */
const bothSeats = (
  side: 'below' | 'above' | 'within',
  by: 'inner-plus' | 'inner-times' | 'width',
  value: number,
  verdict: 'ok' | 'check' | 'no',
  label: Label,
  source: string,
) =>
  (['hooked', 'hookless'] as const).map((seat) =>
    pairing(`${seat}-${side}-${value}`, seat, 0, side, by, value, verdict, label, source),
  )

const demand = (row: string, label: Label, source: string) => ({ row, label, source })

const preference = (row: string, factor: number, source: string) => ({ row, factor, label: 'memory' as const, source })

const chart = (
  name: string,
  source: string,
  rows: readonly (readonly [innerMm: number, fromMm: number, toMm: number])[],
) =>
  rows.map(([innerMm, fromMm, toMm]) => ({
    row: `${name}-${innerMm}c`,
    innerMm,
    fromMm,
    toMm,
    label: 'memory' as const,
    source,
  }))

/** A row of the criteria with what all uses but the mountains share. */
const wheelUse = (own: Record<string, number>) => ({
  ...own,
  sideShare: 0.15,
  loadShare: { front: 0.5, rear: 0.6 },
  leastSideN: 250,
})

export const ruleTables: readonly RuleTableSeed[] = [
  {
    name: 'load-split',
    label: 'derived',
    source:
      'Midpoints of reported splits, ±3 points: road 43/57, endurance 42/58, gravel 41/59, time trial 48/52, mountain 40/60, upright 35/65 (33/67 the midpoint, taken within its 3 points so that a loaded city bike of 120 kg stays inside the pressure model); scales and force plates in the trade, TBIS 4210-3 dummy. Bags by the moments about the axles: 1 − x/L on the rear, a bar bag at 0.9 L, the frame at 0.5 L, a bag behind the saddle at 0.1 L',
    data: {
      frontShare: {
        'road-fast': 0.43,
        'road-long': 0.42,
        climbing: 0.42,
        'time-trial': 0.43,
        cyclocross: 0.41,
        gravel: 0.41,
        bikepacking: 0.41,
        commute: 0.42,
        'cross-country': 0.41,
        trail: 0.41,
        aero: 0.48,
        upright: 0.35,
        mountain: 0.4,
      },
      luggageFrontShare: { none: 0.5, front: 0.9, frame: 0.5, rear: 0.1, spread: 0.5 },
    },
  },
  {
    name: 'front-design-load',
    label: 'practice',
    source:
      'Braking and descending load the front, so its pressure is set for at least 0.85 of the rear (without bags over it), but for no more than 1.15 of its own load, which keeps an upright bike from an over-inflated front; judgement, no source',
    data: { leastOfRear: 0.85, mostOfOwn: 1.15 },
  },
  {
    name: 'target-drops',
    label: 'practice',
    source:
      'Drop of the tyre under load by use; judgement tuned to common practice, no source. The 15 % drop goes back to F. Berto, "All About Tire Inflation"',
    data: {
      byRide: everyRide(
        {
          'road-fast': 0.15,
          'time-trial': 0.15,
          commute: 0.155,
          'road-long': 0.17,
          climbing: 0.17,
          bikepacking: 0.175,
          gravel: 0.185,
          trail: 0.19,
          'cross-country': 0.2,
          cyclocross: 0.23,
        },
        0.17,
      ),
      fastTubeless: { fromMm: 28, drop: 0.17 },
      onRoadMost: 0.2,
      offRoadMost: 0.25,
      atLimitSlack: 0.02,
    },
  },
  {
    name: 'assumed-tyre-maxima',
    label: 'memory',
    source: 'Usual printed maxima by width; assumed only until the sidewall is read',
    data: {
      rows: [
        [25, 8],
        [28, 7.5],
        [30, 7],
        [32, 6.5],
        [35, 6],
        [40, 5.5],
        [50, 4.5],
      ],
      beyondBar: 3,
    },
  },
  {
    name: 'hookless-ceilings',
    label: 'memory',
    source:
      'Highest pressure on straight-side rims: cap by printed width, the road cap and the pull of the casing; each row with its own source, the lowest counts',
    data: {
      rows: [
        cap(18, 24, 5.5),
        cap(25, 29, 5),
        cap(30, 34, 4.5),
        cap(35, 39, 4),
        cap(40, 44, 3.5),
        cap(45, 54, 3),
        cap(55, 64, 2.5),
        {
          row: 'hookless-cap-65',
          upToMm: 75,
          maxBar: 2,
          source: 'Beyond the printed table: at most 200 kPa, from the casing pull of 8.1 N/mm at 74 mm (2.19 bar)',
          label: 'derived',
        },
      ],
      road: {
        row: 'hookless-road-cap',
        maxBar: 5,
        source:
          'Road hookless rims carry at most 5 bar (72.5 psi, in print as 72, 72.5 or 73); common practice, no source',
        label: 'practice',
      },
      tension: {
        row: 'hookless-casing-pull',
        maxNPerMm: 8.1,
        source:
          'Thin-wall hoop law T = p · w / 2; 8.1 N/mm is the highest pull at the top of any band of the cap table, used to extend it',
        label: 'derived',
      },
    },
  },
  {
    name: 'tyre-rim-pairing',
    label: 'practice',
    source:
      'Tyre on rim by printed width and inner width; each row with its own source. The newest full approval matrix was not visible anywhere: confirm against ISO 5775-1:2023, 5775-2:2021 and the maker’s list',
    data: {
      rows: [
        ...bothSeats(
          'within',
          'inner-times',
          1.4,
          'ok',
          'practice',
          'Width 1.4 to 2.25 times inner: inside both chart points told as ETRTO, 15C with 23–32 mm (1.53–2.13) and 38 mm on 17–27 mm (1.41–2.24)',
        ),
        pairing(
          'hooked-least',
          'hooked',
          0,
          'below',
          'inner-plus',
          3,
          'no',
          'derived',
          'Guard: a tyre less than 3 mm wider than the inner width finds no seat on the bead wall; the ratios above it are only checked, as 28 mm on 25 mm was approvable in 2022',
        ),
        pairing(
          'hookless-least',
          'hookless',
          0,
          'below',
          'inner-plus',
          4,
          'no',
          'derived',
          'Guard for straight-side rims: tyre at least inner + 4 mm, which agrees with 29 mm on 25 mm',
        ),
        pairing(
          'hookless-19',
          'hookless',
          19,
          'below',
          'width',
          23,
          'no',
          'memory',
          'Narrowest tyre on 19 mm straight-side rims 23 mm; from memory, medium',
        ),
        pairing(
          'hookless-21',
          'hookless',
          21,
          'below',
          'width',
          25,
          'no',
          'memory',
          'Narrowest tyre on 21 mm straight-side rims 25 mm; from memory, medium',
        ),
        pairing(
          'hookless-23',
          'hookless',
          23,
          'below',
          'width',
          28,
          'no',
          'memory',
          'Narrowest tyre on 23 mm straight-side rims 28 mm; from memory, medium',
        ),
        pairing(
          'hookless-25',
          'hookless',
          25,
          'below',
          'width',
          29,
          'no',
          'practice',
          'Narrowest tyre on 25 mm straight-side rims 29 mm by the ETRTO rules of 2023 (28 mm by those of 2022), as told in the trade press',
        ),
        ...bothSeats(
          'above',
          'inner-times',
          3,
          'no',
          'memory',
          'Wider than 3.0 times inner lies outside even the permissive ETRTO chart of about 2006–2016 (17C to 50 mm is 2.94); from memory, medium',
        ),
        ...bothSeats(
          'below',
          'inner-times',
          1.4,
          'check',
          'practice',
          'Narrower than 1.4 times inner lies outside both chart points told as ETRTO; makers approve some such pairs, so their lists decide',
        ),
        ...bothSeats(
          'above',
          'inner-times',
          2.25,
          'check',
          'memory',
          'Between 2.25 and 3.0 times inner only the permissive ETRTO chart of about 2006–2016 allows the pair; from memory, medium',
        ),
      ],
      demands: {
        tubular: demand(
          'no-tubular',
          'memory',
          'A tubular is glued to a rim made for it; neither hooked nor straight-side rims take one',
        ),
        notApproved: demand(
          'hookless-approved',
          'practice',
          'Straight-side rims take only tubeless tyres that their maker declares fit for them',
        ),
        tube: demand(
          'hookless-tube',
          'practice',
          'A tube on a straight-side rim only inside a tubeless tyre declared fit for it',
        ),
        confirm: demand(
          'hookless-confirm',
          'practice',
          'Whether the maker declares the tyre fit for straight-side rims has to be read on it or in the maker’s list',
        ),
      },
      otherwise: demand('no-row', 'derived', 'No row of the table speaks against the pair'),
      ownRange: demand(
        'own-range',
        'practice',
        'The wheel’s own approved tyre widths, which come before the general rows',
      ),
    },
  },
  {
    name: 'rim-tyre-charts',
    label: 'memory',
    source: 'Printed charts of rim and tyre widths, older and newer, to compare a verdict with; from memory, medium',
    data: {
      rows: [
        ...chart('etrto-chart', 'ETRTO permissive chart of about 2006–2016, crochet rims; from memory, medium', [
          [13, 18, 25],
          [15, 23, 32],
          [17, 25, 50],
          [19, 28, 62],
          [21, 35, 62],
          [23, 40, 62],
          [25, 44, 62],
          [27, 47, 62],
          [29, 50, 62],
        ]),
        ...chart(
          'iso-chart',
          'ISO recommended widths, older and narrower, crochet rims, turned from tyre to rim; from memory, medium',
          [
            [13, 18, 25],
            [15, 23, 32],
            [17, 25, 37],
            [19, 28, 47],
            [21, 35, 50],
            [23, 40, 54],
            [25, 44, 57],
            [27, 54, 62],
            [29, 54, 62],
          ],
        ),
      ],
    },
  },
  {
    name: 'measuring-rims',
    label: 'memory',
    source:
      'ETRTO 2020 and later, measuring rim by tyre width, low to medium confidence; joined by straight lines between the classes. 0.4 mm of width for each mm of rim: ISO 5751-2:2010 (motorcycles, read), repeated for bicycles in practice',
    data: {
      rows: [
        [20, 13],
        [25, 19],
        [28, 19],
        [29, 21],
        [34, 21],
        [35, 23],
        [46, 23],
        [47, 25],
        [57, 25],
        [60, 30],
        [65, 30],
        [69, 35],
      ],
      growthPerMm: 0.4,
      warnBeyondMm: 1.5,
    },
  },
  {
    name: 'pressure-bands',
    label: 'practice',
    source:
      'Band by class of width and load: ±10 % with a measured width, ±12 % with a printed one, ±15 % for wide tyres, light and heavy loads; judgement, root sum of squares of fit, width and load errors; ramped between the classes',
    data: {
      widthMm: [20, 36.8, 38, 60],
      measured: { half: 0.1, loadKg: [25, 33, 35, 65, 70, 80] },
      nominal: { half: 0.12, loadKg: [25, 33.5, 35, 65, 68, 80] },
      outerHalf: 0.15,
    },
  },
  {
    name: 'tyre-minima',
    label: 'read',
    source:
      'Minimum inflation of the older ISO 5775-1 (encyclopaedia article): 300 kPa to 25 mm, 200 kPa other sizes, 150 kPa off road; cautions, not floors. Floor of 1.0 bar for a tyre without a marked minimum: judgement',
    data: {
      unmarkedFloorBar: 1,
      iso: { narrowUpToMm: 25, narrowBar: 3, otherBar: 2, offRoadBar: 1.5 },
    },
  },
  {
    name: 'pressure-preferences',
    label: 'memory',
    source:
      'Convention for what riders like beyond the drop of their ride; no measured factors were found. One reduction at most, never below 0.85, always called a preference',
    data: {
      least: 0.85,
      most: 1.05,
      rows: [
        preference('rough', 0.95, 'Rough ground: 0.90 to 0.95 by convention; the milder end'),
        preference('wet', 0.95, 'Wet roads: 0.93 to 0.95 by convention; the milder end'),
        preference('insert', 0.95, 'With an insert: 5 to 10 % less by convention; the milder end'),
        preference('tubular', 1, 'Tubulars: 1.0 to 1.05 by convention; the milder end'),
      ],
    },
  },
  {
    name: 'rim-proof',
    label: 'practice',
    source:
      'Every rim is proof-inflated with a clincher tyre to 150 psi: common practice, no source. The proof is 110 % of the marking: 16 CFR 1512.10, read. So no rim is marked above 150/1.10 psi, rounded down',
    data: { proofPsi: 150, testFactor: 1.1 },
  },
  {
    name: 'wheel-criteria',
    label: 'derived',
    source:
      'Criteria of a wheel under a rider and their thresholds by use, ±20–25 % in all: dynamic factor from the variation of hub loads (De Lorenzo & Hull 1999, READ in abstract), side load 0.15 of the rider (DERIVED), elbow range from a Goodman estimate (DERIVED), shift with a broken spoke from the least tyre clearance of ISO 4210-2 (MEMORY), side load 250 N and 370 N from ISO 4210-7 (READ), the rest common practice or assumption',
    data: {
      byUse: {
        'road-rim': wheelUse({ tyreLoss: 0.1, dynamicFactor: 2, sideMm: 2.5, fatigueFactor: 1, extraKg: 11 }),
        'road-disc': wheelUse({ tyreLoss: 0.1, dynamicFactor: 2, sideMm: 3, fatigueFactor: 1, extraKg: 11 }),
        gravel: wheelUse({ tyreLoss: 0.05, dynamicFactor: 2.3, sideMm: 3, fatigueFactor: 1.15, extraKg: 14 }),
        mountain: {
          ...wheelUse({ tyreLoss: 0.05, dynamicFactor: 2.6, sideMm: 3, fatigueFactor: 1.3, extraKg: 15 }),
          sideShare: 0.18,
          loadShare: { front: 0.55, rear: 0.6 },
          leastSideN: 370,
        },
      },
      buildScatter: 0.15,
      realStiffness: 0.65,
      // 100 MPa on the elbow of a 2.0 mm spoke, 3.1416 mm²
      elbowRangeN: 314.16,
      brokenShiftMm: 4,
      bandShare: 0.25,
      inHandShare: 0.85,
    },
  },
  {
    name: 'reference-wheels',
    label: 'derived',
    source:
      'Usual builds of each use (30 mm carbon rim, in the mountains 25 mm; generic hubs; tight side 1200 N) through the finite-element model of rim and pre-tensioned spokes',
    data: { byUse: solvedWheels.reference },
  },
  {
    name: 'spoke-floors',
    label: 'practice',
    source:
      'Trade floors: front/rear 16/20 on rim brakes, 20/24 on road discs, 24/24 off the road, rear 28 above 100 kg whatever the rim, rear 32 above 120 kg, 28 for bikepacking and assistance, 32 with heavy luggage, front at most 4 fewer than the rear; common practice, no source',
    data: {
      byUse: {
        'road-rim': { front: 16, rear: 20 },
        'road-disc': { front: 20, rear: 24 },
        gravel: { front: 24, rear: 24 },
        mountain: { front: 24, rear: 24 },
      },
      rearAbove100Kg: 28,
      rearAbove120Kg: 32,
      bikepacking: 28,
      assist: 28,
      loadedFromKg: 20,
      loaded: 32,
      frontMayBeFewerBy: 4,
    },
  },
  ...aeroRuleTables,
  {
    name: 'use-conditions',
    label: 'memory',
    source:
      'Conditions of use of ASTM F2043: 1 paved road, 2 unpaved roads and small drops, 3 rough trails; which ride asks for which is judgement',
    data: {
      leastByRide: everyRide({ cyclocross: 2, gravel: 2, bikepacking: 2, 'cross-country': 3, trail: 3 }, 1),
    },
  },
  {
    name: 'limits',
    label: 'practice',
    source:
      'A limit counts rider, clothes, bike and bags; from 95 % on there is no margin; pads need about 4 mm beyond the rim; an assumed bike counts 1 kg more against a limit',
    data: { noMarginFrom: 0.95, caliperSlackMm: 4, assumedBikeExtraKg: 1 },
  },
  {
    name: 'defaults',
    label: 'memory',
    source: 'Usual masses and speeds by use, taken only where the rider did not say, and said aloud',
    data: {
      kitMassKg: 3,
      bikeMassKg: everyRide(
        { gravel: 10, cyclocross: 9, bikepacking: 11, commute: 13, 'cross-country': 12, trail: 15, 'time-trial': 9 },
        8.5,
      ),
      assistBikeMassKg: 22,
      bikepackingLuggageKg: 12,
      flatSpeedKmh: everyRide(
        {
          'road-fast': 34,
          'time-trial': 40,
          climbing: 27,
          cyclocross: 26,
          gravel: 25,
          bikepacking: 20,
          commute: 22,
          'cross-country': 20,
          trail: 20,
        },
        28,
      ),
      tyreWidthMm: everyRide(
        { gravel: 40, bikepacking: 45, cyclocross: 33, commute: 38, 'cross-country': 56, trail: 60 },
        28,
      ),
    },
  },
]
