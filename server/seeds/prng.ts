/** A small seeded source of choices (mulberry32), so that every demo database is the same. Never for secrets. */
export interface Prng {
  /** 0 ≤ x < 1 */
  next: () => number
  /** whole number, both ends included */
  between: (from: number, to: number) => number
  pick: <T>(list: readonly T[]) => T
  /** true in `share` of the calls */
  chance: (share: number) => boolean
  /** `length` hexadecimal digits */
  hex: (length: number) => string
  uuid: () => string
}

export function prng(seed: number): Prng {
  let state = seed >>> 0
  const next = () => {
    state = (state + 0x6d2b79f5) >>> 0
    let t = Math.imul(state ^ (state >>> 15), 1 | state)
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32
  }
  const between = (from: number, to: number) => from + Math.floor(next() * (to - from + 1))
  const pick = <T>(list: readonly T[]): T => {
    const one = list[between(0, list.length - 1)]
    if (one === undefined) throw new RangeError('pick: empty list')
    return one
  }
  const hex = (length: number) => Array.from({ length }, () => between(0, 15).toString(16)).join('')
  // version 4, variant 1 (RFC 9562)
  const uuid = () => `${hex(8)}-${hex(4)}-4${hex(3)}-${pick(['8', '9', 'a', 'b'])}${hex(3)}-${hex(12)}`
  return { next, between, pick, chance: (share) => next() < share, hex, uuid }
}
