/** Cubic spline through values at even steps from 0 on: smooth to its second derivative, and quick to read. */
export interface Spline {
  at(x: number): number
}

/**
 * @param values at 0, step, 2·step, …; at least four of them
 * @param start `level`: slope 0 at the first value, for even functions; `straight`: no bend there, for odd ones. The far end has no bend.
 * @returns at(x): within the values; beyond them the last piece goes on
 * @throws RangeError for fewer values or a step that is not positive
 * @source natural and clamped cubic spline, any book on numerical analysis
 */
export function splineOf(values: readonly number[], step: number, start: 'level' | 'straight'): Spline {
  const count = values.length
  if (!(count >= 4 && step > 0)) throw new RangeError('splineOf: out of range')
  const y = Float64Array.from(values)
  const of = (index: number) => y[index] ?? 0
  // Second derivatives times step²/6, from a tridiagonal system solved forward and back.
  const bend = new Float64Array(count)
  const carry = new Float64Array(count)
  if (start === 'level') {
    carry[0] = 0.5
    bend[0] = (of(1) - of(0)) / 2
  }
  for (let i = 1; i < count - 1; i += 1) {
    const pivot = 4 - (carry[i - 1] ?? 0)
    carry[i] = 1 / pivot
    bend[i] = (of(i + 1) - 2 * of(i) + of(i - 1) - (bend[i - 1] ?? 0)) / pivot
  }
  for (let i = count - 2; i >= 0; i -= 1) bend[i] = (bend[i] ?? 0) - (carry[i] ?? 0) * (bend[i + 1] ?? 0)
  return {
    at(x) {
      const position = x / step
      const i = Math.max(0, Math.min(count - 2, Math.floor(position)))
      const t = position - i
      const u = 1 - t
      return (
        u * (y[i] ?? 0) + t * (y[i + 1] ?? 0) + u * (u * u - 1) * (bend[i] ?? 0) + t * (t * t - 1) * (bend[i + 1] ?? 0)
      )
    },
  }
}
