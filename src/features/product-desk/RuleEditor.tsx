import type { ReactNode } from 'react'
import { useTranslation } from 'react-i18next'
import { EditingContext, useEditing, type Editing } from './rule-editing.ts'
import { RuleCell } from './RuleCell.tsx'
import { RuleRows } from './RuleRows.tsx'
import { controlId, isLeaf, type Leaf, type Path, type Shape, type Typed } from './rule-shape.ts'
import { unitOf } from './rule-words.ts'

/** Any rule table as fields: values of its own side by side, groups under their word, lists as rows. Knows shapes, not tables. */
export function RuleEditor({ shape, typed, ...editing }: Editing & { shape: Shape; typed: Typed }) {
  return (
    <EditingContext value={editing}>
      <RulePart shape={shape} typed={typed} path={[]} unit={null} />
    </EditingContext>
  )
}

export interface PartProps<S extends Shape = Shape> {
  shape: S
  typed: Typed
  path: Path
  /** Of the group's own name, where the names inside have none: `bikeMassKg` over `gravel`. */
  unit: string | null
}

export function RulePart({ shape, typed, path, unit }: PartProps) {
  if (isLeaf(shape)) return <RuleField shape={shape} typed={typed} path={path} unit={unit} />
  if (shape.kind === 'list') return <RuleRows shape={shape} typed={typed} path={path} unit={unit} />
  if (shape.kind === 'tuple') return <Tuple shape={shape} typed={typed} path={path} unit={unit} />
  return <Group shape={shape} typed={typed} path={path} unit={unit} />
}

const inside = (typed: Typed, key: string | number): Typed =>
  typeof typed === 'object' ? ((typed as Record<string | number, Typed>)[key] ?? '') : ''

/** A source needs the whole line. */
const isWide = (key: string, { kind }: Leaf) => kind === 'text' && key === 'source'

function Group({ shape, typed, path, unit }: PartProps<Extract<Shape, { kind: 'group' }>>) {
  const { words } = useEditing()
  const entries = Object.entries(shape.of)
  // What needs the whole line comes last, so that the rest stands on one.
  const leaves = entries
    .flatMap(([key, one]) => (isLeaf(one) ? [[key, one] as const] : []))
    .sort(([a, one], [b, other]) => Number(isWide(a, one)) - Number(isWide(b, other)))
  const rest = entries.filter(([, one]) => !isLeaf(one))
  return (
    <div className="grid grid-cols-1 gap-6">
      {leaves.length > 0 && (
        <div className="grid grid-cols-[repeat(auto-fill,minmax(min(11.5rem,100%),1fr))] items-end gap-x-5 gap-y-3">
          {leaves.map(([key, one]) => (
            <div key={key} className={isWide(key, one) ? 'col-span-full' : ''}>
              <RuleField shape={one} typed={inside(typed, key)} path={[...path, key]} unit={unitOf(key) ?? unit} />
            </div>
          ))}
        </div>
      )}
      {rest.map(([key, one]) => (
        <Section key={key} title={words.word(key)} deep={path.length > 0} plain={entries.length === 1}>
          <RulePart shape={one} typed={inside(typed, key)} path={[...path, key]} unit={unitOf(key) ?? unit} />
        </Section>
      ))}
    </div>
  )
}

function Section({
  title,
  deep,
  plain,
  children,
}: {
  title: string
  deep: boolean
  plain: boolean
  children: ReactNode
}) {
  return (
    <fieldset className={`min-w-0 ${deep && !plain ? 'border-s border-line ps-4' : ''}`}>
      <legend className={`mb-2 font-bold ${deep ? 'text-sm' : 'text-[0.9375rem]'}`}>{title}</legend>
      {children}
    </fieldset>
  )
}

function Tuple({ shape, typed, path, unit }: PartProps<Extract<Shape, { kind: 'tuple' }>>) {
  return (
    <div className="grid grid-cols-[repeat(auto-fill,minmax(7.5rem,1fr))] items-end gap-x-4 gap-y-3">
      {shape.of.map((one, index) => (
        // A tuple's places are fixed, so their numbers name them.
        <RulePart key={index} shape={one} typed={inside(typed, index)} path={[...path, index]} unit={unit} />
      ))}
    </div>
  )
}

/** One value with its label above it. */
export function RuleField({ shape, typed, path, unit }: PartProps<Leaf>) {
  const { t } = useTranslation('product-desk')
  const { words } = useEditing()
  const key = path.at(-1) ?? ''
  const list = path.findLast((part) => typeof part === 'string') ?? ''
  return (
    <div className="min-w-0">
      <label htmlFor={controlId(path)} className="mb-1 block text-sm leading-tight font-[650]">
        {typeof key === 'number' ? words.column(list, key) : words.word(key)}
        {shape.optional && <span className="font-normal text-soft"> {t('rules.optional')}</span>}
      </label>
      <RuleCell shape={shape} typed={typed} path={path} unit={unit} />
    </div>
  )
}
