import { useTranslation } from 'react-i18next'
import type { Wheelset, WheelFactsView } from '#contract/catalogue.ts'
import { useFormat } from '../../lib/format.ts'
import { RimSection } from '../../ui/RimSection.tsx'
import { useWheelRows } from './wheel-rows.ts'

/** The rim cut across with its widths, and the pressure it may see. Two sections where the wheels differ. */
export function RimPanel({ set }: { set: Wheelset }) {
  const { t } = useTranslation('catalogue')
  const format = useFormat()
  const { tyres } = useWheelRows()
  const { front, rear } = set
  const alike = (['depthMm', 'outerWidthMm', 'innerWidthMm', 'seat'] as const).every(
    (fact) => front[fact] === rear[fact],
  )
  const pressureBar = Math.min(front.maxPressureBar, rear.maxPressureBar)
  const pressure = format.pressure(pressureBar, 'down')
  const text = (wheel: WheelFactsView) =>
    t(`wheelset.sectionText_${wheel.seat}`, {
      from: format.width(wheel.tyreMinMm, 'up').text,
      to: format.width(wheel.tyreMaxMm, 'down').text,
    })
  return (
    <section aria-labelledby="rim" className="border-t border-ink px-5 py-7 md:px-9">
      <div className="grid gap-x-12 gap-y-6 lg:grid-cols-[minmax(0,1fr)_minmax(0,1.15fr)]">
        <div>
          <h2 id="rim">{t(alike ? 'wheelset.section' : 'wheelset.sectionBoth')}</h2>
          <p className="mt-1.5 max-w-[58ch] text-[0.9375rem] text-soft">{text(rear)}</p>
          <div className="mt-5 border-t border-line pt-3">
            <p className="text-sm text-soft">{t('wheelset.maxPressure')}</p>
            <p>
              <span className="figure text-4xl">{pressure.value}</span>{' '}
              <span className="ms-1 font-semibold text-soft">{pressure.unit}</span>
            </p>
            <p className="mt-1 max-w-[46ch] border-s-[3px] border-near bg-near-wash px-3 py-2 text-sm">
              {t('wheelset.pressureCaution')}
            </p>
          </div>
        </div>
        <figure>
          <div className={`grid gap-6 ${alike ? 'max-w-[24rem]' : 'sm:grid-cols-2'}`}>
            {(alike ? [rear] : [front, rear]).map((wheel) => {
              const widths = {
                depth: format.depth(wheel.depthMm).text,
                outer: format.width(wheel.outerWidthMm).text,
                inner: format.width(wheel.innerWidthMm).text,
              }
              const [narrow, wide] = [
                format.width(wheel.tyreMinMm, 'up').text,
                format.width(wheel.tyreMaxMm, 'down').text,
              ]
              return (
                <div key={wheel.position}>
                  {!alike && <p className="text-sm font-[650]">{t(`drawing.${wheel.position}`)}</p>}
                  <RimSection
                    rim={wheel}
                    tyres={[wheel.tyreMinMm, wheel.tyreMaxMm]}
                    label={t('drawing.section', {
                      ...widths,
                      narrow,
                      wide,
                      seat: t(`value.${wheel.seat}`),
                      tyres: tyres(wheel),
                    })}
                    texts={{ ...widths, narrow, wide: t('drawing.wide', { width: wide }) }}
                  />
                </div>
              )
            })}
          </div>
          <figcaption className="mt-2 text-sm text-soft">{t('drawing.sectionNote')}</figcaption>
        </figure>
      </div>
    </section>
  )
}
