import type { RiderAnswers, Ride } from '#contract/advisor.ts'
import type { Draft } from '../../lib/fitting.ts'

/** Widths people mostly have on each ride, mm, narrow first. They only save typing: any width can be given. */
export const usualWidths: Record<Ride, readonly number[]> = {
  'road-fast': [25, 28, 30, 32],
  'road-long': [25, 28, 30, 32],
  climbing: [25, 28, 30, 32],
  'time-trial': [23, 25, 28, 30],
  cyclocross: [32, 33, 35, 38],
  gravel: [38, 40, 45, 50],
  bikepacking: [40, 45, 50, 57],
  commute: [28, 32, 37, 42],
  'cross-country': [54, 57, 60, 61],
  trail: [57, 60, 61, 64],
}

export const LEAST_TYRE_MM = 20
export const MOST_TYRE_MM = 75

export type Setup = NonNullable<RiderAnswers['tyre']>['setup']

/** Tubeless where tyres are wide or brakes are discs, a tube with rim brakes: what stands on most such bikes. */
export const usualSetup = ({ ride, brakes }: Draft): Setup =>
  brakes === 'rim' && ride !== 'gravel' && ride !== 'cyclocross' ? 'tube' : 'tubeless'
