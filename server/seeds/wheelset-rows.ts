/**
 * The demo range: invented wheelsets as plain data, one row a wheelset. Rims are named by what they are, so rows that share
 * one share it in the table too. Figures of rims, hubs and spokes follow the generic classes of the wheel reference
 * (its 3.1 to 3.3, DERIVED and MEMORY there); limits stay at or under its rider limits plus bike and kit (4.12, DERIVED).
 */
import type { Ride } from '#contract/advisor.ts'

export type HubFamily = 'rim' | 'road' | 'gravel' | 'touring' | 'assist' | 'mountain' | 'mountain-assist'

export interface WheelsetRow {
  timber: string
  /** Rim depth, mm: front and rear, the front never the deeper one. */
  depthMm: [number, number]
  material: 'carbon' | 'alloy'
  brake: 'rim' | 'disc'
  beadSeatMm: 622 | 584
  innerMm: number
  outerMm: number
  seat: 'hooked' | 'hookless'
  /** Spoke counts, front and rear. */
  spokes: [number, number]
  spoke: 'steel-15' | 'steel-16' | 'steel-18' | 'carbon-40'
  hubs: HubFamily
  rides: Ride[]
  useCondition: 1 | 2 | 3 | 4
  /** System limit, kg, ready to ride. */
  limitKg: number
  /** Price in whole euros, VAT included. */
  eur: number
  onHand: number
  build: 'shelf' | 'bench'
}

type Shared = Omit<WheelsetRow, 'timber' | 'depthMm' | 'spokes' | 'rides' | 'limitKg' | 'eur' | 'onHand' | 'build'>
type Own = Pick<WheelsetRow, 'limitKg' | 'eur' | 'onHand' | 'build' | 'spokes' | 'rides'> & Partial<Shared>
const row = (shared: Shared, timber: string, depthMm: [number, number], own: Own): WheelsetRow => ({
  timber,
  depthMm,
  ...shared,
  ...own,
})

const disc622 = { brake: 'disc', beadSeatMm: 622 } as const
const carbonRoad: Shared = {
  ...disc622,
  material: 'carbon',
  innerMm: 21,
  outerMm: 28,
  seat: 'hooked',
  spoke: 'steel-15',
  hubs: 'road',
  useCondition: 1,
}
const carbonHookless: Shared = { ...carbonRoad, innerMm: 23, outerMm: 30, seat: 'hookless' }
const alloyRoad: Shared = { ...carbonRoad, material: 'alloy', spoke: 'steel-18', innerMm: 19, outerMm: 24 }
const alloyTough: Shared = { ...alloyRoad, innerMm: 21, outerMm: 26, hubs: 'touring', useCondition: 2 }
const alloyRimBrake: Shared = { ...alloyRoad, brake: 'rim', hubs: 'rim', innerMm: 17, outerMm: 22 }
const carbonRimBrake: Shared = { ...carbonRoad, brake: 'rim', hubs: 'rim', innerMm: 19, outerMm: 26 }
const carbonGravel: Shared = {
  ...carbonHookless,
  innerMm: 25,
  outerMm: 31,
  spoke: 'steel-16',
  hubs: 'gravel',
  useCondition: 2,
}
const alloyGravel: Shared = { ...alloyTough, innerMm: 23, outerMm: 28, hubs: 'gravel' }
const assist: Shared = { ...alloyTough, innerMm: 23, outerMm: 28, hubs: 'assist' }
const mountain: Shared = { ...carbonGravel, innerMm: 30, outerMm: 35, hubs: 'mountain', useCondition: 3 }

// prettier-ignore
export const wheelsetRows: WheelsetRow[] = [
  // road, disc, carbon, hooked
  row(carbonRoad, 'Elm', [30, 30], { innerMm: 19, outerMm: 26, spokes: [20, 24], rides: ['climbing', 'road-fast'], limitKg: 100, eur: 1490, onHand: 4, build: 'shelf' }),
  row(carbonRoad, 'Elm', [40, 40], { spoke: 'carbon-40', spokes: [20, 24], rides: ['climbing', 'road-fast', 'road-long'], limitKg: 90, eur: 2080, onHand: 2, build: 'bench' }),
  row(carbonRoad, 'Rowan', [35, 35], { spokes: [24, 24], rides: ['road-long', 'road-fast', 'climbing'], limitKg: 110, eur: 1280, onHand: 7, build: 'shelf' }),
  row(carbonRoad, 'Rowan', [45, 45], { spokes: [24, 24], rides: ['road-fast', 'road-long'], limitKg: 120, eur: 1340, onHand: 9, build: 'shelf' }),
  row(carbonRoad, 'Rowan', [60, 60], { spokes: [24, 24], rides: ['road-fast', 'time-trial'], limitKg: 120, eur: 1420, onHand: 3, build: 'shelf' }),
  row(carbonRoad, 'Rowan', [45, 60], { spokes: [20, 24], rides: ['road-fast', 'time-trial'], limitKg: 115, eur: 1460, onHand: 5, build: 'shelf' }),
  row(carbonRoad, 'Hornbeam', [35, 35], { innerMm: 22, outerMm: 29, spokes: [28, 32], rides: ['road-long', 'commute'], limitKg: 125, eur: 1390, onHand: 3, build: 'bench' }),
  row(carbonRoad, 'Hornbeam', [45, 45], { innerMm: 23, outerMm: 30, spokes: [28, 32], rides: ['road-long', 'commute', 'bikepacking'], useCondition: 2, limitKg: 150, eur: 1480, onHand: 2, build: 'bench' }),
  row(carbonRoad, 'Yew', [60, 80], { spokes: [20, 24], rides: ['time-trial'], limitKg: 110, eur: 1890, onHand: 2, build: 'bench' }),
  row(carbonRoad, 'Yew', [80, 80], { spokes: [20, 24], rides: ['time-trial'], limitKg: 110, eur: 1950, onHand: 1, build: 'bench' }),
  // road, disc, carbon, hookless
  row(carbonHookless, 'Alder', [35, 35], { spokes: [24, 24], rides: ['road-long', 'road-fast', 'climbing'], limitKg: 110, eur: 1180, onHand: 6, build: 'shelf' }),
  row(carbonHookless, 'Alder', [45, 45], { spokes: [24, 24], rides: ['road-fast', 'road-long'], limitKg: 115, eur: 1240, onHand: 0, build: 'shelf' }),
  row(carbonHookless, 'Alder', [50, 65], { spokes: [20, 24], rides: ['road-fast', 'time-trial'], limitKg: 105, eur: 1520, onHand: 1, build: 'shelf' }),
  row(carbonGravel, 'Poplar', [30, 30], { spokes: [24, 28], rides: ['road-long', 'gravel'], limitKg: 115, eur: 1220, onHand: 4, build: 'shelf' }),
  // road, disc, alloy
  row(alloyRoad, 'Ash', [25, 25], { spokes: [24, 28], rides: ['road-long', 'road-fast', 'climbing'], limitKg: 115, eur: 490, onHand: 14, build: 'shelf' }),
  row(alloyRoad, 'Ash', [28, 28], { innerMm: 21, outerMm: 26, spokes: [24, 24], rides: ['road-fast', 'climbing'], limitKg: 105, eur: 560, onHand: 8, build: 'shelf' }),
  row(alloyRoad, 'Ash', [30, 30], { innerMm: 22, outerMm: 27, spokes: [28, 32], rides: ['road-long', 'commute'], useCondition: 2, limitKg: 130, eur: 610, onHand: 6, build: 'shelf' }),
  row(alloyTough, 'Oak', [28, 28], { spokes: [36, 36], rides: ['road-long', 'commute'], limitKg: 145, eur: 690, onHand: 3, build: 'bench' }),
  row(alloyTough, 'Oak', [25, 25], { spokes: [32, 36], rides: ['road-long', 'commute', 'bikepacking'], limitKg: 125, eur: 640, onHand: 5, build: 'bench' }),
  row(alloyTough, 'Oak', [30, 30], { innerMm: 25, outerMm: 30, spokes: [36, 36], rides: ['bikepacking', 'commute', 'gravel'], limitKg: 125, eur: 720, onHand: 2, build: 'bench' }),
  // assisted bikes
  row(assist, 'Linden', [25, 25], { spokes: [36, 36], rides: ['commute', 'road-long'], limitKg: 125, eur: 680, onHand: 6, build: 'shelf' }),
  row(assist, 'Linden', [30, 30], { material: 'carbon', spoke: 'steel-16', innerMm: 23, outerMm: 30, spokes: [32, 32], rides: ['commute', 'gravel', 'road-long'], limitKg: 130, eur: 1380, onHand: 2, build: 'bench' }),
  row(assist, 'Spindle', [28, 28], { beadSeatMm: 584, innerMm: 25, outerMm: 30, spokes: [32, 36], rides: ['commute', 'bikepacking'], limitKg: 120, eur: 700, onHand: 4, build: 'bench' }),
  row(mountain, 'Walnut', [30, 30], { hubs: 'mountain-assist', spokes: [32, 32], rides: ['trail', 'cross-country'], limitKg: 120, eur: 1560, onHand: 2, build: 'bench' }),
  // road, rim brake
  row(alloyRimBrake, 'Beech', [25, 25], { spokes: [24, 28], rides: ['climbing', 'road-long', 'road-fast'], limitKg: 110, eur: 480, onHand: 8, build: 'shelf' }),
  row(alloyRimBrake, 'Beech', [28, 28], { spokes: [20, 24], rides: ['road-fast', 'climbing'], limitKg: 95, eur: 540, onHand: 3, build: 'shelf' }),
  row(alloyRimBrake, 'Beech', [30, 30], { innerMm: 19, outerMm: 24, spokes: [28, 32], rides: ['climbing', 'road-long', 'commute'], limitKg: 120, eur: 590, onHand: 5, build: 'shelf' }),
  row(alloyRimBrake, 'Maple', [20, 20], { innerMm: 19, outerMm: 24, spokes: [32, 36], rides: ['commute', 'road-long'], useCondition: 2, limitKg: 110, eur: 520, onHand: 7, build: 'shelf' }),
  row(alloyRimBrake, 'Maple', [25, 25], { innerMm: 19, outerMm: 24, spokes: [32, 36], rides: ['commute', 'road-long', 'climbing'], useCondition: 2, limitKg: 130, eur: 570, onHand: 3, build: 'bench' }),
  row(carbonRimBrake, 'Willow', [35, 35], { spokes: [20, 24], rides: ['road-fast', 'road-long'], limitKg: 100, eur: 1160, onHand: 2, build: 'shelf' }),
  row(carbonRimBrake, 'Willow', [45, 45], { spokes: [16, 20], rides: ['road-fast'], limitKg: 100, eur: 1240, onHand: 1, build: 'shelf' }),
  row(carbonRimBrake, 'Willow', [50, 50], { spokes: [20, 24], rides: ['road-fast', 'road-long'], limitKg: 115, eur: 1290, onHand: 4, build: 'shelf' }),
  row(carbonRimBrake, 'Willow', [60, 80], { spokes: [16, 20], rides: ['time-trial'], limitKg: 110, eur: 1690, onHand: 0, build: 'bench' }),
  // gravel and cyclocross
  row(carbonGravel, 'Hazel', [30, 30], { spokes: [24, 24], rides: ['gravel', 'cyclocross'], limitKg: 110, eur: 1150, onHand: 6, build: 'shelf' }),
  row(carbonGravel, 'Hazel', [40, 40], { spokes: [24, 28], rides: ['gravel', 'bikepacking'], limitKg: 120, eur: 1230, onHand: 5, build: 'shelf' }),
  row(carbonGravel, 'Hazel', [45, 45], { spokes: [24, 24], rides: ['gravel', 'cyclocross'], limitKg: 120, eur: 1270, onHand: 3, build: 'shelf' }),
  row(carbonGravel, 'Larch', [30, 30], { seat: 'hooked', outerMm: 32, spokes: [28, 32], rides: ['bikepacking', 'gravel'], limitKg: 135, eur: 1310, onHand: 3, build: 'bench' }),
  row(alloyGravel, 'Larch', [25, 25], { spokes: [28, 32], rides: ['gravel', 'commute', 'bikepacking'], limitKg: 115, eur: 580, onHand: 9, build: 'shelf' }),
  row(alloyGravel, 'Juniper', [25, 25], { beadSeatMm: 584, innerMm: 25, outerMm: 30, spokes: [28, 32], rides: ['gravel', 'bikepacking'], limitKg: 110, eur: 590, onHand: 4, build: 'shelf' }),
  row(carbonGravel, 'Medlar', [35, 35], { beadSeatMm: 584, spokes: [24, 28], rides: ['gravel'], limitKg: 115, eur: 1210, onHand: 2, build: 'shelf' }),
  row(carbonGravel, 'Cherry', [35, 35], { seat: 'hooked', innerMm: 21, outerMm: 28, spokes: [24, 24], rides: ['cyclocross', 'gravel'], limitKg: 105, eur: 1190, onHand: 4, build: 'shelf' }),
  // cross-country and trail
  row(mountain, 'Birch', [25, 25], { spokes: [24, 24], rides: ['cross-country'], limitKg: 95, eur: 1390, onHand: 2, build: 'shelf' }),
  row(mountain, 'Holly', [25, 25], { spokes: [28, 28], rides: ['cross-country'], limitKg: 110, eur: 1290, onHand: 5, build: 'shelf' }),
  row(mountain, 'Holly', [30, 30], { spokes: [28, 32], rides: ['cross-country', 'trail'], limitKg: 120, eur: 1340, onHand: 3, build: 'shelf' }),
  row(mountain, 'Mulberry', [25, 25], { beadSeatMm: 584, spokes: [28, 28], rides: ['cross-country'], limitKg: 105, eur: 1280, onHand: 1, build: 'shelf' }),
  row(mountain, 'Sycamore', [30, 30], { beadSeatMm: 584, spokes: [32, 32], rides: ['trail', 'cross-country'], useCondition: 4, limitKg: 120, eur: 1360, onHand: 3, build: 'bench' }),
]
