/** What the benchmarks share: medians, interleaved rounds, one line of print a figure. */

export const median = (values: readonly number[]): number => {
  const sorted = [...values].sort((a, b) => a - b)
  const half = Math.floor(sorted.length / 2)
  const [low = Number.NaN, high = Number.NaN] = [sorted[half - 1 + (sorted.length % 2)], sorted[half]]
  return (low + high) / 2
}

export const say = (line: string) => {
  process.stdout.write(`${line}\n`)
}

/** CPU time of this process for one pass of `work`, µs; user and system together, so that other work on the machine counts less. */
export function cpuMicros(work: () => void): number {
  const before = process.cpuUsage()
  work()
  const { user, system } = process.cpuUsage(before)
  return user + system
}

/** Rounds of several works in turn, A B A B, so that a change of the machine's load meets them all. @returns median by name */
export function interleaved(rounds: number, works: Record<string, () => number>): Record<string, number> {
  const figures: Record<string, number[]> = {}
  for (let round = 0; round < rounds; round += 1)
    for (const [name, work] of Object.entries(works)) (figures[name] ??= []).push(work())
  return Object.fromEntries(Object.entries(figures).map(([name, values]) => [name, median(values)]))
}
