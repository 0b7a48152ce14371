/**
 * Puts wheel designs through the structural model when they are saved, never when advice is asked for. What was found is kept beside the wheel with
 * a digest of the design: same digest, nothing to solve.
 */
import { createHash } from 'node:crypto'
import { designFromParts, type WheelParts } from '#core/wheel-design.ts'
import { strengthOf, type WheelStrength } from '#core/rider-limits.ts'
import { solveWheel, type WheelStructure } from '#core/wheel-structure.ts'

/** Grows when the model changes what it finds, so that stored wheels are solved again. */
export const MODEL = 1

export interface SolvedWheel {
  digest: string
  strength: WheelStrength
  structure: WheelStructure
}

export interface WheelToSolve extends WheelParts {
  position: 'front' | 'rear'
  tensionTightN: number
}

/** Names everything the solution depends on. */
export function designDigest(wheel: WheelToSolve): string {
  const { position, tensionTightN, ...parts } = wheel
  return createHash('sha256')
    .update(JSON.stringify([MODEL, position, tensionTightN, designFromParts(parts)]))
    .digest('hex')
    .slice(0, 16)
}

/** Seven figures are far more than the model is good for, and keep what is stored short and the same on every machine. */
const short = (value: number) => Number(value.toPrecision(7))
export const shortened = <T>(value: T): T =>
  typeof value === 'number'
    ? (short(value) as T)
    : Array.isArray(value)
      ? (value.map(shortened) as T)
      : value !== null && typeof value === 'object'
        ? (Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, shortened(inner)])) as T)
        : value

/** @throws RangeError naming the field no wheel can have; TensionBuckles where the wheel cannot hold its tension */
export function solveDesign(wheel: WheelToSolve): SolvedWheel {
  const { structure } = solveWheel(designFromParts(wheel), { tightN: wheel.tensionTightN })
  return {
    digest: designDigest(wheel),
    strength: shortened(strengthOf(structure, wheel.position)),
    structure: shortened(structure),
  }
}
