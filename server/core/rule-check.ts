/**
 * Whether data that somebody typed may become a version of a rule table: its own shape, no field that no sum reads, no word gone that a sum looks
 * up. In: a table's name and data. Out: what is wrong, cell by cell. The product desk's page and the server ask the same question here.
 */
import type { core } from 'zod'
import { tables, type TableName } from './rules.ts'

export interface CellFault {
  path: (string | number)[]
  /** A code of errors.json `field.*`. */
  code: string
  data: Record<string, unknown>
}

/** What the tables' own checks say, as codes that can be put into words. */
const OWN_CHECKS: Record<string, string> = {
  'widths must rise': 'widths-rise',
  'caps must fall': 'caps-fall',
  'two rows of one name': 'row-twice',
  'only within is ok': 'only-within-ok',
  'each bead wall needs a least and a widest tyre for every rim': 'seat-needs-edges',
}

const isBranch = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null

function faultOf(issue: core.$ZodIssue): CellFault {
  const path = issue.path.map((part) => (typeof part === 'number' ? part : String(part)))
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined
        ? { path, code: 'required', data: {} }
        : { path, code: issue.expected === 'int' ? 'not-whole' : 'wrong-type', data: { expected: issue.expected } }
    case 'too_small':
      return issue.origin === 'string'
        ? { path, code: 'too-short', data: { minimum: Number(issue.minimum) } }
        : {
            path,
            code: issue.origin !== 'array' && issue.inclusive === false ? 'more-than' : 'too-small',
            data: { minimum: Number(issue.minimum) },
          }
    case 'too_big':
      return {
        path,
        code: issue.origin === 'string' ? 'too-long' : 'too-large',
        data: { maximum: Number(issue.maximum) },
      }
    case 'invalid_value':
      return { path, code: 'not-a-choice', data: { choices: issue.values.join(', ') } }
    case 'custom':
      return { path, code: OWN_CHECKS[issue.message] ?? 'table-check', data: { said: issue.message } }
    default:
      return { path, code: 'not-valid', data: {} }
  }
}

/** Paths that `read` has and `kept` has not. */
function leftOut(read: unknown, kept: unknown, path: (string | number)[] = []): (string | number)[][] {
  if (!isBranch(read) || !isBranch(kept)) return []
  return Object.keys(read).flatMap((key) => {
    const here = [...path, Array.isArray(read) ? Number(key) : key]
    return key in kept ? leftOut(read[key], kept[key], here) : [here]
  })
}

/** Words of `base` that `data` lacks. Rows of a list come and go, so only named places count. */
function wordsGone(base: unknown, data: unknown, path: string[] = []): string[][] {
  if (!isBranch(base) || Array.isArray(base) || !isBranch(data) || Array.isArray(data)) return []
  return Object.keys(base).flatMap((key) =>
    key in data ? wordsGone(base[key], data[key], [...path, key]) : [[...path, key]],
  )
}

/** @param base the version that the typed one would replace; the sums look its words up, so none may go missing */
export function checkTable(name: TableName, data: unknown, base: unknown): CellFault[] {
  const parsed = tables[name].safeParse(data)
  const gone = wordsGone(base, data).map((path) => ({ path, code: 'required', data: {} }))
  if (!parsed.success) {
    const found = parsed.error.issues.map(faultOf)
    const told = new Set(found.map(({ path }) => path.join('.')))
    return [...found, ...gone.filter(({ path }) => !told.has(path.join('.')))]
  }
  return [...leftOut(data, parsed.data).map((path) => ({ path, code: 'unknown', data: {} })), ...gone]
}

/**
 * Where a cell stands, for people: the row by its number and its name, then the column. A value outside any row has an empty row.
 * @example cellOf(['rows', 3, 'maxBar'], data) // { row: '4 (hookless-cap-35)', column: 'maxBar' }
 */
export function cellOf(path: readonly (string | number)[], data: unknown): { row: string; column: string } {
  const at = path.findLastIndex((part, index) => typeof part === 'number' && index < path.length - 1)
  const from = at >= 0 ? at : path.length - 2
  const rowPath = path.slice(0, from + 1)
  const told = at >= 0 && rowPath[0] === 'rows' ? rowPath.slice(1) : rowPath
  const column = path
    .slice(from + 1)
    .map((part) => (typeof part === 'number' ? String(part + 1) : part))
    .join(' ')
  const row = told.map((part) => (typeof part === 'number' ? String(part + 1) : part)).join(' ')
  const found = rowPath.reduce<unknown>((value, part) => (isBranch(value) ? value[String(part)] : undefined), data)
  const named = isBranch(found) ? (Array.isArray(found) ? (found[0] as unknown) : found.row) : undefined
  const name = at >= 0 && (typeof named === 'string' || typeof named === 'number') ? ` (${named})` : ''
  return { row: `${row}${name}`, column }
}
