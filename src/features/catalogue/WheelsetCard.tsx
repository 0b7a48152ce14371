import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { Wheelset } from '#contract/catalogue.ts'
import type { WheelsetVerdict } from '../../lib/fitting.ts'
import { useFormat } from '../../lib/format.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { PairDrawing } from '../../ui/PairDrawing.tsx'
import { drawn } from '../../lib/drawn.ts'
import { useLimitText } from './limit-text.ts'
import { RiderVerdict } from './RiderVerdict.tsx'
import { SideBySideToggle } from './SideBySideToggle.tsx'
import { shortPair, stockWord } from './wheel-rows.ts'

/** One wheelset of the range: its drawing, the numbers that decide, its price, and what the rider's fitting says. */
export function WheelsetCard({ set, verdict }: { set: Wheelset; verdict: WheelsetVerdict | null }) {
  const { t } = useTranslation('catalogue')
  const format = useFormat()
  const { currency } = usePreferences()
  const { front, rear } = set
  const price = set.prices[currency]
  const limit = useLimitText()(set.limitKg)
  const spoken = (a: number, b: number) =>
    a === b ? t('facts.both', { value: a }) : t('facts.frontRear', { front: a, rear: b })
  const stock = stockWord(set)
  const out = verdict !== null && ['over-limit', 'mismatch', 'pressure'].includes(verdict.verdict)
  return (
    <article className="row-span-7 grid grid-rows-subgrid gap-y-0 px-4 pt-4 pb-2 sm:px-5">
      <PairDrawing
        front={drawn(set, 'front')}
        rear={drawn(set, 'rear')}
        label=""
        names={{ front: t('drawing.front'), rear: t('drawing.rear') }}
        className={out ? '[&_svg]:opacity-55' : ''}
      />
      <div className="mt-2 flex items-baseline justify-between gap-3">
        <h3 className="text-xl">
          <Link to={`/range/${set.slug}`} className="scroll-mb-28 no-underline hover:underline">
            {set.name}
          </Link>
        </h3>
        {price !== undefined && <p className="font-[650]">{format.money(price, currency)}</p>}
      </div>
      <p className="text-[0.9375rem] leading-snug text-soft">{set.tagline}</p>
      <dl className="mt-3 grid grid-cols-[auto_auto_auto] justify-between gap-x-2 border-t border-ink pt-2">
        <Figure
          label={t('facts.depth')}
          value={shortPair(front.depthMm, rear.depthMm)}
          spoken={spoken(front.depthMm, rear.depthMm)}
          unit="mm"
        />
        <Figure label={t('facts.limit')} value={limit.value} unit={limit.unit} />
        <Figure
          label={t('facts.spokes')}
          value={`${front.spokeCount}/${rear.spokeCount}`}
          spoken={spoken(front.spokeCount, rear.spokeCount)}
        />
      </dl>
      <p className="mt-2 text-sm text-soft">
        {[
          format.grams(set.massG),
          t('facts.inner', { width: format.width(rear.innerWidthMm).text }),
          t('facts.tyres', {
            from: format.width(rear.tyreMinMm, 'up').value,
            to: format.width(rear.tyreMaxMm, 'down').text,
          }),
        ].join(' · ')}
      </p>
      <div>
        {verdict && (
          <p className="mt-2.5">
            <RiderVerdict verdict={verdict} />
          </p>
        )}
      </div>
      <div className="flex flex-wrap items-center justify-between gap-x-3 pt-1.5">
        <SideBySideToggle slug={set.slug} name={set.name} />
        <p className={`text-sm ${stock === 'none' ? 'text-soft' : ''}`}>
          {t(`stock.${stock}`, { count: set.available })}
        </p>
      </div>
    </article>
  )
}

function Figure({ label, value, unit, spoken }: { label: string; value: string; unit?: string; spoken?: string }) {
  return (
    <div>
      <dt className="text-xs text-soft">{label}</dt>
      <dd className="whitespace-nowrap">
        <span aria-hidden={spoken !== undefined || undefined} className="figure text-2xl">
          {value}
        </span>
        {spoken !== undefined && <span className="sr-only">{spoken}</span>}
        {unit !== undefined && <span className="ms-1 text-sm font-semibold text-soft">{unit}</span>}
      </dd>
    </div>
  )
}
