/** What differs between two versions of a table, cell by cell. Rows are matched by their name or first value, so that a row put in between is one difference. */

export type Step = string | { row: string }
export interface Difference {
  at: Step[]
  /** Undefined: not there. */
  from: unknown
  to: unknown
  /** The rows are the same and stand in another order. */
  order?: true
}

const isTree = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

const nameOf = (row: unknown) => {
  const name = Array.isArray(row) ? (row[0] as unknown) : isTree(row) ? (row.row ?? Object.values(row)[0]) : undefined
  return typeof name === 'string' || typeof name === 'number' ? String(name) : null
}

/** The rows under a name each, or null where names are missing or stand twice. */
function named(rows: readonly unknown[]): Map<string, unknown> | null {
  const names = rows.map(nameOf)
  if (names.includes(null) || new Set(names).size !== names.length) return null
  return new Map(rows.map((row, index) => [names[index] ?? '', row]))
}

const numbered = (rows: readonly unknown[]) => new Map(rows.map((row, index) => [String(index + 1), row]))

function rowDifferences(from: readonly unknown[], to: readonly unknown[], at: Step[]): Difference[] {
  const [a, b] = [named(from), named(to)]
  const [old, fresh] = a && b ? [a, b] : [numbered(from), numbered(to)]
  const stayed = [...old.keys()].filter((name) => fresh.has(name))
  const order = [...fresh.keys()].filter((name) => old.has(name))
  const moved = stayed.some((name, index) => name !== order[index])
  return [
    ...[...old].flatMap(([row, value]) => differences(value, fresh.get(row), [...at, { row }])),
    ...[...fresh].filter(([row]) => !old.has(row)).map(([row, to]) => ({ at: [...at, { row }], from: undefined, to })),
    ...(moved ? [{ at, from: stayed.join(', '), to: order.join(', '), order: true as const }] : []),
  ]
}

export function differences(from: unknown, to: unknown, at: Step[] = []): Difference[] {
  if (Array.isArray(from) && Array.isArray(to)) return rowDifferences(from, to, at)
  if (isTree(from) && isTree(to))
    return [...new Set([...Object.keys(from), ...Object.keys(to)])].flatMap((key) =>
      differences(from[key], to[key], [...at, key]),
    )
  return Object.is(from, to) ? [] : [{ at, from, to }]
}

type Version = Readonly<{ data: unknown; source: string; label: string }>

/** Between two whole versions: their data, and what they rest on. */
export const versionDifferences = (from: Version, to: Version): Difference[] =>
  differences(from.data, to.data).concat(
    differences({ label: from.label, source: from.source }, { label: to.label, source: to.source }),
  )
