/** What the sums need to know of a wheelset. The catalogue's own rows hold these fields under the same names, so they fit as they are. */

import type { WheelStrength } from './rider-limits.ts'

export interface WheelFacts {
  position: 'front' | 'rear'
  material: 'carbon' | 'alloy'
  depthMm: number
  innerWidthMm: number
  outerWidthMm: number
  seat: 'hooked' | 'hookless'
  maxPressureBar: number
  tyreMinMm: number
  tyreMaxMm: number
  spokeCount: number
  axles: readonly string[]
  freehubs: readonly string[]
  rotorMount: 'centre-lock' | 'six-bolt' | null
  /** Most that this axle carries at rest, kg; null where its maker states none: then it is not checked. */
  maxAxleLoadKg: number | null
  /** What the structural model found; null until the design is solved. */
  strength: WheelStrength | null
}

export interface WheelsetFacts {
  sku: string
  slug: string
  name: string
  brake: 'rim' | 'disc'
  beadSeatMm: number
  /** Values of `ride` it may be offered for, the one it was made for first. */
  rides: readonly string[]
  assistRated: boolean
  /** Condition of use by ASTM F2043 that it is made for, 1 paved road to 5 downhill. */
  useCondition: number
  /** System limit in force, kg: rider, kit, bike and bags. */
  limitKg: number
  massG: number
  front: WheelFacts
  rear: WheelFacts
}
