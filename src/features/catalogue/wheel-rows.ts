/** What a wheel's facts are called and how they read; the specification and the side-by-side table share it. */
import { useMemo } from 'react'
import { useTranslation } from 'react-i18next'
import type { Wheelset, WheelFactsView } from '#contract/catalogue.ts'
import { useFormat } from '../../lib/format.ts'

export interface WheelRow {
  id: string
  label: string
  of: (wheel: WheelFactsView) => string
}

/** Words for facts of one wheel, in the visitor's language and units. Maxima are rounded down, minima up. */
export function useWheelRows() {
  const { t } = useTranslation(['catalogue', 'account'])
  const format = useFormat()
  return useMemo(() => {
    const crosses = (count: number) => (count === 0 ? t('value.radial') : t('value.cross', { count }))
    const lacing = ({ crossesLeft, crossesRight }: WheelFactsView) =>
      crossesLeft === crossesRight
        ? crosses(crossesLeft)
        : t('value.sides', { left: crosses(crossesLeft), right: crosses(crossesRight) })
    /** Names of axles, gear bodies and rotor mounts, as the bike's own facts are called. */
    const part = (code: string) => t(`account:bike.values.${code}`)
    const parts = (codes: readonly string[]) => (codes.length === 0 ? t('value.none') : codes.map(part).join('; '))
    const tyres = ({ tyreMinMm, tyreMaxMm }: WheelFactsView) =>
      t('value.span', { from: format.width(tyreMinMm, 'up').text, to: format.width(tyreMaxMm, 'down').text })
    const row = (id: string, of: WheelRow['of']): WheelRow => ({ id, label: t(`row.${id}`), of })
    const rows = [
      row('material', ({ material }) => t(`value.${material}`)),
      row('depth', ({ depthMm }) => format.depth(depthMm).text),
      row('inner', ({ innerWidthMm }) => format.width(innerWidthMm).text),
      row('outer', ({ outerWidthMm }) => format.width(outerWidthMm).text),
      row('seat', ({ seat }) => t(`value.${seat}`)),
      row('maxPressure', ({ maxPressureBar }) => format.pressure(maxPressureBar, 'down').text),
      row('tyres', tyres),
      row('spokes', ({ spokeCount }) => format.number(spokeCount)),
      row('spoke', ({ spokeName }) => spokeName),
      row('lacing', lacing),
      row('tension', ({ tensionTightN }) => `${format.number(tensionTightN)}\u00a0N`),
      row('hub', ({ hubName }) => hubName),
      row('axles', ({ axles }) => parts(axles)),
      row('freehubs', ({ position, freehubs }) => (position === 'front' ? '' : parts(freehubs))),
      row('rotor', ({ rotorMount }) => (rotorMount === null ? t('value.none') : part(rotorMount))),
      row('mass', ({ massG }) => format.grams(massG)),
    ]
    return { rows, lacing, part, tyres }
  }, [t, format])
}

/** One value where both wheels share it, else both, front first. An empty one belongs to no wheel and is passed over. */
export const bothOf = (front: string, rear: string, pair: (values: { front: string; rear: string }) => string) =>
  front === rear || front === '' ? rear : rear === '' ? front : pair({ front, rear })

export const shortPair = (front: number, rear: number) => (front === rear ? String(rear) : `${front}/${rear}`)

export const stockWord = ({ available, buildKind }: Pick<Wheelset, 'available' | 'buildKind'>) =>
  available === 0
    ? 'none'
    : buildKind === 'bench'
      ? 'bench'
      : available === 1
        ? 'last'
        : available < 4
          ? 'few'
          : 'shelf'
