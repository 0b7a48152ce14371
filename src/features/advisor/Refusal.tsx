import { useTranslation } from 'react-i18next'
import type { Advice, Note } from '#contract/advisor.ts'
import { Button } from '../../ui/Button.tsx'
import { SumTable } from './SumTable.tsx'
import { useAdviceWords } from './words.ts'

/** The note that decides: a total over every limit first, since no other tyre or rim would help it. */
export function decidingNote(advice: Advice): Note | undefined {
  const stops = advice.notes.filter(({ severity }) => severity === 'stop')
  return stops.find(({ code }) => code === 'over-every-limit') ?? stops[0]
}

const inScope = (advice: Advice) => advice.outcome !== 'out-of-scope'

/** A refusal shows the sum and a way on; an answer out of scope hints at no number at all. */
export function Refusal({ advice, banded }: { advice: Advice; banded: boolean }) {
  const { t } = useTranslation('advisor')
  const { format } = useAdviceWords()
  const note = decidingNote(advice)
  if (!note) return null
  const { code, data } = note
  const mm = (name: string, rounding: 'up' | 'down' | 'nearest' = 'nearest') =>
    typeof data[name] === 'number' ? format.width(data[name], rounding).text : ''
  const words = {
    width: mm('widthMm'),
    inner: mm('innerWidthMm'),
    least: mm('leastTyreMm', 'up'),
    widest: mm('widestHookedInnerMm', 'down'),
    would: mm('widthThatWouldDoMm', 'up'),
    load: typeof data.loadKg === 'number' ? format.mass(data.loadKg).text : '',
    ceiling: typeof data.ceilingBar === 'number' ? format.pressure(data.ceilingBar, 'down').text : '',
  }
  const say = (part: string) => t([`refusal.${code}.${part}`, `refusal.other.${part}`], words)
  const hold = code === 'pressure-not-suitable' && data.widthThatWouldDoMm === null ? 'holdNone' : 'hold'
  const { limitKg, gapKg } = data
  return (
    <div className="grid gap-8 lg:grid-cols-[minmax(0,1.25fr)_minmax(0,1fr)]">
      <div>
        <p className="max-w-[60ch] text-lg">{say('text')}</p>
        {typeof data.row === 'string' && (
          <p className="mt-1 text-sm text-soft">
            {t('refusal.row', { row: data.row, label: t(`working.labels.${String(data.rowLabel)}.name`) })}
          </p>
        )}
        {inScope(advice) && (
          <>
            <h2 className="mt-6">{t('refusal.holdTitle')}</h2>
            <p className="mt-1 max-w-[60ch]">{say(hold)}</p>
          </>
        )}
        <h2 className="mt-6">{t('refusal.askTitle')}</h2>
        <p className="mt-1 max-w-[60ch]">{say('ask')}</p>
        <div className="mt-6 flex flex-wrap gap-3 print:hidden">
          <Button
            onClick={() => {
              const answers = document.getElementById('sharpen')
              answers?.scrollIntoView({ block: 'start' })
              answers?.focus({ preventScroll: true })
            }}
          >
            {t('refusal.again')}
          </Button>
        </div>
      </div>
      {inScope(advice) && (
        <aside>
          <h2 className="mb-2">{t('refusal.sum')}</h2>
          <SumTable parts={advice.parts} assumed={advice.assumed} banded={banded} totalKg={advice.systemMassKg} />
          {typeof limitKg === 'number' && typeof gapKg === 'number' && (
            <dl className="mt-3 text-[0.9375rem]">
              <div className="flex justify-between gap-4 border-b border-line py-1.5">
                <dt className="text-soft">{t('refusal.limit')}</dt>
                <dd className="font-semibold">{format.mass(limitKg, 'down').text}</dd>
              </div>
              <div className="flex items-center justify-between gap-4 py-2">
                <dt className="font-bold">{t('refusal.gap')}</dt>
                <dd className="bg-stop px-2.5 py-1 font-bold text-stop-ink">{format.mass(gapKg, 'up').text}</dd>
              </div>
            </dl>
          )}
        </aside>
      )}
    </div>
  )
}
