/** Looking through the range. */
import type { Wheelset, WheelsetDetail, WheelsetFilters, WheelsetList } from '#contract/catalogue.ts'
import type { Locale } from '#contract/common.ts'
import type { Deps } from '../../deps.ts'
import { badField, notFound } from '../../http/errors.ts'
import { WheelsetWheel } from '../../models/wheelset-wheel.ts'
import { readCatalogue } from './read.ts'

const PAGE = 60

const matches = (set: Wheelset, f: WheelsetFilters): boolean =>
  (f.ride === undefined || set.rides.includes(f.ride)) &&
  (f.brake === undefined || set.brake === f.brake) &&
  (f.beadSeatMm === undefined || set.beadSeatMm === f.beadSeatMm) &&
  (f.material === undefined || set.front.material === f.material || set.rear.material === f.material) &&
  (f.seat === undefined || (set.front.seat === f.seat && set.rear.seat === f.seat)) &&
  (f.depthFromMm === undefined || set.rear.depthMm >= f.depthFromMm) &&
  (f.depthToMm === undefined || set.front.depthMm <= f.depthToMm) &&
  (f.spokesFrom === undefined || set.rear.spokeCount >= f.spokesFrom) &&
  (f.limitFromKg === undefined || set.limitKg >= f.limitFromKg) &&
  (f.tyreMm === undefined ||
    [set.front, set.rear].every((w) => w.tyreMinMm <= (f.tyreMm ?? 0) && w.tyreMaxMm >= (f.tyreMm ?? 0))) &&
  (f.assist === undefined || set.assistRated) &&
  (f.inStock === undefined || set.available > 0) &&
  (f.q === undefined || plain(`${set.name} ${set.tagline} ${set.sku}`).includes(plain(f.q)))

/** Without accents and case, so that `faia` finds `Faia` and `botao` finds `botão`. */
const plain = (text: string) => text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase()

const keys: Record<NonNullable<WheelsetFilters['sort']>, (set: Wheelset, f: WheelsetFilters) => number> = {
  name: () => 0,
  price: (set, f) => set.prices[f.currency ?? 'EUR'] ?? Number.MAX_SAFE_INTEGER,
  depth: (set) => set.rear.depthMm,
  mass: (set) => set.massG,
  limit: (set) => -set.limitKg,
}

/** One page of the range, filtered and sorted; the cursor is the slug of the last one shown. */
export async function listWheelsets(deps: Deps, filters: WheelsetFilters, locale: Locale): Promise<WheelsetList> {
  const key = keys[filters.sort ?? 'name']
  const found = (await readCatalogue(deps, locale))
    .filter((set) => matches(set, filters))
    .sort(
      (a, b) =>
        key(a, filters) - key(b, filters) || a.name.localeCompare(b.name, 'en') || a.slug.localeCompare(b.slug, 'en'),
    )
  const after = filters.cursor === undefined ? 0 : found.findIndex(({ slug }) => slug === filters.cursor) + 1
  if (filters.cursor !== undefined && after === 0) throw badField('cursor', 'not-valid')
  const items = found.slice(after, after + (filters.limit ?? PAGE))
  return { items, nextCursor: after + items.length < found.length ? (items.at(-1)?.slug ?? null) : null }
}

export async function readWheelset(deps: Deps, slug: string, locale: Locale): Promise<WheelsetDetail> {
  const set = (await readCatalogue(deps, locale)).find((one) => one.slug === slug)
  if (!set) throw notFound()
  const wheels = await WheelsetWheel.findAll({
    where: { wheelsetId: set.id },
    attributes: ['position', 'structure'],
    raw: true,
  })
  const of = (position: 'front' | 'rear') => wheels.find((wheel) => wheel.position === position)?.structure ?? null
  return { ...set, structure: { front: of('front'), rear: of('rear') } }
}
