import { createContext, use } from 'react'
import type { Path, Typed } from './rule-shape.ts'
import type { RuleWords } from './rule-words.ts'

export interface Editing {
  words: RuleWords
  /** Sentences by the dotted path of their cell. */
  faults: ReadonlyMap<string, string>
  change: (path: Path, change: (old: Typed) => Typed) => void
}
export const EditingContext = createContext<Editing | null>(null)

export function useEditing(): Editing {
  const editing = use(EditingContext)
  if (!editing) throw new Error('a part of the editor stands outside it')
  return editing
}
