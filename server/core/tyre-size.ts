/** What is printed on tyres and rims, and what follows from it: sizes, rim types, height, use condition. Lengths in mm. */

export interface Designation {
  widthMm: number | null
  innerWidthMm: number | null
  beadSeatMm: number
  type: RimType | null
}

/** Sub-types of ISO 5775-2:2021. READ (encyclopaedia article): straight side, its tubeless form, hooked bead, crochet, its tubeless form. */
export type RimType = 'SS' | 'TSS' | 'HB' | 'C' | 'TC'

/**
 * Reads a size as printed on tyre or rim: `28-622`, `622x21TC`, `25x622 TSS`, `SS 400x20`. Both orders occur; the larger number is the diameter.
 * @returns null when it is no such designation
 * @source ISO 5775 forms READ (encyclopaedia article, BS ISO 5775-2:2015); `622x21TC` MEMORY high; `25x622 TSS` PRACTICE
 * @example readDesignation('32-597 inflate to 400 kPa') // 32 mm wide on a bead seat of 597 mm
 */
export function readDesignation(text: string): Designation | null {
  const tyre = /^\s*(\d{2,3})\s*-\s*(\d{3})\b/.exec(text)
  if (tyre) return { widthMm: Number(tyre[1]), innerWidthMm: null, beadSeatMm: Number(tyre[2]), type: null }
  const rim = /^\s*(SS|TSS|HB|TC|C)?\s*(\d{2,3}(?:\.\d)?)\s*[x×]\s*(\d{2,3}(?:\.\d)?)\s*(SS|TSS|HB|TC|C)?\s*$/i.exec(
    text,
  )
  if (!rim) return null
  const [one, other] = [Number(rim[2]), Number(rim[3])]
  const type = ((rim[1] ?? rim[4])?.toUpperCase() ?? null) as RimType | null
  return { widthMm: null, innerWidthMm: Math.min(one, other), beadSeatMm: Math.max(one, other), type }
}

/**
 * Bead wall that a rim type stands for in the pairing rules.
 * @returns null where no modern folding tyre goes on: straight side without the tubeless form (rigid beads only) and hooked bead (beaded edges only)
 * @source tyres reference step 12: BS ISO 5775-2:2015 READ for straight side; five sub-types READ (encyclopaedia article)
 */
export const seatOfType = (type: RimType): 'hooked' | 'hookless' | null =>
  type === 'C' || type === 'TC' ? 'hooked' : type === 'TSS' ? 'hookless' : null

/**
 * Outside diameter: bead seat and twice the section height, which is the section width, and 2.5 mm more below 28 mm.
 * @source tyres reference 5.1, READ (encyclopaedia article on ISO 5775)
 * @example outsideDiameter(25, 622) // 677
 */
export const outsideDiameter = (widthMm: number, beadSeatMm: number) =>
  beadSeatMm + 2 * (widthMm + (widthMm < 28 ? 2.5 : 0))

/**
 * Inner width of the rim a tyre of the older labelling was measured on; for tyres of the present labelling the table `measuring-rims` counts,
 * and this rule would correct twice.
 * @source tyres reference 3.8: older ISO 5775-1 text, READ (encyclopaedia article)
 * @example olderMeasuringRim(40) // 22
 */
export const olderMeasuringRim = (widthMm: number) => (widthMm < 30 ? 0.65 : 0.55) * widthMm

/** Use condition of ASTM F2043 for an intended drop. MEMORY, second-hand, confirm against the standard. @param dropM metres */
export const useConditionForDrop = (dropM: number): 2 | 3 | 4 | 5 =>
  dropM <= 0.15 ? 2 : dropM < 0.61 ? 3 : dropM < 1.22 ? 4 : 5
