import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { advice as adviceContract } from '#contract/advisor.ts'
import type { FrozenAdvice } from '#contract/support-desk.ts'
import { useFormat } from '../../lib/format.ts'
import { Button } from '../../ui/Button.tsx'
import { Dialog } from '../../ui/Dialog.tsx'
import { Verdict, type Standing } from '../../ui/Verdict.tsx'
import { AdviceWorking } from './AdviceWorking.tsx'
import { AnswerList } from './AnswerList.tsx'
import { AskReason } from './AskReason.tsx'
import { useRevealMass } from './queries.ts'

const standings: Partial<Record<string, Standing>> = { fits: 'within', 'no-margin': 'near', 'over-limit': 'over' }

/** What this rider answered and was told, as it was frozen on that day. The body mass shows after a reason, and only on this page. */
export function FrozenAdvicePanel({ advice, orderNumber }: { advice: readonly FrozenAdvice[]; orderNumber: string }) {
  const { t } = useTranslation('support-desk')
  const reveal = useRevealMass(orderNumber)
  const [asking, setAsking] = useState(false)
  if (advice.length === 0) return <p>{t('advice.none')}</p>
  const shown = reveal.data?.advice ?? advice
  return (
    <div className="grid gap-6">
      {shown.map((one) => (
        <OneAdvice key={one.adviceId} advice={one} onReveal={() => setAsking(true)} />
      ))}
      <Dialog open={asking} onClose={() => setAsking(false)} title={t('advice.revealTitle')}>
        <AskReason
          label={t('reason.label')}
          hint={t('advice.revealHint')}
          action={t('advice.reveal')}
          busy={reveal.isPending}
          error={reveal.error}
          onCancel={() => setAsking(false)}
          onGive={(reason) => {
            reveal.mutate(reason, { onSuccess: () => setAsking(false) })
          }}
        />
      </Dialog>
    </div>
  )
}

function OneAdvice({ advice, onReveal }: { advice: FrozenAdvice; onReveal: () => void }) {
  const { t } = useTranslation(['support-desk', 'advisor'])
  const f = useFormat()
  // A note whose sentence needs figures stays a code here: those figures are withheld.
  const noteWords = (code: string) => {
    const words = t([`advisor:notes.${code}`, 'answer.name.other'], { name: code, skipInterpolation: true })
    return words.includes('{{') ? code : words
  }
  // Frozen under whatever contract held then: what no longer reads is passed over, never guessed.
  const pressure = adviceContract.shape.pressure.safeParse(advice.pressure).data ?? null
  const depth = adviceContract.shape.rimDepthMm.safeParse(advice.rimDepthMm).data ?? null
  const spokes = adviceContract.shape.spokes.safeParse(advice.spokes).data ?? null
  return (
    <article>
      <dl className="grid grid-cols-2 border border-strong text-[0.8125rem]">
        <Fact label={t('advice.given')} value={f.time(advice.createdAt)} />
        <Fact label={t('advice.rules')} value={advice.rulesVersion} />
        <div className="col-span-2 border-t border-line px-2.5 py-1.5">
          <dt className="text-xs text-soft">{t('advice.digest')}</dt>
          <dd>
            <span className="block break-all">{advice.sha256}</span>
            <Verdict standing={advice.intact ? 'within' : 'over'}>
              {t(advice.intact ? 'advice.intact' : 'advice.changed')}
            </Verdict>
          </dd>
        </div>
      </dl>

      <h3 className="mt-4 mb-1">{t('advice.said')}</h3>
      {advice.outcome !== null && <p>{t([`advice.outcome.${advice.outcome}`, 'advice.outcome.other'])}</p>}
      <table className="w-full">
        <thead className="text-xs text-soft">
          <tr>
            <th scope="col">
              <span className="sr-only">{t('advice.quantity')}</span>
            </th>
            <th scope="col" className="text-end font-medium">
              {t('advice.front')}
            </th>
            <th scope="col" className="ps-3 text-end font-medium">
              {t('advice.rear')}
            </th>
          </tr>
        </thead>
        <tbody>
          {pressure && (
            <Pair
              label={t('advice.pressure')}
              values={[pressure.front, pressure.rear].map(
                (p) =>
                  `${f.pressure(p.startBar).value} (${f.pressure(p.lowBar, 'up').value}–${f.pressure(p.highBar, 'down').text})`,
              )}
            />
          )}
          {depth && (
            <Pair
              label={t('advice.depth')}
              values={[depth.front, depth.rear].map((d) => `${f.number(d.from)}–${f.depth(d.to).text}`)}
            />
          )}
          {spokes && (
            <Pair
              label={t('advice.spokes')}
              values={[spokes.front, spokes.rear].map((s) =>
                t('advice.spokesValue', { min: s.min, advised: s.advised }),
              )}
            />
          )}
        </tbody>
      </table>
      <ul>
        {advice.wheelsets.map(({ sku, verdict, limitKg, marginKg }) => (
          <li key={sku} className="flex flex-wrap items-center justify-between gap-x-3 border-b border-line py-1">
            <span>
              {sku}
              {limitKg !== null && (
                <span className="text-soft"> · {t('line.limitThen', { limit: f.mass(limitKg, 'down').text })}</span>
              )}
            </span>
            {verdict !== '' && (
              <Verdict standing={standings[verdict] ?? 'mismatch'}>
                {t([`advice.verdict.${verdict}`, 'advice.verdict.other'])}
                {marginKg !== null && ` · ${f.mass(marginKg, 'down').text}`}
              </Verdict>
            )}
          </li>
        ))}
      </ul>
      {advice.notes.length > 0 && (
        <ul className="mt-1 list-disc ps-4 text-soft">
          {advice.notes.map(({ code }) => (
            <li key={code}>{noteWords(code)}</li>
          ))}
        </ul>
      )}

      <h3 className="mt-4 mb-1 flex flex-wrap items-end justify-between gap-2">
        {t('advice.answered')}
        {advice.withheld.length > 0 && (
          <Button kind="plain" small className="no-print" onClick={onReveal}>
            {t('advice.revealAsk')}
          </Button>
        )}
      </h3>
      <AnswerList advice={advice} />
      {advice.reasons.length > 0 && <AdviceWorking reasons={advice.reasons} />}
    </article>
  )
}

const Fact = ({ label, value }: { label: string; value: string }) => (
  <div className="border-line px-2.5 py-1.5 not-first:border-s">
    <dt className="text-xs text-soft">{label}</dt>
    <dd className="font-semibold break-words">{value}</dd>
  </div>
)

const Pair = ({ label, values }: { label: string; values: readonly string[] }) => (
  <tr className="border-b border-line">
    <th scope="row" className="py-1 text-start font-medium text-soft">
      {label}
    </th>
    {values.map((value, index) => (
      <td key={index} className="py-1 ps-3 text-end whitespace-nowrap">
        {value}
      </td>
    ))}
  </tr>
)
