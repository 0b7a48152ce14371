/** The demo's wheels and the reference builds, solved afresh. The outcome is kept in solved-wheels.json so that seeding takes no time. */
import { strengthOf, type WheelStrength, type WheelUse } from '#core/rider-limits.ts'
import { solveWheel } from '#core/wheel-structure.ts'
import { designDigest, shortened, solveDesign, type SolvedWheel } from '../wheel-designs/solve.ts'
import { catalogue } from './catalogue.ts'
import { REFERENCE_TIGHT_N, referenceCounts, referenceDesign, referenceRims } from './reference-builds.ts'

export type ReferenceWheel = WheelStrength & { count: number }
export interface SolvedSeeds {
  reference: Record<WheelUse, Record<'front' | 'rear', ReferenceWheel[]>>
  /** By digest of the design. */
  designs: Record<string, SolvedWheel>
}

export function solveSeeds(): SolvedSeeds {
  const wheels = (use: WheelUse, position: 'front' | 'rear') =>
    referenceCounts.map((count) => {
      const design = referenceDesign(use, referenceRims[use], position, count)
      const { structure } = solveWheel(design, { tightN: REFERENCE_TIGHT_N })
      return { count, ...shortened(strengthOf(structure, position)) }
    })
  const both = (use: WheelUse) => ({ front: wheels(use, 'front'), rear: wheels(use, 'rear') })
  const designs: SolvedSeeds['designs'] = {}
  for (const wheel of catalogue.flatMap((set) => set.wheels)) designs[designDigest(wheel)] ??= solveDesign(wheel)
  return {
    reference: {
      'road-rim': both('road-rim'),
      'road-disc': both('road-disc'),
      gravel: both('gravel'),
      mountain: both('mountain'),
    },
    designs,
  }
}
