/**
 * A rule table while somebody edits it. In: the table's zod schema and its data. Out: what kind of field each place needs, the typed tree (numbers
 * as text, so that nothing typed is lost), and the way back to data. Knows no table by name.
 */
import { z } from 'zod'
import { tables, type TableName } from '#core/rules.ts'
import type { CellFault } from '#core/rule-check.ts'
import { parseNumber } from '../../ui/NumberField.tsx'

export type Shape =
  | { kind: 'number' | 'text' | 'yes-no'; optional: boolean }
  | { kind: 'choice'; choices: string[]; optional: boolean }
  | { kind: 'group'; of: Record<string, Shape> }
  /** A fixed number of values. */
  | { kind: 'tuple'; of: Shape[] }
  /** Rows that come and go. */
  | { kind: 'list'; of: Shape }
export type Leaf = Extract<Shape, { optional: boolean }>
export type Typed = string | boolean | Typed[] | { [key: string]: Typed }
export type Path = (string | number)[]

interface Json {
  type?: string
  enum?: unknown[]
  const?: unknown
  properties?: Record<string, Json>
  required?: string[]
  additionalProperties?: Json | boolean
  prefixItems?: Json[]
  items?: Json | boolean
}

export const isLeaf = (shape: Shape): shape is Leaf => 'optional' in shape
const isTree = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

/** What the schema leaves open (words of a record, unions) is read off the data. */
function shapeFrom(schema: Json | undefined, value: unknown, optional = false): Shape {
  if (Array.isArray(schema?.enum)) return { kind: 'choice', choices: schema.enum.map(String), optional }
  if (schema?.prefixItems) {
    const { prefixItems } = schema
    return {
      kind: 'tuple',
      of: prefixItems.map((one, index) => shapeFrom(one, (value as unknown[] | undefined)?.[index])),
    }
  }
  if (schema?.type === 'array' || Array.isArray(value)) {
    const items = typeof schema?.items === 'object' ? schema.items : undefined
    return { kind: 'list', of: shapeFrom(items, Array.isArray(value) ? value[0] : undefined) }
  }
  if (schema?.type === 'object' || isTree(value)) {
    const known = schema?.properties ?? {}
    const rest = typeof schema?.additionalProperties === 'object' ? schema.additionalProperties : undefined
    const data = isTree(value) ? value : {}
    // In the order of the data, as its author put it; what only the schema knows comes after.
    const keys = [...new Set([...Object.keys(data), ...Object.keys(known)])]
    const of = keys.map((key) => {
      const needed = key in known ? (schema?.required ?? []).includes(key) : true
      return [key, shapeFrom(known[key] ?? rest, data[key], !needed)] as const
    })
    return { kind: 'group', of: Object.fromEntries(of) }
  }
  if (schema?.type === 'number' || schema?.type === 'integer' || typeof value === 'number')
    return { kind: 'number', optional }
  if (schema?.type === 'boolean' || typeof value === 'boolean') return { kind: 'yes-no', optional }
  return { kind: 'text', optional }
}

/** @param data read for the words that only it holds */
export const shapeOf = (name: TableName, data: unknown): Shape =>
  shapeFrom(z.toJSONSchema(tables[name], { io: 'input', unrepresentable: 'any' }) as Json, data)

export function typedOf(shape: Shape, value: unknown): Typed {
  switch (shape.kind) {
    case 'group':
      return Object.fromEntries(
        Object.entries(shape.of).map(([key, one]) => [key, typedOf(one, isTree(value) ? value[key] : undefined)]),
      )
    case 'tuple':
      return shape.of.map((one, index) => typedOf(one, (value as unknown[] | undefined)?.[index]))
    case 'list':
      return Array.isArray(value) ? value.map((one) => typedOf(shape.of, one)) : []
    case 'yes-no':
      return value === true
    case 'choice':
      return typeof value === 'string' ? value : shape.optional ? '' : (shape.choices[0] ?? '')
    default:
      return typeof value === 'string' || typeof value === 'number' ? String(value) : ''
  }
}

/** `0,43`, `0.43` and `1e-7` alike. */
const readNumber = (text: string) =>
  parseNumber(text) ?? (/^-?\d+(\.\d+)?e[-+]?\d+$/i.test(text.trim()) ? Number(text) : null)

/** Back to data. A number that cannot be read is a fault; its place in the data then holds the text. */
export function readTyped(shape: Shape, typed: Typed, path: Path = []): { data: unknown; faults: CellFault[] } {
  if (isLeaf(shape)) {
    if (typeof typed === 'string' && typed.trim() === '')
      return shape.optional
        ? { data: undefined, faults: [] }
        : { data: '', faults: [{ path, code: 'required', data: {} }] }
    if (shape.kind !== 'number') return { data: typeof typed === 'string' ? typed.trim() : typed, faults: [] }
    const number = typeof typed === 'string' ? readNumber(typed) : null
    return number === null
      ? { data: typed, faults: [{ path, code: 'not-number', data: {} }] }
      : { data: number, faults: [] }
  }
  if (shape.kind === 'group') {
    const read = Object.entries(shape.of).map(
      ([key, one]) => [key, readTyped(one, (typed as Record<string, Typed>)[key] ?? '', [...path, key])] as const,
    )
    return {
      data: Object.fromEntries(read.flatMap(([key, { data }]) => (data === undefined ? [] : [[key, data]]))),
      faults: read.flatMap(([, { faults }]) => faults),
    }
  }
  const read = (typed as Typed[]).map((one, index) => {
    const inner = shape.kind === 'list' ? shape.of : shape.of[index]
    return inner ? readTyped(inner, one, [...path, index]) : { data: one, faults: [] }
  })
  return { data: read.map(({ data }) => data), faults: read.flatMap(({ faults }) => faults) }
}

/** The tree with one place changed by `change`; the rest stays the same objects. */
export function changeAt(typed: Typed, [first, ...rest]: Path, change: (old: Typed) => Typed): Typed {
  if (first === undefined) return change(typed)
  if (Array.isArray(typed)) return typed.map((one, index) => (index === first ? changeAt(one, rest, change) : one))
  if (typeof typed !== 'object') return typed
  return { ...typed, [first]: changeAt(typed[first] ?? '', rest, change) }
}

export const controlId = (path: Path) => `rule-${path.join('-')}`
