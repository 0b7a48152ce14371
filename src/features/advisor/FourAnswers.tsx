import type { ReactNode } from 'react'
import { Trans, useTranslation } from 'react-i18next'
import type { Advice } from '#contract/advisor.ts'
import { ButtonLink } from '../../ui/Button.tsx'
import { useAdviceWords } from './words.ts'
import { WithWorking } from './Working.tsx'

/** Pressure, depth, spokes and margin in large numerals, each with its band and its working. */
export function FourAnswers({ advice }: { advice: Advice }) {
  return (
    <div className="grid border-t border-ink sm:grid-cols-2">
      <Cell>
        <Pressure advice={advice} />
      </Cell>
      {advice.rimDepthMm && (
        <Cell>
          <Depth advice={advice} depth={advice.rimDepthMm} />
        </Cell>
      )}
      {advice.spokes && (
        <Cell>
          <Spokes advice={advice} spokes={advice.spokes} />
        </Cell>
      )}
      <Cell>
        <Margin advice={advice} />
      </Cell>
    </div>
  )
}

const Cell = ({ children }: { children: ReactNode }) => (
  // With its working open a cell takes the whole row: two workings side by side need the room.
  <section className="border-b border-line py-4 has-[[aria-expanded=true]]:col-span-full sm:odd:pe-6 sm:nth-[2n]:border-s sm:nth-[2n]:ps-6 sm:has-[[aria-expanded=true]]:border-s-0! sm:has-[[aria-expanded=true]]:px-0!">
    {children}
  </section>
)

function Figures({ parts, unit }: { parts: readonly { name?: string; value: string }[]; unit?: string }) {
  // Ranges are twice as long as figures and still have to stand in one line.
  const long = parts.some(({ value }) => value.length > 4)
  return (
    <p className="mt-1.5 flex flex-wrap items-end gap-x-2 gap-y-1">
      <span className={`flex ${long ? 'gap-x-4' : 'gap-x-6'}`}>
        {parts.map(({ name, value }) => (
          <span key={name ?? value}>
            {name !== undefined && <span className="block text-sm leading-tight text-soft">{name} </span>}
            <span className={`figure whitespace-nowrap ${long ? 'text-[2rem]' : 'text-[2.5rem]'}`}>{value}</span>
          </span>
        ))}
      </span>
      {unit !== undefined && (
        <span className={`${long ? 'pb-0.5' : 'pb-1.5'} text-lg font-semibold text-soft`}>{unit}</span>
      )}
    </p>
  )
}

const Small = ({ children }: { children: ReactNode }) => <p className="mt-1.5 text-sm text-soft">{children}</p>

function Pressure({ advice: { pressure, reasons, notes } }: { advice: Advice }) {
  const { t } = useTranslation('advisor')
  const { format, start, edge } = useAdviceWords()
  const label = t('findings.answers.pressure')
  const both = [
    { key: 'pressure.front', title: t('common:front'), reason: reasons['pressure.front'] },
    { key: 'pressure.rear', title: t('common:rear'), reason: reasons['pressure.rear'] },
  ]
  if (!pressure) {
    const outside = notes.some(({ code }) => code === 'outside-model')
    return (
      <WithWorking label={label} name={label} reasons={both}>
        <p className="figure mt-2 text-2xl">
          {t(outside ? 'findings.answers.noPressureModel' : 'findings.answers.noPressure')}
        </p>
        <Small>{t(outside ? 'findings.answers.noPressureModelText' : 'findings.answers.noPressureText')}</Small>
        {!outside && (
          <ButtonLink
            to="#group-tyre"
            kind="plain"
            small
            className="mt-3"
            onClick={(event) => {
              event.preventDefault()
              const group = document.getElementById('group-tyre')
              if (group instanceof HTMLDetailsElement) group.open = true
              group?.scrollIntoView({ block: 'start' })
              document.getElementById('sharpen-tyre.frontWidthMm')?.focus({ preventScroll: true })
            }}
          >
            {t('findings.answers.noPressureGo')}
          </ButtonLink>
        )}
      </WithWorking>
    )
  }
  const { front, rear } = pressure
  const ceiling = (bar: number) => format.pressure(bar, 'down').text
  const from = (code: string) => t([`findings.ceilingFrom.${code}`, 'findings.ceilingFrom.other'])
  const alike = ceiling(front.ceilingBar) === ceiling(rear.ceilingBar) && front.ceilingFrom === rear.ceilingFrom
  return (
    <WithWorking label={label} name={label} reasons={both}>
      <Figures
        parts={[
          { name: t('common:front'), value: start(front).value },
          { name: t('common:rear'), value: start(rear).value },
        ]}
        unit={start(rear).unit}
      />
      <Small>
        {t('findings.answers.band', {
          frontLow: edge(front.lowBar, front),
          frontHigh: edge(front.highBar, front),
          rearLow: edge(rear.lowBar, rear),
          rearHigh: edge(rear.highBar, rear),
          unit: start(rear).unit,
        })}
      </Small>
      <p className="mt-0.5 text-sm">
        {alike
          ? t('findings.answers.ceilingBoth', { ceiling: ceiling(rear.ceilingBar), from: from(rear.ceilingFrom) })
          : t('findings.answers.ceiling', {
              front: ceiling(front.ceilingBar),
              rear: ceiling(rear.ceilingBar),
              from: from(front.ceilingBar < rear.ceilingBar ? front.ceilingFrom : rear.ceilingFrom),
            })}
      </p>
    </WithWorking>
  )
}

function Depth({ advice: { reasons }, depth }: { advice: Advice; depth: NonNullable<Advice['rimDepthMm']> }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const range = ({ from, to }: { from: number; to: number }) =>
    from === to ? format.number(to) : `${format.number(from)}–${format.number(to)}`
  const label = t('findings.answers.depth')
  return (
    <WithWorking
      label={label}
      name={label}
      reasons={[
        { key: 'rimDepthMm.front', title: t('common:front'), reason: reasons['rimDepthMm.front'] },
        { key: 'rimDepthMm.rear', title: t('common:rear'), reason: reasons['rimDepthMm.rear'] },
      ]}
    >
      <Figures
        parts={[
          { name: t('common:front'), value: range(depth.front) },
          { name: t('common:rear'), value: range(depth.rear) },
        ]}
        unit="mm"
      />
      <Small>{t('findings.answers.depthText')}</Small>
    </WithWorking>
  )
}

function Spokes({ advice: { reasons }, spokes }: { advice: Advice; spokes: NonNullable<Advice['spokes']> }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const { front, rear } = spokes
  const limits = [front.limitKg, rear.limitKg].filter((limit) => limit !== null && limit !== undefined)
  const weaker = limits.length === 2 ? limits.reduce((a, b) => (a.estimate <= b.estimate ? a : b)) : undefined
  const label = t('findings.answers.spokes')
  const more = front.advised > front.min || rear.advised > rear.min
  return (
    <WithWorking
      label={label}
      name={label}
      reasons={[
        { key: 'spokes.front', title: t('common:front'), reason: reasons['spokes.front'] },
        { key: 'spokes.rear', title: t('common:rear'), reason: reasons['spokes.rear'] },
      ]}
    >
      <Figures
        parts={[
          { name: t('common:front'), value: String(front.min) },
          { name: t('common:rear'), value: String(rear.min) },
        ]}
      />
      <Small>
        {t(more ? 'findings.answers.spokesText' : 'findings.answers.spokesTextSame', {
          criterion: t([`findings.governedBy.${rear.governedBy}`, 'findings.governedBy.other']),
          advised: `${front.advised} / ${rear.advised}`,
        })}
      </Small>
      {weaker && (
        <Small>
          {t('findings.answers.spokesCarry', {
            estimate: format.mass(weaker.estimate, 'down').text,
            low: format.mass(weaker.low, 'down').value,
            high: format.mass(weaker.high, 'down').text,
          })}
        </Small>
      )}
    </WithWorking>
  )
}

function Margin({ advice: { wheelsets, reasons, systemMassKg } }: { advice: Advice }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const first = wheelsets.find(({ rank }) => rank === 1)
  const label = t('findings.answers.margin')
  const margin = first && format.mass(first.marginKg, 'down')
  return (
    <WithWorking
      label={label}
      name={label}
      reasons={[
        { key: 'systemMassKg', title: t('fitting.sum.title'), reason: reasons.systemMassKg },
        { key: 'limit', title: label, reason: reasons.limit },
        { key: 'loads', title: t('working.loads'), reason: reasons.loads },
      ]}
    >
      {first && margin ? (
        <>
          <Figures parts={[{ name: first.name, value: margin.value }]} unit={margin.unit} />
          <Small>
            <Trans
              t={t}
              i18nKey="findings.answers.marginSum"
              values={{
                from: t(`option.limitFrom.${first.limitFrom ?? 'system'}`),
                limit: format.mass(first.limitKg, 'down').text,
                total: format.mass(systemMassKg, 'up').text,
              }}
              components={{ own: <span className="font-bold text-own" /> }}
            />
          </Small>
          {first.structure && (
            <Small>
              {t('findings.answers.structure', {
                limit: format.mass(first.structure.limitKg, 'down').text,
                criterion: t([`findings.governedBy.${first.structure.governedBy}`, 'findings.governedBy.other']),
              })}
            </Small>
          )}
        </>
      ) : (
        <p className="figure mt-2 text-2xl">{t('findings.answers.marginNone')}</p>
      )}
    </WithWorking>
  )
}
