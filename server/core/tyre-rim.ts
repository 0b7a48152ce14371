/** May this tyre go on this rim? Three answers, each naming the row that gave it. Widths in mm. */

export type Pairing = { verdict: 'ok' | 'check' | 'no'; code: string; leastTyreMm: number }

/**
 * @param pair widthMm: nominal tyre width; hooklessApproved: null when nobody knows
 * @param leastOnHookless smallest tyre by inner width, where a table names one; otherwise inner + 4 mm
 * @returns leastTyreMm: the narrowest tyre this rim takes
 * @source tyres reference step 12: ratio 1.4-2.25 inside both chart points of 3.8 (PRACTICE), inner + 3 and inner + 4 mm DERIVED/PRACTICE,
 *   25 mm inner: 29 mm (ETRTO 2023 as told in the trade press, PRACTICE), 23 mm inner: 28 mm (MEMORY medium)
 * @example pairTyre({ seat: 'hookless', innerWidthMm: 25, widthMm: 28, … }) // no: needs 29
 */
export function pairTyre(pair: {
  seat: 'hooked' | 'hookless'
  innerWidthMm: number
  widthMm: number
  setup: 'tubeless' | 'tube' | 'tubular'
  hooklessApproved: boolean | null
  leastOnHookless: readonly (readonly [innerMm: number, tyreMm: number])[]
}): Pairing {
  const { seat, innerWidthMm, widthMm, setup, hooklessApproved } = pair
  const ratio = widthMm / innerWidthMm
  if (setup === 'tubular') return { verdict: 'no', code: 'tubular', leastTyreMm: innerWidthMm + 3 }
  if (seat === 'hooked') {
    const leastTyreMm = innerWidthMm + 3
    if (widthMm < leastTyreMm) return { verdict: 'no', code: 'tyre-too-narrow-for-rim', leastTyreMm }
    if (ratio > 3) return { verdict: 'no', code: 'tyre-too-wide-for-rim', leastTyreMm }
    if (ratio < 1.4) return { verdict: 'check', code: 'narrow-pairing', leastTyreMm }
    return ratio > 2.25
      ? { verdict: 'check', code: 'wide-pairing', leastTyreMm }
      : { verdict: 'ok', code: 'pairing-ok', leastTyreMm }
  }
  const named = pair.leastOnHookless.find(([inner]) => inner === innerWidthMm)?.[1] ?? 0
  const leastTyreMm = Math.max(named, innerWidthMm + 4)
  if (hooklessApproved === false) return { verdict: 'no', code: 'tyre-not-for-hookless', leastTyreMm }
  if (widthMm < leastTyreMm) return { verdict: 'no', code: 'tyre-too-narrow-for-rim', leastTyreMm }
  if (setup === 'tube' && hooklessApproved !== true) return { verdict: 'no', code: 'tube-on-hookless', leastTyreMm }
  if (ratio > 3) return { verdict: 'no', code: 'tyre-too-wide-for-rim', leastTyreMm }
  if (ratio < 1.4) return { verdict: 'check', code: 'narrow-pairing', leastTyreMm }
  if (ratio > 2.25) return { verdict: 'check', code: 'wide-pairing', leastTyreMm }
  return hooklessApproved === null
    ? { verdict: 'check', code: 'confirm-hookless-tyre', leastTyreMm }
    : { verdict: 'ok', code: 'pairing-ok', leastTyreMm }
}
