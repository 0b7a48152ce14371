/** Health and the published description of the API. */
import { QueryTypes } from 'sequelize'
import { z } from 'zod'
import { migrationNames } from '../migrations/index.ts'
import { AppError } from './errors.ts'
import { openApiDocument } from './openapi.ts'
import { route, type Route } from './route.ts'

const status = z.object({ status: z.literal('ok') })

export const healthRoutes: Route[] = [
  route(
    {
      method: 'get',
      path: '/api/health/live',
      feature: 'health',
      access: 'anyone',
      summary: 'The process answers',
      reply: status,
    },
    () => Promise.resolve({ status: 'ok' as const }),
  ),
  route(
    {
      method: 'get',
      path: '/api/health/ready',
      feature: 'health',
      access: 'anyone',
      summary: 'The database answers and every migration is in; 503 otherwise',
      reply: status,
    },
    async ({ deps }) => {
      try {
        const rows = await deps.db.query<{ name: string }>('SELECT name FROM migrations', { type: QueryTypes.SELECT })
        const executed = new Set(rows.map(({ name }) => name))
        if (migrationNames.some((name) => !executed.has(name))) throw new AppError('unavailable', 503)
      } catch {
        throw new AppError('unavailable', 503)
      }
      return { status: 'ok' as const }
    },
  ),
]

/** `allRoutes` is asked when called, so that the document holds this route as well. */
export const openApiRoute = (allRoutes: () => readonly Route[]): Route =>
  route(
    {
      method: 'get',
      path: '/api/openapi.json',
      feature: 'health',
      access: 'anyone',
      summary: 'This description of the API, OpenAPI 3.1',
      reply: z.record(z.string(), z.unknown()),
    },
    ({ deps }) => Promise.resolve(openApiDocument(allRoutes(), deps.config.PUBLIC_URL)),
  )
