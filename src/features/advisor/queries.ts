import { queryOptions, useQuery } from '@tanstack/react-query'
import { adviceChanges, type Advice, type RiderAnswers } from '#contract/advisor.ts'
import { api } from '../../lib/api.ts'
import { adviceQuery, type Draft } from '../../lib/fitting.ts'

/** Where the advice turns; asked for again when rules or range have changed. The answers travel in the body, never in an address. */
export const changesQuery = (answers: RiderAnswers, rulesVersion: string) =>
  queryOptions({
    queryKey: ['advisor', 'changes', answers, rulesVersion],
    queryFn: ({ signal }) => api.post('/api/advice/changes', answers, adviceChanges, { signal }),
    staleTime: 5 * 60_000,
  })

/** Any mass does: kit, bike and bags do not depend on it. */
const STAND_IN_KG = 75

/**
 * What the server counts for kit, bike and bags on this ride, before the rider's own mass is known. The defaults live on the
 * server; asking it keeps one truth.
 */
export function useOtherParts(draft: Draft): Pick<Advice, 'parts' | 'assumed'> | null {
  const { ride, assist, kitMassKg, bikeMassKg, luggageKg } = draft
  const asked: RiderAnswers | null = ride
    ? {
        ride,
        brakes: draft.brakes ?? 'disc',
        tyre: null,
        bodyMassKg: STAND_IN_KG,
        ...(assist === undefined ? {} : { assist }),
        ...(kitMassKg === undefined ? {} : { kitMassKg }),
        ...(bikeMassKg === undefined ? {} : { bikeMassKg }),
        ...(luggageKg === undefined ? {} : { luggageKg }),
      }
    : null
  const { data } = useQuery({ ...adviceQuery(asked as RiderAnswers), enabled: asked !== null })
  return data && asked ? data : null
}
