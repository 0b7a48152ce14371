/** `application/x-www-form-urlencoded` with brackets, as the SDK writes it: `line_items[0][price_data][unit_amount]=129900`. */

export type Form = { [key: string]: string | Form }

/** @throws RangeError for names whose brackets do not close */
export function readForm(body: string): Form {
  const form: Form = {}
  for (const [name, value] of new URLSearchParams(body)) {
    const head = /^[^[\]]+/.exec(name)?.[0]
    const rest = head === undefined ? name : name.slice(head.length)
    if (head === undefined || !/^(\[[^[\]]*\])*$/.test(rest)) throw new RangeError(name)
    const path = [head, ...[...rest.matchAll(/\[([^[\]]*)\]/g)].map(([, part]) => part ?? '')]
    if (path.some((part) => part === '__proto__' || part === 'constructor' || part === 'prototype'))
      throw new RangeError(name)
    put(form, path, value)
  }
  return form
}

function put(form: Form, path: readonly string[], value: string) {
  let branch = form
  for (const part of path.slice(0, -1)) {
    const next = branch[part]
    branch = branch[part] = typeof next === 'object' ? next : {}
  }
  const last = path.at(-1) ?? ''
  branch[last === '' ? String(Object.keys(branch).length) : last] = value
}

export const formAt = (form: Form | string | undefined, ...path: string[]): Form | string | undefined =>
  path.reduce<Form | string | undefined>(
    (branch, part) => (typeof branch === 'object' ? branch[part] : undefined),
    form,
  )
export const textAt = (form: Form, ...path: string[]): string | null => {
  const value = formAt(form, ...path)
  return typeof value === 'string' && value !== '' ? value : null
}
export const listAt = (form: Form, ...path: string[]): (Form | string)[] => {
  const value = formAt(form, ...path)
  return typeof value === 'object' ? Object.values(value) : []
}
export const wordsAt = (form: Form, ...path: string[]): Record<string, string> => {
  const value = formAt(form, ...path)
  return typeof value === 'object'
    ? Object.fromEntries(
        Object.entries(value).flatMap(([key, word]) => (typeof word === 'string' ? [[key, word]] : [])),
      )
    : {}
}
