import { useQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import { rides, type RiderAnswers } from '#contract/advisor.ts'
import type { Wheelset } from '#contract/catalogue.ts'
import { RidePicture } from '../../features/advisor/RidePicture.tsx'
import { wheelsetsQuery } from '../../lib/wheelsets.ts'
import { adviceQuery, useKeptFitting } from '../../lib/fitting.ts'
import { useFormat } from '../../lib/format.ts'
import { usePreferences } from '../../lib/preferences.tsx'
import { useTitle } from '../../lib/title.ts'
import { ButtonLink } from '../../ui/Button.tsx'
import { Sheet, TitleBlock } from '../../ui/Sheet.tsx'
import { WheelDrawing } from '../../ui/WheelDrawing.tsx'

/** The rider of the worked example: the first of the reference riders, an average one on a road bike. */
const example: RiderAnswers = {
  ride: 'road-long',
  bodyMassKg: 75,
  kitMassKg: 3,
  bikeMassKg: 8.2,
  luggageKg: 0,
  confidence: 'average',
  brakes: 'disc',
  tyre: { frontWidthMm: 28, rearWidthMm: 28, setup: 'tubeless' },
}

/** First page: the first question itself, a wheel drawn from its data, and one rider worked out live. */
export function HomePage() {
  const { t } = useTranslation(['home', 'advisor'])
  useTitle('')
  const { address } = useKeptFitting()
  const { language } = usePreferences()
  const { data: range } = useQuery(wheelsetsQuery({ lng: language }))
  const sets = range?.items ?? []
  const hero =
    sets.find(({ slug }) => slug.startsWith('rowan-45')) ??
    sets.find(({ rear, brake }) => rear.depthMm === 45 && brake === 'disc') ??
    sets[0]
  const kept = new URLSearchParams(address)
  const to = (ride: string) => {
    const params = new URLSearchParams(kept)
    params.set('ride', ride)
    params.set('step', 'brakes')
    return `/fitting?${params.toString()}`
  }
  return (
    <>
      <Sheet>
        <div className="grid lg:grid-cols-[minmax(0,1.02fr)_minmax(0,1fr)]">
          <section
            aria-labelledby="first-question"
            className="order-1 px-5 pt-7 pb-8 md:px-9 md:pt-10 lg:order-2 lg:ps-8"
          >
            <h1 className="max-w-[16ch]">{t('title')}</h1>
            <p className="mt-3 max-w-[56ch] text-soft">{t('lede')}</p>
            <h2 id="first-question" className="mt-7 border-t border-ink pt-4">
              {t('question')}
            </h2>
            <p className="text-sm text-soft">{t('questionHint')}</p>
            <ul className="mt-3 grid gap-2 sm:grid-cols-2">
              {rides.map((ride) => (
                <li key={ride}>
                  <Link
                    to={to(ride)}
                    className="flex min-h-14 items-center justify-between gap-3 border border-strong px-3.5 py-2 font-[650] leading-snug no-underline hover:border-own hover:bg-own-wash"
                  >
                    {t(`advisor:ride.${ride}.label`)}
                    <RidePicture ride={ride} className="h-8 w-14 flex-none text-soft" />
                  </Link>
                </li>
              ))}
            </ul>
          </section>
          <section className="order-2 border-line px-5 pb-8 max-lg:border-t max-lg:pt-6 md:px-9 lg:order-1 lg:border-e lg:pt-8">
            <HeroWheel set={hero} />
          </section>
        </div>
        <Example />
        <Points />
        <FromTheRange sets={sets} />
      </Sheet>
    </>
  )
}

function HeroWheel({ set }: { set: Wheelset | undefined }) {
  const { t } = useTranslation('home')
  const format = useFormat()
  if (!set) return <div aria-hidden className="aspect-square" />
  const { rear } = set
  return (
    <figure>
      <WheelDrawing
        size="full"
        label={t('drawnLabel', { name: set.name, depth: rear.depthMm, spokes: rear.spokeCount })}
        wheel={{ ...rear, beadSeatMm: set.beadSeatMm, tyreWidthMm: Math.max(28, rear.tyreMinMm) }}
      />
      <figcaption>
        <TitleBlock
          className="mt-4"
          items={[
            { label: t('block.wheel'), value: <Link to={`/range/${set.slug}`}>{set.name}</Link> },
            {
              label: t('block.lacing'),
              value: t(rear.crossesRight === 0 ? 'radial' : 'lacing', {
                count: rear.spokeCount,
                crosses: rear.crossesRight,
              }),
            },
            { label: t('block.limit'), value: format.mass(set.limitKg, 'down').text },
            { label: t('block.mass'), value: format.grams(set.massG) },
          ]}
        />
      </figcaption>
    </figure>
  )
}

function Example() {
  const { t } = useTranslation(['home', 'common'])
  const format = useFormat()
  const { data } = useQuery(adviceQuery(example))
  if (!data?.pressure || !data.rimDepthMm || !data.spokes) return null
  const { front, rear } = data.pressure
  const unit = format.pressure(front.startBar).unit
  const figures = [
    {
      label: t('example.total'),
      parts: [{ value: format.mass(data.systemMassKg, 'up').value }],
      unit: format.mass(data.systemMassKg, 'up').unit,
      own: true,
    },
    {
      label: t('example.pressure'),
      parts: [
        { name: t('common:front'), value: format.pressure(front.startBar).value },
        { name: t('common:rear'), value: format.pressure(rear.startBar).value },
      ],
      unit,
    },
    {
      label: t('example.depth'),
      parts: [
        { name: t('common:front'), value: `${data.rimDepthMm.front.from}–${data.rimDepthMm.front.to}` },
        { name: t('common:rear'), value: `${data.rimDepthMm.rear.from}–${data.rimDepthMm.rear.to}` },
      ],
      unit: 'mm',
    },
    {
      label: t('example.spokes'),
      parts: [
        { name: t('common:front'), value: String(data.spokes.front.min) },
        { name: t('common:rear'), value: String(data.spokes.rear.min) },
      ],
      unit: '',
    },
  ]
  return (
    <section className="border-t border-ink px-5 py-8 md:px-9">
      <div className="grid gap-6 lg:grid-cols-[minmax(0,1fr)_minmax(0,2.2fr)]">
        <div>
          <h2>{t('example.title')}</h2>
          <p className="mt-1.5 text-[0.9375rem] text-soft">{t('example.text')}</p>
          <ButtonLink to="/fitting" className="mt-4">
            {t('example.cta')}
          </ButtonLink>
        </div>
        <dl className="grid self-start border-t border-ink sm:grid-cols-2">
          {figures.map(({ label, parts, unit: one, own }) => (
            <div key={label} className="border-b border-line py-3 sm:nth-[2n]:border-s sm:nth-[2n]:ps-6">
              <dt className="text-sm text-soft">{label}</dt>
              <dd className={`mt-1 flex items-end gap-5 ${own ? 'text-own' : ''}`}>
                {parts.map(({ name, value }: { name?: string; value: string }) => (
                  <span key={name ?? value}>
                    {name !== undefined && <span className="block text-xs text-soft">{name}</span>}
                    <span className="figure text-3xl sm:text-4xl">{value}</span>
                  </span>
                ))}
                <span className="pb-1 font-semibold text-soft">{one}</span>
              </dd>
            </div>
          ))}
        </dl>
      </div>
    </section>
  )
}

function Points() {
  const { t } = useTranslation('home')
  return (
    <section className="grid border-t border-ink md:grid-cols-3">
      {(['limit', 'honest', 'bench'] as const).map((point) => (
        <div
          key={point}
          className="border-line px-5 py-6 not-first:border-t md:px-9 md:not-first:border-s md:not-first:border-t-0"
        >
          <h2>{t(`points.${point}.title`)}</h2>
          <p className="mt-1.5 text-[0.9375rem] text-soft">{t(`points.${point}.text`)}</p>
        </div>
      ))}
    </section>
  )
}

/** Four that differ in what they are for, so that the breadth of the range shows. */
function FromTheRange({ sets }: { sets: readonly Wheelset[] }) {
  const { t } = useTranslation('home')
  const format = useFormat()
  const { currency } = usePreferences()
  const picked = (['road-long', 'gravel', 'climbing', 'cross-country'] as const).flatMap((ride, index, all) => {
    const earlier = all.slice(0, index)
    const one = sets.find(
      (set) => set.available > 0 && set.rides.includes(ride) && !earlier.some((other) => set.rides.includes(other)),
    )
    return one ? [one] : []
  })
  if (picked.length === 0) return null
  return (
    <section className="border-t border-ink px-5 py-8 md:px-9">
      <div className="flex flex-wrap items-baseline justify-between gap-3">
        <h2>{t('range.title')}</h2>
        <Link to="/range" className="quiet-link">
          {t('range.all')}
        </Link>
      </div>
      <ul className="mt-4 grid gap-px border border-line bg-line sm:grid-cols-2 lg:grid-cols-4">
        {picked.map((set) => {
          const price = set.prices[currency]
          const depths = set.front.depthMm === set.rear.depthMm ? 'range.same' : 'range.depths'
          return (
            <li key={set.sku} className="bg-sheet">
              <Link to={`/range/${set.slug}`} className="group block h-full p-4 no-underline">
                <WheelDrawing
                  size="card"
                  label=""
                  wheel={{ ...set.rear, beadSeatMm: set.beadSeatMm, tyreWidthMm: set.rear.tyreMinMm }}
                />
                <p className="mt-3 flex items-baseline justify-between gap-2">
                  <span className="text-lg font-bold group-hover:underline">{set.name}</span>
                  {price !== undefined && <span className="text-sm">{format.money(price, currency)}</span>}
                </p>
                <p className="text-sm text-soft">
                  {t(depths, { depth: set.rear.depthMm, front: set.front.depthMm, rear: set.rear.depthMm })} ·{' '}
                  {t('range.limit', { limit: format.mass(set.limitKg, 'down').text })}
                </p>
              </Link>
            </li>
          )
        })}
      </ul>
    </section>
  )
}
