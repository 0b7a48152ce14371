import type { Config } from '../config.ts'
import type { Payments } from './index.ts'
import { createStripe } from './stripe.ts'

/** Chosen by name in the settings, never by a missing key. */
export const createPayments = (config: Config, clock: () => Date = () => new Date()): Payments =>
  createStripe(config, clock)
