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

/** What the rider's fitting says of one wheelset. Margins are shown rounded down, an excess rounded up. */
export function RiderVerdict({ verdict }: { verdict: Pick<WheelsetVerdict, 'verdict' | 'marginKg'> }) {
  const { t } = useTranslation('catalogue')
  const format = useFormat()
  const { marginKg } = verdict
  return (
    <Verdict standing={standings[verdict.verdict]}>
      {t(`verdict.${verdict.verdict}`, { margin: format.mass(Math.max(0, marginKg), 'down').text, over: format.mass(Math.max(0, -marginKg), 'up').text })}
    </Verdict>
  )
}
