/** Expected failures. In: a code that locales/<lng>/errors.json puts into words, a status, data for the sentence. */
export class AppError extends Error {
  readonly code: string
  readonly status: number
  readonly data: Record<string, unknown>
  readonly fields: FieldError[] | undefined
  constructor(code: string, status: number, data: Record<string, unknown> = {}, fields?: FieldError[]) {
    super(code)
    this.code = code
    this.status = status
    this.data = data
    this.fields = fields
  }
}

/** A bad field: its dotted path and a code from errors.json `field.*`. */
export interface FieldError {
  path: string
  code: string
  data?: Record<string, unknown>
  /** Where it stands in a table, said before the fault. */
  cell?: { row: string; column: string }
}

export const notFound = () => new AppError('not-found', 404)
export const badField = (path: string, code: string, data: Record<string, unknown> = {}) =>
  new AppError('validation', 400, {}, [{ path, code, data }])
