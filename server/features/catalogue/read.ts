/**
 * The range as it stands now: every wheelset with its parts, the limit and the prices in force, its words, what can still be sold.
 * Two statements however many wheelsets there are, and no cache: a lowered limit counts from the next call on.
 */
import { QueryTypes, type Transaction } from 'sequelize'
import type { Wheelset, WheelFactsView } from '#contract/catalogue.ts'
import type { Locale } from '#contract/common.ts'
import type { WheelStrength } from '#core/rider-limits.ts'
import type { Deps } from '../../deps.ts'

/** What the shop knows of a wheelset beyond what riders see. */
export interface StoredWheelset extends Omit<Wheelset, 'front' | 'rear'> {
  id: number
  version: number
  onSale: boolean
  front: StoredWheel
  rear: StoredWheel
}
export type StoredWheel = WheelFactsView & { strength: WheelStrength | null }

interface WheelRow {
  id: number
  version: number
  onSale: number
  sku: string
  slug: string
  name: string
  brake: 'rim' | 'disc'
  beadSeatMm: number
  rides: Wheelset['rides']
  useCondition: number
  assistRated: number
  buildKind: 'shelf' | 'bench'
  limitKg: number
  limitProof: string
  available: number | null
  tagline: string
  description: string
  position: 'front' | 'rear'
  wheel: Wheelset['front']
}

const WHEELS = `
  SELECT w.id, w.version, w.on_sale AS onSale, w.sku, w.slug, w.name, w.brake, w.bead_seat_mm AS beadSeatMm, w.rides,
    w.use_condition AS useCondition, w.assist_rated AS assistRated, w.build_kind AS buildKind,
    l.limit_kg AS limitKg, l.proof AS limitProof, CAST(st.on_hand AS SIGNED) - CAST(st.reserved AS SIGNED) AS available,
    COALESCE(x.tagline, en.tagline, '') AS tagline, COALESCE(x.description, en.description, '') AS description,
    ww.position, r.name AS rimName, h.name AS hubName, s.name AS spokeName, r.material, r.depth_mm AS depthMm,
    r.inner_width_mm AS innerWidthMm, r.outer_width_mm AS outerWidthMm, r.seat, r.max_pressure_bar AS maxPressureBar,
    r.tyre_min_mm AS tyreMinMm, r.tyre_max_mm AS tyreMaxMm, ww.spoke_count AS spokeCount, ww.crosses_left AS crossesLeft,
    ww.crosses_right AS crossesRight, ww.tension_tight_n AS tensionTightN, h.pcd_left_mm AS pcdLeftMm, h.pcd_right_mm AS pcdRightMm,
    h.flange_left_mm AS flangeLeftMm, h.flange_right_mm AS flangeRightMm, h.axles, h.freehubs, h.rotor_mount AS rotorMount, ww.mass_g AS massG,
    h.max_axle_load_kg AS maxAxleLoadKg, ww.strength
  FROM wheelsets w
  JOIN wheelset_wheels ww ON ww.wheelset_id = w.id
  JOIN rims r ON r.id = ww.rim_id
  JOIN hubs h ON h.id = ww.hub_id
  JOIN spokes s ON s.id = ww.spoke_id
  -- Without a limit in force a wheelset cannot be sold, so an inner join.
  JOIN limit_versions l ON l.id = (
    SELECT v.id FROM limit_versions v
    WHERE v.wheelset_id = w.id AND v.state IN ('seconded', 'in-force') AND v.in_force_from <= :now
    ORDER BY v.in_force_from DESC, v.id DESC LIMIT 1)
  LEFT JOIN stock st ON st.wheelset_id = w.id
  LEFT JOIN wheelset_texts x ON x.wheelset_id = w.id AND x.locale = :locale
  LEFT JOIN wheelset_texts en ON en.wheelset_id = w.id AND en.locale = 'en'
  WHERE (:everything OR w.on_sale)
  ORDER BY w.slug, ww.position`

const PRICES = `
  SELECT p.wheelset_id AS wheelsetId, p.currency, p.price_cents AS priceCents FROM prices p
  WHERE p.valid_from <= :now AND NOT EXISTS (
    SELECT 1 FROM prices q WHERE q.wheelset_id = p.wheelset_id AND q.currency = p.currency AND q.valid_from <= :now
      AND (q.valid_from > p.valid_from OR (q.valid_from = p.valid_from AND q.id > p.id)))`

/**
 * @param everything also what is off sale (product desk)
 * @param transaction reads on its connection: inside a transaction a second connection might never come free
 */
export async function readCatalogue(
  { db, clock }: Pick<Deps, 'db' | 'clock'>,
  locale: Locale,
  everything = false,
  transaction?: Transaction,
): Promise<StoredWheelset[]> {
  const replacements = { now: clock(), locale, everything }
  const inside = transaction ? { transaction } : {}
  const rows = await db.query<WheelRow & Record<string, unknown>>(WHEELS, {
    replacements,
    type: QueryTypes.SELECT,
    ...inside,
  })
  const prices = await db.query<{ wheelsetId: number; currency: 'EUR' | 'GBP' | 'USD'; priceCents: number }>(PRICES, {
    replacements,
    type: QueryTypes.SELECT,
    ...inside,
  })
  const sets = new Map<number, StoredWheelset>()
  for (const row of rows) {
    const set = sets.get(row.id) ?? emptySet(row)
    set[row.position] = wheelOf(row)
    sets.set(row.id, set)
  }
  for (const { wheelsetId, currency, priceCents } of prices) {
    const set = sets.get(wheelsetId)
    if (set) set.prices[currency] = priceCents
  }
  // Both wheels or nothing: half a pair is not on offer.
  return [...sets.values()]
    .filter((set) => (set.front as unknown) !== undefined && (set.rear as unknown) !== undefined)
    .map((set) => ({ ...set, massG: set.front.massG + set.rear.massG }))
}

function emptySet(row: WheelRow): StoredWheelset {
  const {
    id,
    version,
    sku,
    slug,
    name,
    brake,
    beadSeatMm,
    rides,
    useCondition,
    buildKind,
    limitKg,
    limitProof,
    tagline,
    description,
  } = row
  return {
    id,
    version,
    onSale: Boolean(row.onSale),
    sku,
    slug,
    name,
    tagline,
    description,
    brake,
    beadSeatMm,
    rides,
    useCondition,
    assistRated: Boolean(row.assistRated),
    buildKind,
    limitKg,
    limitProof,
    massG: 0,
    prices: {},
    available: Math.max(0, row.available ?? 0),
    // Filled by the two rows that follow; a set that lacks one is dropped.
    front: undefined as never,
    rear: undefined as never,
  }
}

const wheelFields = [
  'position', 'rimName', 'hubName', 'spokeName', 'material', 'depthMm', 'innerWidthMm', 'outerWidthMm', 'seat', 'maxPressureBar',
  'tyreMinMm', 'tyreMaxMm', 'spokeCount', 'crossesLeft', 'crossesRight', 'tensionTightN', 'pcdLeftMm', 'pcdRightMm', 'flangeLeftMm',
  'flangeRightMm', 'axles', 'freehubs', 'rotorMount', 'massG', 'maxAxleLoadKg', 'strength',
] as const satisfies readonly (keyof StoredWheel)[] // prettier-ignore

const wheelOf = (row: Record<string, unknown>): StoredWheel =>
  Object.fromEntries(wheelFields.map((name) => [name, row[name]])) as unknown as StoredWheel
