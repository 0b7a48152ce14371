import type { Draft, Mass } from '../../lib/fitting.ts'

/** From harmless to personal. */
export const steps = ['ride', 'brakes', 'tyre', 'mass'] as const
export type Step = (typeof steps)[number]

export const readStep = (params: URLSearchParams): Step => steps.find((one) => one === params.get('step')) ?? 'ride'

/** `tyre: null` counts: "I don't know" is an answer. */
export const stepDone = (step: Step, draft: Draft, mass: Mass | null): boolean =>
  step === 'mass' ? mass !== null : draft[step] !== undefined
