/** What the sums need to know of a wheelset. The catalogue's own rows hold these fields under the same names, so they fit as they are. */

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
  /** System limit in force, kg: rider, kit, bike and bags. */
  limitKg: number
  massG: number
  front: WheelFacts
  rear: WheelFacts
}
