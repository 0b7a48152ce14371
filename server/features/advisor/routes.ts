import { advice, adviceChanges, keptAdvice, riderAnswers } from '#contract/advisor.ts'
import { route, type Route } from '../../http/route.ts'
import { giveAdvice, keepAdvice, whatChanges } from './service.ts'

const feature = 'advisor'

export const advisorRoutes: Route[] = [
  route(
    {
      method: 'post',
      path: '/api/advice',
      feature,
      access: 'anyone',
      summary: 'Advice for one rider over every wheelset on sale; stores nothing',
      body: riderAnswers,
      reply: advice,
      asMade: true,
      sessionless: true,
    },
    ({ deps, body }) => giveAdvice(deps, body),
  ),
  route(
    {
      method: 'post',
      path: '/api/advice/changes',
      feature,
      access: 'anyone',
      summary: 'Where that advice turns, and which answers it hangs on; stores nothing',
      body: riderAnswers,
      reply: adviceChanges,
      sessionless: true,
    },
    ({ deps, body }) => whatChanges(deps, body),
  ),
  route(
    {
      method: 'post',
      path: '/api/advice-snapshots',
      feature,
      access: 'anyone',
      summary: 'The same, kept under an id because the rider chose a wheelset on the strength of it',
      body: riderAnswers,
      reply: keptAdvice,
      status: 201,
      idempotency: 'optional',
    },
    async ({ deps, body, user }) => {
      const { adviceId, sha256 } = await keepAdvice(deps, body, user?.id ?? null)
      return { adviceId, sha256 }
    },
  ),
]
