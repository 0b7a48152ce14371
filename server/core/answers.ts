/** What a rider answered, and the same with every open question filled by its default, which is then named as assumed. */
import { lookUp, type Rules } from './rules.ts'

export interface Answers {
  ride: string
  bodyMassKg?: number | undefined
  bodyMassBandKg?: { from: number; to: number } | undefined
  kitMassKg?: number | undefined
  bikeMassKg?: number | undefined
  luggageKg?: number | undefined
  luggagePlace?: string | undefined
  brakes: 'rim' | 'disc'
  tyre: {
    frontWidthMm: number
    rearWidthMm: number
    setup: 'tubeless' | 'tube' | 'tubular'
    measured?: boolean | undefined
    minBar?: number | null | undefined
    maxBar?: number | null | undefined
    hooklessApproved?: boolean | null | undefined
  } | null
  rim?:
    | {
        seat?: 'hooked' | 'hookless' | 'any' | undefined
        innerWidthMm?: number | null | undefined
        maxBar?: number | null | undefined
      }
    | undefined
  beadSeatMm?: number | undefined
  ridersOnBike?: number | undefined
  assist?: 'none' | '25' | '45' | undefined
  position?: 'drop' | 'aero' | 'upright' | 'mountain' | undefined
  surface?: 'smooth' | 'mixed' | 'rough' | undefined
  terrain?: string | undefined
  wind?: string | undefined
  confidence?: string | undefined
  flatSpeedKmh?: number | undefined
  frontLoadShare?: number | null | undefined
  bike?:
    | {
        frontAxle?: string | null | undefined
        rearAxle?: string | null | undefined
        freehub?: string | null | undefined
        rotorMount?: string | null | undefined
        maxTyreMm?: number | null | undefined
        caliperOpeningMm?: number | null | undefined
      }
    | undefined
}

export interface Filled {
  ride: string
  brakes: 'rim' | 'disc'
  /** Limits count the upper edge of a band and an assumed bike with 1 kg in hand; pressures the middle and the bike as it is. */
  limitBodyKg: number
  limitBikeKg: number
  bodyKg: number
  bikeKg: number
  kitKg: number
  luggageKg: number
  luggagePlace: string
  tyre: Answers['tyre']
  seat: 'hooked' | 'hookless' | 'any'
  innerWidthMm: number | null
  rimMaxBar: number | null
  beadSeatMm: number
  ridersOnBike: number
  assist: 'none' | '25' | '45'
  position: 'drop' | 'aero' | 'upright' | 'mountain'
  surface: 'smooth' | 'mixed' | 'rough'
  terrain: string
  wind: string
  confidence: string
  flatSpeedKmh: number
  frontLoadShare: number | null
  bike: {
    frontAxle: string | null
    rearAxle: string | null
    freehub: string | null
    rotorMount: string | null
    maxTyreMm: number | null
    caliperOpeningMm: number | null
  }
  assumed: string[]
}

export const offRoad = (ride: string) =>
  ['cyclocross', 'gravel', 'bikepacking', 'cross-country', 'trail'].includes(ride)
export const mountainRide = (ride: string) => ride === 'cross-country' || ride === 'trail'

/**
 * Fills open questions with the defaults of the table `defaults`.
 * @returns assumed: paths of the answers that took a default, in the order of the form
 * @throws RangeError when neither a body mass nor a band is given
 * @source people's questionnaire, defaults PROPOSAL; an assumed bike counts 1 kg more against limits
 */
export function fillAnswers(answers: Answers, rules: Rules): Filled {
  const assumed: string[] = []
  const or = <T>(path: string, given: T | null | undefined, otherwise: () => T): T => {
    if (given !== undefined && given !== null) return given
    assumed.push(path)
    return otherwise()
  }
  const { ride, bodyMassKg, bodyMassBandKg: band } = answers
  const bodyKg = bodyMassKg ?? (band ? (band.from + band.to) / 2 : Number.NaN)
  if (!(bodyKg > 0)) throw new RangeError('fillAnswers: no body mass')
  const { defaults, limits } = rules
  const assist = or('assist', answers.assist, () => 'none' as const)
  const bikeKg = or('bikeMassKg', answers.bikeMassKg, () =>
    assist === '25' ? defaults.assistBikeMassKg : lookUp(defaults.bikeMassKg, ride),
  )
  const bikeAssumed = assumed.includes('bikeMassKg')
  const luggageKg = or('luggageKg', answers.luggageKg, () =>
    ride === 'bikepacking' ? defaults.bikepackingLuggageKg : 0,
  )
  return {
    ride,
    brakes: answers.brakes,
    bodyKg,
    limitBodyKg: bodyMassKg ?? band?.to ?? bodyKg,
    bikeKg,
    limitBikeKg: bikeKg + (bikeAssumed ? limits.assumedBikeExtraKg : 0),
    kitKg: or('kitMassKg', answers.kitMassKg, () => defaults.kitMassKg),
    luggageKg,
    luggagePlace: or('luggagePlace', answers.luggagePlace, () => (luggageKg > 0 ? 'spread' : 'none')),
    tyre: answers.tyre,
    seat: or('rim.seat', answers.rim?.seat, () => 'any' as const),
    innerWidthMm: answers.rim?.innerWidthMm ?? null,
    rimMaxBar: answers.rim?.maxBar ?? null,
    beadSeatMm: or('beadSeatMm', answers.beadSeatMm, () => 622),
    ridersOnBike: or('ridersOnBike', answers.ridersOnBike, () => 1),
    assist,
    position: or('position', answers.position, () =>
      ride === 'time-trial' ? 'aero' : mountainRide(ride) ? 'mountain' : ride === 'commute' ? 'upright' : 'drop',
    ),
    surface: or('surface', answers.surface, () => 'mixed' as const),
    terrain: or('terrain', answers.terrain, () => 'rolling'),
    wind: or('wind', answers.wind, () => 'typical'),
    confidence: or('confidence', answers.confidence, () => 'nervous'),
    flatSpeedKmh: or('flatSpeedKmh', answers.flatSpeedKmh, () => lookUp(defaults.flatSpeedKmh, ride)),
    frontLoadShare: answers.frontLoadShare ?? null,
    bike: {
      frontAxle: answers.bike?.frontAxle ?? null,
      rearAxle: answers.bike?.rearAxle ?? null,
      freehub: answers.bike?.freehub ?? null,
      rotorMount: answers.bike?.rotorMount ?? null,
      maxTyreMm: answers.bike?.maxTyreMm ?? null,
      caliperOpeningMm: answers.bike?.caliperOpeningMm ?? null,
    },
    assumed,
  }
}

/** Front share of rider, kit and bike: by position where it says more than the ride, else by ride. @source rule table load-split */
export function frontShareOf({ position, ride }: Pick<Filled, 'position' | 'ride'>, rules: Rules): number {
  return lookUp(rules['load-split'].frontShare, position === 'drop' ? ride : position)
}
