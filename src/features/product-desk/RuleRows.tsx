import type { ReactNode } from 'react'
import { flushSync } from 'react-dom'
import { useTranslation } from 'react-i18next'
import { Button } from '../../ui/Button.tsx'
import { RuleCell } from './RuleCell.tsx'
import { useEditing } from './rule-editing.ts'
import { RulePart, type PartProps } from './RuleEditor.tsx'
import { controlId, isLeaf, typedOf, type Leaf, type Path, type Shape, type Typed } from './rule-shape.ts'
import { unitOf } from './rule-words.ts'

type ListShape = Extract<Shape, { kind: 'list' }>

/** Columns of a row made of single values only. */
function columnsOf(row: Shape): [key: string | number, shape: Leaf][] | null {
  const entries: [string | number, Shape][] =
    row.kind === 'tuple'
      ? row.of.map((one, index) => [index, one])
      : row.kind === 'group'
        ? Object.entries(row.of)
        : isLeaf(row)
          ? [['', row]]
          : []
  const leaves = entries.flatMap(([key, shape]): [string | number, Leaf][] => (isLeaf(shape) ? [[key, shape]] : []))
  return leaves.length > 0 && leaves.length === entries.length ? leaves : null
}

const firstControl = (path: Path, row: Shape): string => {
  const [key] = columnsOf(row)?.[0] ?? []
  return controlId(key === undefined || key === '' ? path : [...path, key])
}

/** Rows that come and go. Rows of plain numbers stand as a grid; rows with words of their own as blocks, so that a source has the width it needs. */
export function RuleRows({ shape, typed, path }: PartProps<ListShape>) {
  const { t } = useTranslation('product-desk')
  const { change, faults } = useEditing()
  const rows = Array.isArray(typed) ? typed : []
  const columns = columnsOf(shape.of)
  const plain = columns?.every(([, { kind }]) => kind !== 'text') ?? false
  const addId = `${controlId(path)}-add`
  const fault = faults.get(path.join('.'))

  const alter = (next: (rows: Typed[]) => Typed[], focus: () => string) => {
    // The row has to stand there before it can take the focus.
    flushSync(() => {
      change(path, (old) => next(Array.isArray(old) ? old : []))
    })
    document.getElementById(focus())?.focus()
  }
  const add = (at: number) => {
    alter(
      (old) => [...old.slice(0, at), typedOf(shape.of, undefined), ...old.slice(at)],
      () => firstControl([...path, at], shape.of),
    )
  }
  const remove = (at: number) => {
    alter(
      (old) => old.filter((_, index) => index !== at),
      () => (at < rows.length - 1 ? firstControl([...path, at], shape.of) : addId),
    )
  }
  const buttons = (index: number) => (
    <span className="flex justify-end gap-1.5">
      <Button kind="plain" small aria-label={t('rules.insertAfter', { n: index + 1 })} onClick={() => add(index + 1)}>
        <span aria-hidden>+</span>
      </Button>
      <Button kind="plain" small aria-label={t('rules.remove', { n: index + 1 })} onClick={() => remove(index)}>
        <span aria-hidden>−</span>
      </Button>
    </span>
  )

  return (
    <div id={controlId(path)} tabIndex={-1}>
      {fault !== undefined && (
        <p className="mb-2 border-s-[3px] border-own ps-2 text-sm font-[650] text-own">{fault}</p>
      )}
      {plain && columns ? (
        <NumberGrid columns={columns} rows={rows} path={path} buttons={buttons} />
      ) : (
        <RowBlocks row={shape.of} rows={rows} path={path} buttons={buttons} />
      )}
      <Button id={addId} kind="plain" small className="mt-3" onClick={() => add(rows.length)}>
        {t('rules.addRow')}
      </Button>
    </div>
  )
}

interface RowsProps {
  rows: readonly Typed[]
  path: Path
  buttons: (index: number) => ReactNode
}

const cellOf = (row: Typed, key: string | number): Typed =>
  key === '' ? row : typeof row === 'object' ? ((row as Record<string | number, Typed>)[key] ?? '') : ''

function NumberGrid({ columns, rows, path, buttons }: RowsProps & { columns: [string | number, Leaf][] }) {
  const { t } = useTranslation('product-desk')
  const { words } = useEditing()
  const list = path.findLast((part) => typeof part === 'string') ?? ''
  const head = (key: string | number) =>
    typeof key === 'number' ? words.column(list, key) : key === '' ? words.word(list) : words.word(key)
  const few = columns.length <= 3
  return (
    // A wide grid scrolls by itself, so that the page does not; the keyboard can reach it.
    <div role="group" aria-label={words.word(list)} tabIndex={few ? undefined : 0} className="relative overflow-x-auto">
      <table className={`border-collapse text-sm ${few ? 'w-full max-w-[34rem]' : 'min-w-full'}`}>
        <thead>
          <tr className="border-b border-ink text-xs text-soft">
            <th scope="col" className="w-8 py-1 pe-2 text-end align-bottom font-[650]">
              <span className="sr-only">{t('rules.rowHead')}</span>
            </th>
            {columns.map(([key]) => (
              <th key={key} scope="col" className="px-1 py-1 text-end align-bottom font-[650]">
                {head(key)}
                {typeof key === 'string' && unitOf(key) !== null && (
                  <span className="font-normal whitespace-nowrap">, {unitOf(key)}</span>
                )}
              </th>
            ))}
            <th scope="col" className="w-20">
              <span className="sr-only">{t('rules.rowButtons')}</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row, index) => (
            // Rows hold no state of their own: all that is typed stands in the tree.
            <tr key={index} className="border-b border-line align-top">
              <th scope="row" className="pt-3 pe-2 text-end text-xs font-normal text-soft">
                {index + 1}
              </th>
              {columns.map(([key, shape]) => (
                <td key={key} className={`px-1 py-1 ${few ? '' : 'min-w-28'}`}>
                  <RuleCell
                    shape={shape}
                    typed={cellOf(row, key)}
                    path={key === '' ? [...path, index] : [...path, index, key]}
                    name={t('rules.cellName', { n: index + 1, column: head(key) })}
                  />
                </td>
              ))}
              <td className="py-1 ps-2">{buttons(index)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}

function RowBlocks({ row, rows, path, buttons }: RowsProps & { row: Shape }) {
  const { t } = useTranslation('product-desk')
  return (
    <ol className="border-t border-ink">
      {rows.map((one, index) => (
        <li key={index} className="relative border-b border-line py-3">
          <div className="flex items-start gap-3">
            <fieldset className="min-w-0 flex-1">
              <legend className="float-start me-3 w-7 pt-7 text-end text-xs text-soft max-sm:min-h-9 max-sm:w-auto max-sm:pt-1.5">
                <span className="sr-only">{t('rules.rowHead')} </span>
                {index + 1}
              </legend>
              <div className="flow-root min-w-0 max-sm:clear-both">
                <RulePart shape={row} typed={one} path={[...path, index]} unit={null} />
              </div>
            </fieldset>
            <div className="flex-none pt-6 max-sm:absolute max-sm:end-0 max-sm:top-2 max-sm:pt-0">{buttons(index)}</div>
          </div>
        </li>
      ))}
    </ol>
  )
}
