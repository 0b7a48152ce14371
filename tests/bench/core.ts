/** The sums alone: one design through the structural model, one rider through the advice, and how the second grows with the range. */
import { designFromParts } from '#core/wheel-design.ts'
import { solveWheel } from '#core/wheel-structure.ts'
import { advise } from '#core/advise.ts'
import type { WheelsetFacts } from '#core/catalogue.ts'
import { rulesFrom } from '#core/rules.ts'
import { influence, tippingPoints } from '#core/what-changes.ts'
import { catalogue } from '../../server/seeds/catalogue.ts'
import { wheelsetFacts } from '../../server/seeds/facts.ts'
import { ruleTables } from '../../server/seeds/rule-tables.ts'
import { cpuMicros, interleaved, median, say } from './measure.ts'
import { riders } from './riders.ts'

const ROUNDS = 9

export function benchCore(): void {
  const rules = rulesFrom(ruleTables)
  const people = riders(1000)
  const over = (sets: readonly WheelsetFacts[]) => () => {
    let kept = 0
    const micros = cpuMicros(() => {
      for (const one of people) kept += advise(one, sets, rules, 'bench').wheelsets.length
    })
    if (kept === 0) throw new Error('nothing was judged')
    return micros / people.length
  }
  const times = (factor: number): WheelsetFacts[] =>
    Array.from({ length: factor }, (_, k) =>
      wheelsetFacts.map((set) => ({ ...set, sku: `${set.sku}-${k}`, slug: `${set.slug}-${k}` })),
    ).flat()
  const works = {
    one: over(wheelsetFacts),
    two: over(times(2)),
    four: over(times(4)),
    eight: over(times(8)),
  }
  interleaved(3, works)
  const { one = 0, two = 0, four = 0, eight = 0 } = interleaved(ROUNDS, works)
  say(`advice for one rider over ${wheelsetFacts.length} wheelsets: median ${one.toFixed(1)} µs (goal 50)`)
  const each = (sets: number, value: number) => ((value - one) / ((sets - 1) * wheelsetFacts.length)).toFixed(2)
  say(
    `  2, 4, 8 times the range: ${[two, four, eight].map((value) => value.toFixed(1)).join(', ')} µs; each further wheelset costs ${each(2, two)}, ${each(4, four)}, ${each(8, eight)} µs`,
  )

  const wheels = catalogue.flatMap(({ wheels }) => wheels)
  const solveAll = () =>
    wheels.map((wheel) => cpuMicros(() => solveWheel(designFromParts(wheel), { tightN: wheel.tensionTightN })) / 1000)
  solveAll()
  const solved = [...solveAll(), ...solveAll(), ...solveAll()].sort((a, b) => a - b)
  say(
    `one wheel design through the structural model: median ${median(solved).toFixed(1)} ms, nine in ten under ${(solved[Math.floor(solved.length * 0.9)] ?? 0).toFixed(1)} ms (goal 15)`,
  )

  const asked = people.slice(0, 40)
  const changes = asked.map((answers) => {
    const micros = cpuMicros(() => {
      tippingPoints(answers, wheelsetFacts, rules, 'bench')
      influence(answers, wheelsetFacts, rules, 'bench')
    })
    return micros / 1000
  })
  say(`tipping points and influence for one rider: median ${median(changes).toFixed(1)} ms`)
}
