/** Every code that the core can say has a sentence in every language. The codes are read from the core's own text. */
import { readdirSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { describe, expect, it } from 'vitest'
import { labels, outcomes, rides, verdicts, wheelCriteria } from '#contract/advisor.ts'
import { locales } from '#contract/common.ts'
import { advise as giveAdvice } from '#core/advise.ts'
import { rankedBy } from '#core/judge.ts'
import { rulesFrom } from '#core/rules.ts'
import { wheelsetFacts } from '../../server/seeds/facts.ts'
import { ruleTables } from '../../server/seeds/rule-tables.ts'
import reference from '../core/reference/personas.json'

const root = path.resolve(import.meta.dirname, '../..')
const core = (file: string) => readFileSync(path.join(root, 'server/core', file), 'utf8')
const all = (text: string, pattern: RegExp) => [...new Set([...text.matchAll(pattern)].map(([, code]) => code ?? ''))]

const [advise, judge, pairing, pressure, wheelPressure, reasons] = [
  core('advise.ts') + core('notes.ts'),
  core('judge.ts') + core('tyre-check.ts'),
  core('tyre-rim.ts'),
  core('tyre-pressure.ts'),
  core('wheel-pressure.ts'),
  core('reasons.ts'),
]
const refusedPairings = all(pairing, /verdict: 'no', code: '([\w-]+)'/g)
const checkedPairings = all(pairing, /verdict: 'check', code: '([\w-]+)'/g)
const pressureVerdicts = all(/type PressureVerdict =(.*)/.exec(wheelPressure)?.[1] ?? '', /'([\w-]+)'/g)
const codesOf = {
  notes: [...all(advise, /note\(\s*'([\w-]+)'/g), ...refusedPairings],
  'findings.removed': [
    ...all(judge, /code: '([\w-]+)'(?!, field)/g).filter((code) => !/^(other-|lower-)/.test(code)),
    ...all(judge, /\w+\.(?:axles|freehubs), '([\w-]+)'/g),
    ...all(/const limitCodes = (.*?)\n\}/s.exec(judge)?.[1] ?? '', /: '([\w-]+)'/g),
    ...all(judge, /return refused\(rim, '([\w-]+)'/g),
    ...refusedPairings,
  ],
  'findings.change': all(judge, /change[:=]? ?=? ?\{ code: '([\w-]+)'/g),
  'findings.verdict': verdicts,
  'findings.why': [
    ...all(/codes\.push\((.*?)\n {4}judgement\.startBar/s.exec(judge)?.[1] ?? '', /'([a-z]+-[\w-]+)'/g).filter(
      (code) => code !== 'wheel-criteria',
    ),
    ...all(/function spokeVerdict(.*?)\n\}/s.exec(judge)?.[1] ?? '', /'((?:spokes|structure)-[\w-]+)'/g),
    ...all(judge, /codes: \['([\w-]+)'\]/g),
    ...checkedPairings,
    ...pressureVerdicts.filter((code) => code !== 'ok' && code !== 'not-suitable'),
  ],
  'findings.governedBy': [...wheelCriteria, 'floor'],
  'findings.behindBy': rankedBy,
  'findings.ceilingFrom': all(/type CeilingFrom =(.*)/.exec(pressure)?.[1] ?? '', /'([\w-]+)'/g),
  refusal: [...all(advise, /note\(\s*'([\w-]+)',\s*'stop'/g), ...refusedPairings],
} as const

type Tree = { [key: string]: string | Tree }
const read = (language: string) =>
  JSON.parse(readFileSync(path.join(root, 'locales', language, 'advisor.json'), 'utf8')) as Tree
const at = (tree: Tree, key: string) =>
  key
    .split('.')
    .reduce<string | Tree | undefined>((here, part) => (typeof here === 'object' ? here[part] : undefined), tree)

/** Names in the workings of the reference riders, as the core gives them. */
const reasonsGiven: Record<string, { inputs: Set<string>; constants: Set<string> }> = {}
for (const { inputs } of reference.personas) {
  const { reasons: given } = giveAdvice(inputs as never, wheelsetFacts, rulesFrom(ruleTables), 'words')
  for (const [key, reason] of Object.entries(given)) {
    const kept = (reasonsGiven[key] ??= { inputs: new Set(), constants: new Set() })
    for (const name of Object.keys(reason.inputs)) kept.inputs.add(name)
    for (const name of Object.keys(reason.constants)) kept.constants.add(name)
  }
}

describe.each(locales)('the words of the advice in %s', (language) => {
  const words = read(language)

  it.each(Object.entries(codesOf))('%s has a sentence for each code', (place, codes) => {
    expect(codes.length).toBeGreaterThan(2)
    const missing = codes.filter((code) => at(words, `${place}.${code}`) === undefined)
    expect(missing).toEqual([])
  })

  it.each([
    'notes',
    'findings.removed',
    'findings.change',
    'findings.why',
    'findings.governedBy',
    'findings.ceilingFrom',
    'field',
    'refusal',
    'working.value',
  ])('%s has a general sentence for what is not known yet', (place) => {
    expect(at(words, `${place}.other`)).toBeDefined()
  })

  it('names every ride, every label and every answer that may change a value', () => {
    for (const ride of rides) expect(at(words, `ride.${ride}.label`)).toBeTypeOf('string')
    for (const label of labels) expect(at(words, `working.labels.${label}.short`)).toBeTypeOf('string')
    const paths = [
      ...all(
        reasons
          .replaceAll(/wouldChangeIf: \[(.*?)\]/gs, '§$1§')
          .split('§')
          .filter((_, index) => index % 2 === 1)
          .join(),
        /'([\w.-]+)'/g,
      ),
      'tyre.frontWidthMm',
      'tyre.rearWidthMm',
    ].filter((one) => one !== 'front')
    expect(paths.length).toBeGreaterThan(10)
    for (const one of paths) expect(at(words, `field.${one}`), one).toBeTypeOf('string')
  })

  it('says what each kind of working stands on, and names every figure in it', () => {
    const missing = new Set<string>()
    for (const [key, { inputs, constants }] of Object.entries(reasonsGiven)) {
      const kind = key.split('.')[0] ?? key
      for (const place of [`working.formula.${kind}`, `working.sources.${kind}`])
        if (at(words, place) === undefined) missing.add(place)
      for (const name of [...inputs, ...constants])
        if (at(words, `working.value.${name}`) === undefined && at(words, `field.${name}`) === undefined)
          missing.add(`${key}: ${name}`)
    }
    expect(Object.keys(reasonsGiven).length).toBeGreaterThan(10)
    expect([...missing]).toEqual([])
  })
})

it('reads the codes from the core as it stands', () => {
  expect(readdirSync(path.join(root, 'server/core'))).toContain('advise.ts')
  expect(codesOf.notes).toEqual(expect.arrayContaining(['over-every-limit', 'tandem', 'band-used', 'tubular']))
  expect(codesOf['findings.removed']).toEqual(expect.arrayContaining(['system-mass', 'use', 'front-axle', 'freehub']))
  expect(codesOf['findings.change']).toEqual(expect.arrayContaining(['other-fact', 'other-tyre', 'lower-total']))
  expect(outcomes).toHaveLength(4)
})
