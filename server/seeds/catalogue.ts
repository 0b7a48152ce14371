/** From the rows of wheelset-rows.ts to parts and wheels with ids, as the tables hold them. */
import type { HubFamily, WheelsetRow } from './wheelset-rows.ts'
import { usualLacing } from './reference-builds.ts'
import { wheelsetRows } from './wheelset-rows.ts'

export interface RimSeed {
  id: number
  code: string
  name: string
  material: 'carbon' | 'alloy'
  beadSeatMm: number
  depthMm: number
  innerWidthMm: number
  outerWidthMm: number
  seat: 'hooked' | 'hookless'
  brake: 'rim' | 'disc'
  maxPressureBar: number
  tyreMinMm: number
  tyreMaxMm: number
  massG: number
  nippleSeatDiameterMm: number
  offsetMm: number
}

/**
 * Tyre widths (mm) and the highest pressure (bar) a demo rim is marked with, by inner width. Hooked: tyre at least inner + 3 mm and
 * at most 2.25 times inner. Hookless: at least inner + 4 mm, pressure at most the cap for the narrowest tyre it takes (tyres
 * reference 3.9, MEMORY there). All stay under 150 psi / 1.10 = 9.4 bar, so that a 110 % proof inflation ends at 150 psi.
 */
const markings: Record<
  'hooked' | 'hookless',
  Record<number, [tyreMinMm: number, tyreMaxMm: number, maxPressureBar: number]>
> = {
  hooked: { 17: [23, 38, 9], 19: [25, 42, 8], 21: [28, 47, 7], 22: [28, 49, 6.5], 23: [30, 51, 6], 25: [35, 56, 5] },
  hookless: { 23: [28, 51, 5], 25: [32, 56, 4.5], 30: [47, 67, 3] },
}

function rimOf(w: WheelsetRow, depthMm: number, id: number): RimSeed {
  const { material, beadSeatMm, innerMm, outerMm, seat, brake } = w
  const marking = markings[seat][innerMm]
  if (!marking) throw new Error(`no rim marking for ${seat} ${innerMm} mm`)
  const [tyreMinMm, tyreMaxMm, maxPressureBar] = marking
  // straight lines through the rims of the wheel reference 3.1: alloy 435 g at 18 mm, carbon 376 g at 30 mm; wider and braked rims weigh more
  const grams =
    material === 'alloy'
      ? 435 + 8.4 * (depthMm - 18) + 6 * (outerMm - 22)
      : 376 + 4.15 * (depthMm - 30) + 7 * (outerMm - 28) + (brake === 'rim' ? 28 : 0)
  const code = `${material === 'carbon' ? 'C' : 'A'}${depthMm}-${innerMm}${seat === 'hooked' ? 'H' : 'S'}-${brake === 'rim' ? 'R' : 'D'}-${beadSeatMm}`
  return {
    id,
    code,
    name: `${material === 'carbon' ? 'Carbon' : 'Alloy'} ${depthMm}, ${innerMm} mm, ${beadSeatMm}`,
    material,
    beadSeatMm,
    depthMm,
    innerWidthMm: innerMm,
    outerWidthMm: outerMm,
    seat,
    brake,
    maxPressureBar,
    tyreMinMm,
    tyreMaxMm,
    massG: Math.round((grams * (beadSeatMm / 622)) / 5) * 5,
    // 573 mm at 30 mm depth and 622 mm bead seat, two millimetres less for each millimetre of depth (wheel reference 3.1)
    nippleSeatDiameterMm: 633 - 2 * depthMm - (622 - beadSeatMm),
    offsetMm: 0,
  }
}

interface HubClass {
  name: string
  brake: 'rim' | 'disc'
  rotorMount: 'centre-lock' | 'six-bolt' | null
  assistRated: boolean
  freehubs: string[]
  axles: [front: string[], rear: string[]]
  massG: [front: number, rear: number]
  /** Most that either axle carries, kg, front and rear: invented, as all of the demo. */
  axleLoadKg: [front: number, rear: number]
  /** left PCD, right PCD, left flange, right flange, mm; wheel reference 3.3 */
  frontMm: [number, number, number, number]
  rearMm: [number, number, number, number]
}

const DISC_FRONT: HubClass['frontMm'] = [58, 52, 23.5, 34]
const DISC_REAR: HubClass['rearMm'] = [58, 54, 34, 19]
const WIDE_FRONT: HubClass['frontMm'] = [58, 58, 27, 37.5]
const WIDE_REAR: HubClass['rearMm'] = [58, 56, 35, 21]

const hubClasses: Record<HubFamily, HubClass> = {
  rim: {
    name: 'Quay',
    brake: 'rim',
    rotorMount: null,
    assistRated: false,
    freehubs: ['spline-road', 'pattern-i'],
    axles: [['qr-9x100'], ['qr-10x130']],
    massG: [78, 212],
    axleLoadKg: [85, 100],
    frontMm: [38, 38, 36, 36],
    rearMm: [44, 50, 37, 17.5],
  },
  road: {
    name: 'Weir',
    brake: 'disc',
    rotorMount: 'centre-lock',
    assistRated: false,
    freehubs: ['spline-road', 'thread-road', 'pattern-i'],
    axles: [
      ['12x100', 'qr-9x100'],
      ['12x142', 'qr-10x135'],
    ],
    massG: [112, 232],
    axleLoadKg: [90, 110],
    frontMm: DISC_FRONT,
    rearMm: DISC_REAR,
  },
  gravel: {
    name: 'Ford',
    brake: 'disc',
    rotorMount: 'centre-lock',
    assistRated: false,
    freehubs: ['spline-road', 'thread-road', 'fine-spline'],
    axles: [
      ['12x100', '15x100'],
      ['12x142', 'qr-10x135'],
    ],
    massG: [124, 248],
    axleLoadKg: [95, 115],
    frontMm: DISC_FRONT,
    rearMm: DISC_REAR,
  },
  touring: {
    name: 'Sluice',
    brake: 'disc',
    rotorMount: 'six-bolt',
    assistRated: false,
    freehubs: ['spline-road', 'spline-short'],
    axles: [
      ['12x100', '15x100', 'qr-9x100'],
      ['12x142', 'qr-10x135'],
    ],
    massG: [182, 338],
    axleLoadKg: [110, 140],
    frontMm: DISC_FRONT,
    rearMm: DISC_REAR,
  },
  assist: {
    name: 'Millrace',
    brake: 'disc',
    rotorMount: 'centre-lock',
    assistRated: true,
    freehubs: ['spline-road', 'spline-short'],
    axles: [
      ['12x100', '15x100', 'qr-9x100'],
      ['12x142', 'qr-10x135'],
    ],
    massG: [198, 384],
    axleLoadKg: [115, 145],
    frontMm: DISC_FRONT,
    rearMm: DISC_REAR,
  },
  mountain: {
    name: 'Scree',
    brake: 'disc',
    rotorMount: 'six-bolt',
    assistRated: false,
    freehubs: ['thread-mountain', 'fine-spline', 'spline-short'],
    axles: [['15x110'], ['12x148']],
    massG: [148, 268],
    axleLoadKg: [95, 120],
    frontMm: WIDE_FRONT,
    rearMm: WIDE_REAR,
  },
  'mountain-assist': {
    name: 'Scree assist',
    brake: 'disc',
    rotorMount: 'six-bolt',
    assistRated: true,
    freehubs: ['thread-mountain', 'fine-spline', 'spline-short'],
    axles: [['15x110'], ['12x148']],
    massG: [192, 362],
    axleLoadKg: [110, 140],
    frontMm: WIDE_FRONT,
    rearMm: WIDE_REAR,
  },
}

const positions = ['front', 'rear'] as const

export const hubs = Object.entries(hubClasses).flatMap(([family, hub], f) =>
  positions.map((position, p) => {
    const [pcdLeftMm, pcdRightMm, flangeLeftMm, flangeRightMm] = position === 'front' ? hub.frontMm : hub.rearMm
    return {
      id: 1 + f * 2 + p,
      code: `${family.toUpperCase()}-${position === 'front' ? 'F' : 'R'}`,
      name: hub.name,
      position,
      brake: hub.brake,
      axles: position === 'front' ? hub.axles[0] : hub.axles[1],
      freehubs: position === 'front' ? [] : hub.freehubs,
      rotorMount: hub.rotorMount,
      pcdLeftMm,
      pcdRightMm,
      flangeLeftMm,
      flangeRightMm,
      assistRated: hub.assistRated,
      massG: position === 'front' ? hub.massG[0] : hub.massG[1],
      maxAxleLoadKg: position === 'front' ? hub.axleLoadKg[0] : hub.axleLoadKg[1],
    }
  }),
)

/** EA in kN from the wheel reference 3.2 (DERIVED; carbon: its assumption); mass of one spoke with nipple, g. */
export const spokes = [
  {
    id: 1,
    code: 'steel-15',
    name: 'Steel 2.0/1.5',
    material: 'steel' as const,
    profile: '2.0/1.5 bladed',
    eaKn: 367.8,
    massG: 5.1,
  },
  {
    id: 2,
    code: 'steel-16',
    name: 'Steel 2.0/1.6',
    material: 'steel' as const,
    profile: '2.0/1.6',
    eaKn: 416,
    massG: 5.7,
  },
  {
    id: 3,
    code: 'steel-18',
    name: 'Steel 2.0/1.8',
    material: 'steel' as const,
    profile: '2.0/1.8',
    eaKn: 517.8,
    massG: 7.2,
  },
  {
    id: 4,
    code: 'carbon-40',
    name: 'Carbon 4.0 mm²',
    material: 'carbon' as const,
    profile: '4.0 mm² flat',
    eaKn: 520,
    massG: 3.4,
  },
]

export const rims: RimSeed[] = []
function rimFor(w: WheelsetRow, depthMm: number): RimSeed {
  const rim = rimOf(w, depthMm, rims.length + 1)
  const known = rims.find(({ code }) => code === rim.code)
  if (known) return known
  rims.push(rim)
  return rim
}

const found = <T extends { code: string }>(list: readonly T[], code: string): T => {
  const part = list.find((one) => one.code === code)
  if (!part) throw new Error(`no part ${code}`)
  return part
}

export const catalogue = wheelsetRows.map((w, i) => {
  const [front, rear] = w.depthMm
  const depths = front === rear ? `${front}` : `${front}-${rear}`
  const wheels = positions.map((position, p) => {
    const rim = rimFor(w, position === 'front' ? front : rear)
    const hub = found(hubs, `${w.hubs.toUpperCase()}-${position === 'front' ? 'F' : 'R'}`)
    const spoke = found(spokes, w.spoke)
    const spokeCount = position === 'front' ? w.spokes[0] : w.spokes[1]
    const [crossesLeft, crossesRight] = usualLacing(w.brake, position, spokeCount)
    const massG = Math.round(rim.massG + hub.massG + spokeCount * spoke.massG)
    return {
      id: 1 + i * 2 + p,
      position,
      rim,
      hub,
      spoke,
      spokeCount,
      crossesLeft,
      crossesRight,
      tensionTightN: 1200,
      massG,
    }
  })
  return {
    id: i + 1,
    sku: `${w.timber.toUpperCase()}-${depths}-${w.brake === 'disc' ? 'D' : 'R'}`,
    slug: `${w.timber.toLowerCase()}-${depths}-${w.brake}`,
    name: `${w.timber} ${depths.replace('-', '/')}`,
    timber: w.timber,
    brake: w.brake,
    beadSeatMm: w.beadSeatMm,
    rides: w.rides,
    useCondition: w.useCondition,
    assistRated: wheels.every(({ hub }) => hub.assistRated),
    buildKind: w.build,
    limitKg: w.limitKg,
    // invented prices: whole fives; USD leaves tax out, so it is near the euro price without VAT
    priceCents: {
      EUR: w.eur * 100,
      GBP: Math.round((w.eur * 0.87) / 5) * 500,
      USD: Math.round((w.eur * 0.91) / 5) * 500,
    },
    onHand: w.onHand,
    wheels,
  }
})
export type SeedWheelset = (typeof catalogue)[number]
