import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { Advice } from '#contract/advisor.ts'
import { useAdviceWords } from './words.ts'

type Judged = Advice['wheelsets'][number]

/** What was left out, gathered by reason: the most telling reasons first, each wheelset with its way back. */
export function RuledOut({ advice, open = false }: { advice: Advice; open?: boolean }) {
  const { t } = useTranslation('advisor')
  const out = advice.wheelsets.filter(({ rank }) => rank === null)
  if (out.length === 0) return null
  const groups = [...gathered(out, ({ codes }) => codes[0] ?? 'other')].sort(
    ([a, one], [b, other]) => weight(a) - weight(b) || one.length - other.length,
  )
  return (
    <details open={open} className="group">
      <summary className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <h2>{t('findings.ruledOut.title', { count: out.length })}</h2>
        <span className="quiet-link text-sm group-open:hidden">{t('findings.ruledOut.open')}</span>
      </summary>
      <div className="mt-4 grid gap-x-10 lg:grid-cols-2">
        {groups.map(([code, sets]) => (
          <section key={code} className={`border-t border-line py-3.5 ${many(sets) ? 'lg:col-span-2' : ''}`}>
            <h3 className="flex justify-between gap-4">
              {t([`findings.removed.${code}`, 'findings.removed.other'])}
              <span className="text-sm font-medium whitespace-nowrap text-soft">
                {t('findings.ruledOut.wheelsets', { count: sets.length })}
              </span>
            </h3>
            <ul
              className={`mt-1.5 grid gap-x-10 gap-y-1.5 text-sm ${many(sets) ? 'sm:grid-cols-2 lg:grid-cols-3' : ''}`}
            >
              {byChange(sets).map((alike) => (
                <li key={alike[0]?.sku}>
                  <Way sets={alike} totalKg={advice.systemMassKg} />
                </li>
              ))}
            </ul>
          </section>
        ))}
      </div>
    </details>
  )
}

/** Nearly fitting ones first: a limit or a tyre can move, a ride or a brake rarely does. */
const order = ['system-mass', 'pressure-not-suitable', 'tyre-too-narrow-for-rim', 'tyre-too-wide-for-rim', 'clearance']
const weight = (code: string) => (code === 'use' || code === 'brake' ? 99 : (order.indexOf(code) + 50) % 50)

/** Many ways back take the whole width. */
const many = (sets: readonly Judged[]) => byChange(sets).length > 5

const byChange = (sets: readonly Judged[]) => [
  ...gathered(sets, ({ nearestChange }) => JSON.stringify(nearestChange ?? null)).values(),
]

function gathered(sets: readonly Judged[], by: (one: Judged) => string) {
  const groups = new Map<string, Judged[]>()
  for (const one of sets) groups.set(by(one), [...(groups.get(by(one)) ?? []), one])
  return groups
}

function Way({ sets, totalKg }: { sets: readonly Judged[]; totalKg: number }) {
  const { t } = useTranslation('advisor')
  const { format, field, answer } = useAdviceWords()
  const change = sets[0]?.nearestChange
  const words = () => {
    if (!change) return t('findings.change.none')
    if (change.code === 'lower-total' && typeof change.to === 'number')
      return t('findings.change.lower-total', {
        to: format.mass(change.to, 'down').text,
        gap: format.mass(Math.max(0, totalKg - change.to), 'up').text,
      })
    const own = `findings.change.${change.field}`
    return t([own, `findings.change.${change.code}`, 'findings.change.other'], {
      field: field(change.field).toLocaleLowerCase(),
      to: /^(ride|brakes)$/.test(change.field)
        ? answer(change.field, change.to).toLocaleLowerCase()
        : answer(change.field, change.to),
    })
  }
  return (
    <>
      <span className="font-semibold">
        {sets.map(({ sku, slug, name }, index) => (
          <span key={sku}>
            {index > 0 && ', '}
            <Link to={`/range/${slug}`} className="no-underline hover:underline">
              {name}
            </Link>
          </span>
        ))}
      </span>
      <span className="block text-soft">{words()}</span>
    </>
  )
}
