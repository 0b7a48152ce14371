import { useTranslation } from 'react-i18next'
import type { LimitCheck } from '#contract/support-desk.ts'
import { Verdict, type Standing } from '../../ui/Verdict.tsx'

const standings: Record<LimitCheck, Standing> = { within: 'within', 'no-margin': 'near', unconfirmed: 'mismatch' }

/** Whether the rider's total was checked against the wheelset's limit when the order was placed. */
export function LimitCheckMark({ check }: { check: LimitCheck }) {
  const { t } = useTranslation('support-desk')
  return <Verdict standing={standings[check]}>{t(`limitCheck.${check}`)}</Verdict>
}
