import { useTranslation } from 'react-i18next'
import { Select, TextArea, TextInput } from '../../ui/Field.tsx'
import { useEditing } from './rule-editing.ts'
import { controlId, type Leaf, type Path, type Typed } from './rule-shape.ts'

const tight = 'min-h-10! px-2.5! py-1.5! text-[0.9375rem]!'

interface CellProps {
  shape: Leaf
  typed: Typed
  path: Path
  unit?: string | null
  /** In a grid, where the label is the head of the column. */
  name?: string
}

/** One value of a rule table: a number with its unit, words, or a choice; what is wrong with it stands below. */
export function RuleCell({ shape, typed, path, unit = null, name }: CellProps) {
  const { t } = useTranslation('product-desk')
  const { words, faults, change } = useEditing()
  const id = controlId(path)
  const fault = faults.get(path.join('.'))
  const set = (value: Typed) => {
    change(path, () => value)
  }
  const tied = {
    id,
    'aria-label': name,
    'aria-invalid': fault === undefined ? undefined : (true as const),
    'aria-describedby':
      [unit === null ? '' : `${id}-unit`, fault === undefined ? '' : `${id}-error`].filter(Boolean).join(' ') ||
      undefined,
  }
  const text = typeof typed === 'string' ? typed : ''
  return (
    <>
      {shape.kind === 'yes-no' ? (
        <input {...tied} type="checkbox" checked={typed === true} onChange={(event) => set(event.target.checked)} />
      ) : shape.kind === 'choice' ? (
        <Select {...tied} value={text} className={tight} onChange={(event) => set(event.target.value)}>
          {shape.optional && <option value="">{t('rules.nothing')}</option>}
          {shape.choices.map((choice) => (
            <option key={choice} value={choice}>
              {words.value(path.at(-1), choice)}
            </option>
          ))}
        </Select>
      ) : shape.kind === 'text' && path.at(-1) === 'source' ? (
        <TextArea
          {...tied}
          rows={2}
          value={text}
          className={`${tight} field-sizing-content`}
          onChange={(event) => set(event.target.value)}
        />
      ) : (
        <span className="flex items-center gap-1.5">
          <TextInput
            {...tied}
            value={text}
            inputMode={shape.kind === 'number' ? 'decimal' : 'text'}
            autoComplete="off"
            spellCheck={false}
            className={`${tight} min-w-0 flex-1 ${shape.kind === 'number' ? 'text-end tabular-nums' : ''}`}
            onChange={(event) => set(event.target.value)}
          />
          {unit !== null && (
            <span id={`${id}-unit`} className="flex-none text-sm text-soft">
              {unit}
            </span>
          )}
        </span>
      )}
      {fault !== undefined && (
        <p id={`${id}-error`} className="mt-1 border-s-[3px] border-own ps-2 text-xs font-[650] text-own">
          {fault}
        </p>
      )}
    </>
  )
}
