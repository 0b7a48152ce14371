/** Ready-to-ride total against a stated limit. Over is an answer, not an error; nothing is rounded, so no rounding turns a refusal into a pass. */

export type LimitVerdict = 'fits' | 'no-margin' | 'over-limit'

/**
 * @param totalKg rider, kit, bike and bags; limitKg the stated system limit, > 0
 * @param noMarginFrom part of the limit from which there is no margin, 0.95
 * @returns marginKg negative when over
 * @throws RangeError when the limit is not positive
 * @source F02; a limit counts everything on the bike (PRACTICE), ISO 4210-2 clause 5 h READ via TBIS 4210-3
 */
export function checkLimit(
  totalKg: number,
  limitKg: number,
  noMarginFrom = 0.95,
): { verdict: LimitVerdict; marginKg: number } {
  if (!(limitKg > 0 && totalKg > 0)) throw new RangeError('checkLimit: out of range')
  const marginKg = limitKg - totalKg
  return { verdict: marginKg < 0 ? 'over-limit' : totalKg >= noMarginFrom * limitKg ? 'no-margin' : 'fits', marginKg }
}
