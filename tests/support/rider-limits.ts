/**
 * Rider limits in kg by spoke count 16, 20, 24, 28, 32, 36: the structural stand-in of the wheel reference, section 4.12 (DERIVED there).
 * 0 = below the trade floor or out by the broken-spoke criterion (its marks f and x).
 */
export type Design = 'road-rim' | 'road-disc' | 'gravel' | 'mountain'

const COUNTS = [16, 20, 24, 28, 32, 36]

// prettier-ignore
const ROWS: [Design, 'alloy' | 'carbon', depthMm: number, front: number[], rear: number[]][] = [
  ['road-rim', 'alloy', 18, [0, 0, 111, 121, 133, 145], [0, 0, 0, 84, 92, 100]],
  ['road-rim', 'alloy', 24, [0, 116, 131, 143, 160, 176], [0, 0, 84, 102, 112, 123]],
  ['road-rim', 'carbon', 30, [0, 119, 137, 144, 152, 168], [0, 78, 92, 92, 105, 117]],
  ['road-rim', 'carbon', 45, [122, 146, 169, 177, 187, 207], [0, 94, 112, 111, 127, 143]],
  ['road-rim', 'carbon', 60, [143, 172, 199, 208, 219, 244], [0, 110, 131, 128, 149, 168]],
  ['road-disc', 'alloy', 24, [0, 0, 111, 130, 144, 156], [0, 0, 95, 108, 121, 134]],
  ['road-disc', 'carbon', 30, [0, 92, 112, 118, 135, 151], [0, 0, 100, 105, 121, 136]],
  ['road-disc', 'carbon', 45, [0, 111, 136, 143, 166, 186], [0, 0, 121, 127, 148, 167]],
  ['road-disc', 'carbon', 60, [0, 129, 159, 167, 194, 219], [0, 0, 141, 148, 173, 196]],
  ['gravel', 'alloy', 24, [0, 0, 99, 113, 126, 140], [0, 0, 78, 90, 101, 112]],
  ['gravel', 'carbon', 30, [0, 0, 123, 130, 149, 166], [0, 0, 97, 113, 126, 139]],
  ['gravel', 'carbon', 45, [0, 0, 150, 158, 182, 205], [0, 0, 123, 140, 158, 175]],
  ['gravel', 'carbon', 60, [0, 0, 170, 184, 213, 241], [0, 0, 142, 163, 184, 204]],
  ['mountain', 'carbon', 25, [0, 0, 92, 106, 120, 132], [0, 0, 81, 95, 107, 118]],
  ['mountain', 'carbon', 30, [0, 0, 95, 110, 124, 136], [0, 0, 84, 98, 110, 121]],
  ['mountain', 'carbon', 45, [0, 0, 123, 141, 157, 173], [0, 0, 108, 124, 139, 153]],
]

/** Bike and kit in kg that 2.10 adds to the rider. */
const EXTRA_KG: Record<Design, number> = { 'road-rim': 11, 'road-disc': 11, gravel: 14, mountain: 15 }

/** Highest system mass of one wheel: the row of the next shallower rim of its kind, plus bike and kit; 0 where the table has none. */
export function tableLimitKg(
  design: Design,
  wheel: { material: 'alloy' | 'carbon'; depthMm: number; position: 'front' | 'rear'; spokeCount: number },
): number {
  const row = ROWS.filter(([d, m, depth]) => d === design && m === wheel.material && depth <= wheel.depthMm).at(-1)
  const riderKg = row?.[wheel.position === 'front' ? 3 : 4][COUNTS.indexOf(wheel.spokeCount)] ?? 0
  return riderKg === 0 ? 0 : riderKg + EXTRA_KG[design]
}

/** The designs of the table that a ride falls under. */
export function designOf(ride: string, brake: string): Design {
  if (ride === 'cross-country' || ride === 'trail') return 'mountain'
  if (ride === 'gravel' || ride === 'cyclocross' || ride === 'bikepacking') return 'gravel'
  return brake === 'rim' ? 'road-rim' : 'road-disc'
}
