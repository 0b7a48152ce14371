import { readdirSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { describe, expect, it } from 'vitest'
import { locales } from '#contract/common.ts'

const folder = path.resolve(import.meta.dirname, '../locales')
const files = readdirSync(path.join(folder, 'en')).sort()

type Tree = { [key: string]: string | Tree }
const read = (language: string, file: string) =>
  JSON.parse(readFileSync(path.join(folder, language, file), 'utf8')) as Tree

const flat = (tree: Tree, before = ''): [key: string, text: string][] =>
  Object.entries(tree).flatMap(([key, value]) =>
    typeof value === 'string' ? [[before + key, value] as [string, string]] : flat(value, `${before}${key}.`),
  )

/** `basketCount_one` and `basketCount_other` are forms of one text; which forms there are depends on the language. */
const plural = /_(zero|one|two|few|many|other)$/
const base = (key: string) => key.replace(plural, '')
const placeholders = (text: string) => [...text.matchAll(/\{\{\s*-?\s*([\w.]+)/g)].map(([, name]) => name).sort()

describe.each(locales.filter((language) => language !== 'en'))('texts in %s', (language) => {
  it('stand in the same files as the English ones', () => {
    expect(readdirSync(path.join(folder, language)).sort()).toEqual(files)
  })

  it.each(files)('%s has the same keys as in English', (file) => {
    const keys = (which: string) => [...new Set(flat(read(which, file)).map(([key]) => base(key)))].sort()
    expect(keys(language)).toEqual(keys('en'))
  })

  it.each(files)('%s has every plural form of its language', (file) => {
    const forms = new Intl.PluralRules(language).resolvedOptions().pluralCategories
    const texts = flat(read(language, file)).map(([key]) => key)
    const counted = new Set(texts.filter((key) => plural.test(key) && !key.endsWith('_zero')).map(base))
    for (const key of counted) for (const form of forms) expect(texts, key).toContain(`${key}_${form}`)
  })

  it.each(files)('%s uses the same placeholders as in English', (file) => {
    const english = new Map(flat(read('en', file)).map(([key, text]) => [key, placeholders(text)]))
    const byBase = new Map(flat(read('en', file)).map(([key, text]) => [base(key), placeholders(text)]))
    for (const [key, text] of flat(read(language, file))) {
      if (key.endsWith('_zero') || key.endsWith('_one')) continue // "one" may leave the number out
      expect(placeholders(text), key).toEqual(english.get(key) ?? byBase.get(base(key)))
    }
  })

  it.each(files)('%s leaves no text empty', (file) => {
    for (const which of ['en', language])
      for (const [key, text] of flat(read(which, file))) expect(text.trim(), `${which} ${key}`).not.toBe('')
  })
})

describe('the words of the product', () => {
  const all = locales.flatMap((language) =>
    files.flatMap((file) =>
      flat(read(language, file)).map(([key, text]) => ({ where: `${language}/${file} ${key}`, text })),
    ),
  )

  it('never promise safety, scold a body or shout', () => {
    const never = /\b(safe|safely|obese|overweight|too fat|lose weight|seguro|segura|obeso|gordo|perca peso)\b|!/i
    expect(all.filter(({ text }) => never.test(text)).map(({ where }) => where)).toEqual([])
  })
})

describe('texts that pages ask for', () => {
  const sources = (dir: string): string[] =>
    readdirSync(dir, { withFileTypes: true }).flatMap((entry) =>
      entry.isDirectory()
        ? sources(path.join(dir, entry.name))
        : /\.tsx?$/.test(entry.name)
          ? [path.join(dir, entry.name)]
          : [],
    )
  const texts = new Set(
    files.flatMap((file) => flat(read('en', file)).map(([key]) => `${file.replace('.json', '')}:${base(key)}`)),
  )

  it('exist in English, wherever a key is written out in full', () => {
    const missing: string[] = []
    for (const file of sources(path.resolve(import.meta.dirname, '../src'))) {
      const code = readFileSync(file, 'utf8')
      const first = /useTranslation\(\s*\[?\s*'([\w-]+)'/.exec(code)?.[1] ?? 'common'
      for (const [, key] of code.matchAll(/(?<![\w.])t\(\s*'([\w:.-]+)'/g)) {
        if (key === undefined) continue
        if (!texts.has(key.includes(':') ? key : `${first}:${key}`)) missing.push(`${path.basename(file)}: ${key}`)
      }
    }
    expect(missing).toEqual([])
  })
})
