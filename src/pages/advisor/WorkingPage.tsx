import { useTranslation } from 'react-i18next'
import { labels } from '#contract/advisor.ts'
import { Formula } from '../../features/advisor/Formula.tsx'
import { useTitle } from '../../lib/title.ts'
import { ButtonLink } from '../../ui/Button.tsx'
import { Sheet } from '../../ui/Sheet.tsx'

/** In the order a fitting asks: first the sum, then what follows from it, then what stands behind all of it. */
const chapters = [
  { name: 'total', formula: 'systemMassKg' },
  { name: 'limit', formula: 'limit' },
  { name: 'loads', formula: 'loads' },
  { name: 'pressure', formula: 'pressure' },
  { name: 'depth', formula: 'rimDepthMm' },
  { name: 'tradeOff', formula: 'tradeOff' },
  { name: 'spokes', formula: 'spokes' },
  { name: 'heat', formula: 'brakeHeat' },
  { name: 'ranking', formula: null },
  { name: 'labels', formula: null },
  { name: 'rounding', formula: null },
  { name: 'unknown', formula: null },
  { name: 'privacy', formula: null },
] as const

/** How the numbers are made: plain words, the main formulas, their sources, and what nobody knows. */
export function WorkingPage() {
  const { t } = useTranslation('advisor')
  useTitle(t('working.page.title'))
  return (
    <Sheet>
      <header className="px-5 pt-7 pb-7 md:px-9 md:pt-10">
        <h1 className="max-w-[20ch]">{t('working.page.title')}</h1>
        <p className="mt-3 max-w-[62ch] text-lg text-soft">{t('working.page.lede')}</p>
      </header>
      <div className="border-t border-ink lg:grid lg:grid-cols-[16rem_minmax(0,1fr)]">
        <nav
          aria-label={t('working.page.index')}
          className="px-5 py-5 md:px-9 lg:border-e lg:border-line lg:py-8 lg:pe-4 print:hidden"
        >
          <ol className="grid gap-x-6 text-[0.9375rem] sm:grid-cols-2 lg:sticky lg:top-6 lg:grid-cols-1">
            {chapters.map(({ name }, index) => (
              <li key={name}>
                <a
                  href={`#${name}`}
                  className="flex min-h-9 items-center gap-3 no-underline hover:text-own hover:underline"
                >
                  <span className="w-5 text-end text-soft tabular-nums">{index + 1}</span>
                  {t(`working.page.${name}.title`)}
                </a>
              </li>
            ))}
          </ol>
        </nav>
        <div className="min-w-0">
          {chapters.map(({ name, formula }, index) => (
            <section
              key={name}
              id={name}
              aria-labelledby={`${name}-title`}
              className="scroll-mt-4 border-line px-5 py-7 max-lg:border-t md:px-9 lg:py-8 lg:not-first:border-t"
            >
              <h2 id={`${name}-title`} className="flex gap-3 text-xl!">
                <span aria-hidden className="text-soft tabular-nums">
                  {index + 1}
                </span>
                {t(`working.page.${name}.title`)}
              </h2>
              <div
                className={`mt-2 grid gap-x-10 gap-y-4 ${formula === null ? '' : 'xl:grid-cols-[minmax(0,1.15fr)_minmax(0,1fr)]'}`}
              >
                <div className="grid max-w-[66ch] content-start gap-3">
                  <p>{t(`working.page.${name}.text`)}</p>
                  {name === 'labels' && <Labels />}
                  <p className="text-soft">{t(`working.page.${name}.more`)}</p>
                </div>
                {formula !== null && (
                  <figure className="max-w-[66ch] self-start border border-strong">
                    <p className="px-4 py-3.5 text-lg leading-relaxed font-[650] break-words">
                      <Formula text={t(`working.formula.${formula}`)} />
                    </p>
                    <figcaption className="border-t border-line px-4 py-2 text-sm text-soft">
                      <Formula text={t(`working.page.${name}.symbols`)} />
                      <span className="mt-1 block">
                        <span className="font-[650]">{t('working.source')}</span> {t(`working.sources.${formula}`)}
                      </span>
                    </figcaption>
                  </figure>
                )}
              </div>
            </section>
          ))}
          <div className="border-t border-line px-5 py-7 md:px-9 print:hidden">
            <ButtonLink to="/fitting">{t('findings.noAnswers.go')}</ButtonLink>
          </div>
        </div>
      </div>
    </Sheet>
  )
}

function Labels() {
  const { t } = useTranslation('advisor')
  return (
    <dl className="grid border-t border-line">
      {labels.map((label) => (
        <div key={label} className="grid gap-x-5 border-b border-line py-2 sm:grid-cols-[8rem_minmax(0,1fr)]">
          <dt>
            <span className="border border-strong px-1.5 text-sm font-[650]">{t(`working.labels.${label}.name`)}</span>
          </dt>
          <dd>{t(`working.labels.${label}.short`)}</dd>
        </div>
      ))}
    </dl>
  )
}
