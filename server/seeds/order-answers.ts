/** What an invented rider answered in the fitting: whole requests of POST /api/advice, with the usual tyres and bikes of each ride. */
import type { Ride } from '#contract/advisor.ts'
import type { Prng } from './prng.ts'

interface Habit {
  share: number
  tyresMm: number[]
  bikeKg: [number, number]
  luggageKg: number[]
  position: 'drop' | 'aero' | 'upright' | 'mountain'
  surface: 'smooth' | 'mixed' | 'rough'
  flatSpeedKmh: [number, number]
}

const habits: Record<Ride, Habit> = {
  'road-fast': {
    share: 16,
    tyresMm: [28, 30],
    bikeKg: [7, 9],
    luggageKg: [0],
    position: 'drop',
    surface: 'smooth',
    flatSpeedKmh: [30, 37],
  },
  'road-long': {
    share: 24,
    tyresMm: [28, 30, 32],
    bikeKg: [8, 10],
    luggageKg: [0, 0, 2],
    position: 'drop',
    surface: 'mixed',
    flatSpeedKmh: [25, 31],
  },
  climbing: {
    share: 10,
    tyresMm: [28, 30],
    bikeKg: [7, 9],
    luggageKg: [0],
    position: 'drop',
    surface: 'mixed',
    flatSpeedKmh: [24, 31],
  },
  'time-trial': {
    share: 4,
    tyresMm: [28],
    bikeKg: [8, 10],
    luggageKg: [0],
    position: 'aero',
    surface: 'smooth',
    flatSpeedKmh: [36, 43],
  },
  cyclocross: {
    share: 5,
    tyresMm: [33, 35],
    bikeKg: [8, 10],
    luggageKg: [0],
    position: 'drop',
    surface: 'rough',
    flatSpeedKmh: [20, 27],
  },
  gravel: {
    share: 16,
    tyresMm: [40, 42, 45],
    bikeKg: [9, 11],
    luggageKg: [0, 1, 3],
    position: 'drop',
    surface: 'rough',
    flatSpeedKmh: [21, 28],
  },
  bikepacking: {
    share: 6,
    tyresMm: [45, 47],
    bikeKg: [10, 13],
    luggageKg: [9, 12, 15],
    position: 'drop',
    surface: 'rough',
    flatSpeedKmh: [17, 22],
  },
  commute: {
    share: 9,
    tyresMm: [32, 35, 38],
    bikeKg: [11, 15],
    luggageKg: [3, 5, 8],
    position: 'upright',
    surface: 'mixed',
    flatSpeedKmh: [19, 25],
  },
  'cross-country': {
    share: 7,
    tyresMm: [56, 60],
    bikeKg: [10, 12],
    luggageKg: [0],
    position: 'mountain',
    surface: 'rough',
    flatSpeedKmh: [17, 23],
  },
  trail: {
    share: 3,
    tyresMm: [60],
    bikeKg: [13, 15],
    luggageKg: [0, 1],
    position: 'mountain',
    surface: 'rough',
    flatSpeedKmh: [16, 20],
  },
}

const weighted = Object.entries(habits).flatMap(([ride, { share }]) =>
  Array.from({ length: share }, () => ride as Ride),
)
const OFF_ROAD: Ride[] = ['cyclocross', 'gravel', 'bikepacking', 'cross-country', 'trail']

export function inventAnswers(random: Prng) {
  const ride = random.pick(weighted)
  const habit = habits[ride]
  const offRoad = OFF_ROAD.includes(ride)
  const tyreMm = random.pick(habit.tyresMm)
  const luggageKg = random.pick(habit.luggageKg)
  const assist = ride === 'commute' && random.chance(0.3) ? '25' : 'none'
  const brakes = !offRoad && assist === 'none' && random.chance(0.22) ? 'rim' : 'disc'
  return {
    ride,
    // the mean of two throws: most people near the middle
    bodyMassKg: Math.round((random.between(52, 104) + random.between(52, 104)) / 2),
    kitMassKg: random.between(2, 4),
    bikeMassKg: random.between(...habit.bikeKg) + (assist === 'none' ? 0 : 9),
    luggageKg,
    brakes,
    tyre: {
      frontWidthMm: brakes === 'rim' ? 28 : tyreMm,
      rearWidthMm: brakes === 'rim' ? 28 : tyreMm,
      setup: brakes === 'rim' || ride === 'commute' ? 'tube' : 'tubeless',
      hooklessApproved: brakes === 'disc' && ride !== 'commute',
    },
    rim: { seat: 'any' },
    beadSeatMm: 622,
    ridersOnBike: 1,
    assist,
    luggagePlace: luggageKg === 0 ? 'none' : ride === 'commute' ? 'rear' : 'spread',
    position: habit.position,
    surface: habit.surface,
    terrain: random.pick(['flat', 'rolling', 'rolling', 'hilly']),
    wind: random.pick(['sheltered', 'typical', 'typical', 'exposed']),
    confidence: random.pick(['nervous', 'average', 'average', 'confident']),
    flatSpeedKmh: random.between(...habit.flatSpeedKmh),
  } as const
}
