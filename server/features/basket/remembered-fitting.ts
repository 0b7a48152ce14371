/** The fitting that a basket remembers for lines that name none. */
import { badField } from '../../http/errors.ts'
import { AdviceSnapshot } from '../../models/advice-snapshot.ts'

/**
 * @param ids the lines' own fittings, null where a line has none
 * @returns of several the heaviest ready-to-ride total, so that a line without one is held to the strictest; null where none was named
 * @throws AppError naming the line whose fitting is not known
 */
export async function strictestFitting(ids: readonly (string | null)[]): Promise<string | null> {
  const named = [...new Set(ids.filter((id) => id !== null))]
  if (named.length === 0) return null
  const found = await AdviceSnapshot.findAll({ where: { id: named }, raw: true })
  const totalKg = new Map(found.map(({ id, advice }) => [id, Number(advice.systemMassKg)]))
  const unknown = ids.findIndex((id) => id !== null && !totalKg.has(id))
  if (unknown !== -1) throw badField(`lines.${unknown}.adviceId`, 'no-such-fitting')
  return named.reduce((a, b) => ((totalKg.get(b) ?? 0) > (totalKg.get(a) ?? 0) ? b : a))
}
