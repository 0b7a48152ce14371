/**
 * The rider's answers. All of them but the body mass travel in the address, so that reload, back and a shared link keep them;
 * the mass stays in this window (session storage) and goes nowhere but into the call for advice.
 */
import { queryOptions, useQuery } from '@tanstack/react-query'
import { useCallback, useMemo, useSyncExternalStore } from 'react'
import { useSearchParams } from 'react-router-dom'
import { advice, riderAnswers, type Advice, type RiderAnswers } from '#contract/advisor.ts'
import { api } from './api.ts'

export type Mass = { bodyMassKg: number } | { bodyMassBandKg: { from: number; to: number } }
/** What was answered so far; anything may still be open. `tyre: null` is "I don't know". */
export type Draft = Partial<Omit<RiderAnswers, 'bodyMassKg' | 'bodyMassBandKg'>>

const DRAFT_KEY = 'felloe.fitting'
const MASS_KEY = 'felloe.mass'

type Kind = 'word' | 'number' | 'yes'
/** Short names in the address, the field they stand for, and how to read them. */
const inAddress: readonly [short: string, path: string, kind: Kind][] = [
  ['ride', 'ride', 'word'],
  ['brakes', 'brakes', 'word'],
  ['front', 'tyre.frontWidthMm', 'number'],
  ['rear', 'tyre.rearWidthMm', 'number'],
  ['setup', 'tyre.setup', 'word'],
  ['measured', 'tyre.measured', 'yes'],
  ['tyreMax', 'tyre.maxBar', 'number'],
  ['hooklessTyre', 'tyre.hooklessApproved', 'yes'],
  ['seat', 'rim.seat', 'word'],
  ['inner', 'rim.innerWidthMm', 'number'],
  ['rimMax', 'rim.maxBar', 'number'],
  ['size', 'beadSeatMm', 'number'],
  ['riders', 'ridersOnBike', 'number'],
  ['assist', 'assist', 'word'],
  ['kit', 'kitMassKg', 'number'],
  ['bike', 'bikeMassKg', 'number'],
  ['bags', 'luggageKg', 'number'],
  ['bagsAt', 'luggagePlace', 'word'],
  ['position', 'position', 'word'],
  ['surface', 'surface', 'word'],
  ['terrain', 'terrain', 'word'],
  ['wind', 'wind', 'word'],
  ['confidence', 'confidence', 'word'],
  ['speed', 'flatSpeedKmh', 'number'],
  ['share', 'frontLoadShare', 'number'],
  ['frontAxle', 'bike.frontAxle', 'word'],
  ['rearAxle', 'bike.rearAxle', 'word'],
  ['freehub', 'bike.freehub', 'word'],
  ['rotor', 'bike.rotorMount', 'word'],
  ['frameTyre', 'bike.maxTyreMm', 'number'],
  ['caliper', 'bike.caliperOpeningMm', 'number'],
]

type Tree = Record<string, unknown>

export function readDraft(params: URLSearchParams): Draft {
  const draft: Tree = {}
  for (const [short, path, kind] of inAddress) {
    const text = params.get(short)
    if (text === null || text === '') continue
    const value = kind === 'number' ? Number(text) : kind === 'yes' ? text === 'yes' : text
    if (typeof value === 'number' && !Number.isFinite(value)) continue
    put(draft, path, value)
  }
  if (params.get('tyre') === 'unknown') draft.tyre = null
  return checked(draft)
}

/** An address may hold anything: what the contract does not take is left out, and the question is open again. */
function checked(draft: Tree): Draft {
  const shape = riderAnswers.shape as Record<
    string,
    { safeParse: (value: unknown) => { success: boolean; data?: unknown } }
  >
  return Object.fromEntries(
    Object.entries(draft).flatMap(([name, value]) => {
      const one = shape[name]?.safeParse(value)
      return one?.success ? [[name, one.data]] : []
    }),
  )
}

function put(tree: Tree, path: string, value: unknown) {
  const [head = '', tail] = path.split('.')
  if (tail === undefined) tree[head] = value
  else tree[head] = { ...(tree[head] as Tree | undefined), [tail]: value }
}

function take(tree: Tree, path: string): unknown {
  const [head = '', tail] = path.split('.')
  const branch = tree[head]
  return tail === undefined
    ? branch
    : typeof branch === 'object' && branch !== null
      ? (branch as Tree)[tail]
      : undefined
}

/** @param into parameters to keep beside the answers (step, units, language) */
export function writeDraft(draft: Draft, into = new URLSearchParams()): URLSearchParams {
  const params = new URLSearchParams(into)
  for (const [short, path] of inAddress) {
    const value = take(draft, path)
    if (typeof value === 'boolean') params.set(short, value ? 'yes' : 'no')
    else if (typeof value === 'string' || typeof value === 'number') params.set(short, String(value))
    else params.delete(short)
  }
  if (draft.tyre === null) params.set('tyre', 'unknown')
  else params.delete('tyre')
  return params
}

/** The whole set of answers, once it is whole; null while one of the four first ones is open. */
export function completeAnswers(draft: Draft, mass: Mass | null): RiderAnswers | null {
  if (!mass) return null
  const whole = riderAnswers.safeParse({ ...draft, ...mass })
  return whole.success ? whole.data : null
}

const listeners = new Set<() => void>()
const read = (key: string) => {
  try {
    return sessionStorage.getItem(key)
  } catch {
    return memory.get(key) ?? null
  }
}
const memory = new Map<string, string>()
const keep = (key: string, value: string | null) => {
  if (value === null) memory.delete(key)
  else memory.set(key, value)
  try {
    if (value === null) sessionStorage.removeItem(key)
    else sessionStorage.setItem(key, value)
  } catch {
    // Storage refused: memory holds it for this page load.
  }
  for (const tell of listeners) tell()
}
const subscribe = (tell: () => void) => {
  listeners.add(tell)
  return () => listeners.delete(tell)
}
const useKept = (key: string) => useSyncExternalStore(subscribe, () => read(key))

export function useMass(): [Mass | null, (mass: Mass | null) => void] {
  const text = useKept(MASS_KEY)
  const mass = useMemo(() => (text === null ? null : (JSON.parse(text) as Mass)), [text])
  const set = useCallback((next: Mass | null) => {
    keep(MASS_KEY, next === null ? null : JSON.stringify(next))
  }, [])
  return [mass, set]
}

/** Draft and mass of the page's own address; changes go to the address (replacing, so that Back leaves the fitting in one step). */
export function useFitting() {
  const [params, setParams] = useSearchParams()
  const [mass, setMass] = useMass()
  const text = params.toString()
  const draft = useMemo(() => readDraft(new URLSearchParams(text)), [text])
  const setDraft = useCallback(
    (change: Draft, move?: Record<string, string>) => {
      setParams(
        (before) => {
          const next = { ...readDraft(before), ...change }
          const written = writeDraft(next, before)
          for (const [name, value] of Object.entries(move ?? {})) written.set(name, value)
          keep(DRAFT_KEY, writeDraft(next).toString())
          return written
        },
        { replace: move === undefined, preventScrollReset: true },
      )
    },
    [setParams],
  )
  const answers = useMemo(() => completeAnswers(draft, mass), [draft, mass])
  return { draft, setDraft, mass, setMass, answers, params }
}

/** The answers of the last fitting in this window, wherever the visitor is now. */
export function useKeptFitting(): { address: string; answers: RiderAnswers | null } {
  const text = useKept(DRAFT_KEY) ?? ''
  const [mass] = useMass()
  return useMemo(
    () => ({ address: text, answers: completeAnswers(readDraft(new URLSearchParams(text)), mass) }),
    [text, mass],
  )
}

export function rememberFitting(draft: Draft) {
  keep(DRAFT_KEY, writeDraft(draft).toString())
}

export const adviceQuery = (answers: RiderAnswers) =>
  queryOptions({
    queryKey: ['advisor', 'advice', answers],
    queryFn: ({ signal }) => api.post('/api/advice', answers, advice, { signal }),
    staleTime: 5 * 60_000,
  })

export type WheelsetVerdict = Advice['wheelsets'][number]

/** What the last fitting says of each wheelset, by sku; null before a fitting or while it is worked out. */
export function useFittingVerdicts(): Map<string, WheelsetVerdict> | null {
  const { answers } = useKeptFitting()
  const { data } = useQuery({ ...adviceQuery(answers as RiderAnswers), enabled: answers !== null })
  return useMemo(() => (data && answers ? new Map(data.wheelsets.map((one) => [one.sku, one])) : null), [data, answers])
}
