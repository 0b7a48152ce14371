import { useTranslation } from 'react-i18next'
import type { WheelsetVerdict } from '../../lib/fitting.ts'
import { useFormat } from '../../lib/format.ts'
import { Verdict, type Standing } from '../../ui/Verdict.tsx'

const standings: Record<WheelsetVerdict['verdict'], Standing> = {
  fits: 'within',
  'no-margin': 'near',
  'over-limit': 'over',
  mismatch: 'mismatch',
  pressure: 'mismatch',
}

/** The verdict in words: a margin rounded down, an excess rounded up, or what rules it out. */
export function useVerdictWord() {
  const { t } = useTranslation('catalogue')
  const format = useFormat()
  return ({ verdict, marginKg, codes }: Pick<WheelsetVerdict, 'verdict' | 'marginKg' | 'codes'>): string => {
    if (verdict === 'mismatch' || verdict === 'pressure')
      return t([`verdict.rule.${codes[0] ?? ''}`, 'verdict.mismatch'])
    return t(`verdict.${verdict}`, {
      margin: format.mass(Math.max(0, marginKg), 'down').text,
      over: format.mass(Math.max(0, -marginKg), 'up').text,
    })
  }
}

/** What the rider's fitting says of one wheelset. */
export function RiderVerdict({ verdict }: { verdict: Pick<WheelsetVerdict, 'verdict' | 'marginKg' | 'codes'> }) {
  const word = useVerdictWord()
  return <Verdict standing={standings[verdict.verdict]}>{word(verdict)}</Verdict>
}
