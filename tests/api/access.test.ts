/** Who may call what, written out by hand: a route that is not in this table fails, so that a new one forces a decision. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Role } from '#contract/common.ts'
import { openApiPath } from '../../server/http/openapi.ts'
import { routes } from '../../server/routes.ts'
import { testApp, type TestApp } from '../support/test-app.ts'

const everyone = 'anyone'
const staffOf = { support: ['support', 'admin'], product: ['product', 'admin'] } satisfies Record<string, Role[]>
const signedIn: Role[] = ['rider', 'support', 'product', 'admin']

const expected: Record<string, typeof everyone | Role[]> = {
  'get /api/health/live': everyone,
  'get /api/health/ready': everyone,
  'get /api/openapi.json': everyone,
  'post /api/advice': everyone,
  'post /api/advice/changes': everyone,
  'post /api/advice-snapshots': everyone,
  'get /api/wheelsets': everyone,
  'get /api/wheelsets/:slug': everyone,
  'get /api/markets': everyone,
  'post /api/session': everyone,
  'get /api/session': everyone,
  'delete /api/session': everyone,
  'get /api/account/bikes': signedIn,
  'post /api/account/bikes': signedIn,
  'put /api/account/bikes/:bikeId': signedIn,
  'delete /api/account/bikes/:bikeId': signedIn,
  'get /api/account/orders': signedIn,
  'get /api/basket': everyone,
  'put /api/basket': everyone,
  'post /api/orders': everyone,
  'get /api/orders/:orderNumber': everyone,
  'post /api/orders/:orderNumber/refresh': everyone,
  'post /api/orders/:orderNumber/pay': everyone,
  'post /api/orders/:orderNumber/cancel': everyone,
  'post /api/webhooks/stripe': everyone,
  'get /api/desk/orders': staffOf.support,
  'get /api/desk/orders/:orderNumber': staffOf.support,
  'post /api/desk/orders/:orderNumber/reveal-mass': staffOf.support,
  'post /api/desk/orders/:orderNumber/refunds': staffOf.support,
  'post /api/desk/orders/:orderNumber/notes': staffOf.support,
  'get /api/product/wheelsets': staffOf.product,
  'get /api/product/wheelsets/:sku': staffOf.product,
  'patch /api/product/wheelsets/:sku': staffOf.product,
  'get /api/product/limits': staffOf.product,
  'post /api/product/limit-changes': staffOf.product,
  'get /api/product/limit-changes/:id/impact': staffOf.product,
  'post /api/product/limit-changes/:id/approve': staffOf.product,
  'post /api/product/limit-changes/:id/reject': staffOf.product,
  'get /api/product/rules': staffOf.product,
  'get /api/product/rules/:name': staffOf.product,
  'post /api/product/rule-changes': staffOf.product,
  'post /api/product/rule-changes/:id/approve': staffOf.product,
  'post /api/product/rule-changes/:id/reject': staffOf.product,
  'get /api/product/audit': ['product', 'support', 'admin'],
}

const callers = ['anonymous', 'rider', 'support', 'product', 'admin'] as const
type Agent = ReturnType<TestApp['agent']>
let shop: TestApp
const agents = new Map<string, Agent>()

beforeAll(async () => {
  shop = await testApp()
  for (const who of callers) agents.set(who, who === 'anonymous' ? shop.agent() : await shop.signedIn(who))
}, 30_000)
afterAll(() => shop.close())

/** Values that let a call get as far as its role check and its input check; nothing is changed by an empty body. */
const filled = (path: string) =>
  path
    .replace(':slug', 'rowan-45-disc')
    .replace(':orderNumber', 'F26-999999')
    .replace(':sku', 'ROWAN-45-D')
    .replace(/:(id|bikeId)/, '999999')

it('the table names every route, and no other', () => {
  expect(routes.map(({ spec }) => `${spec.method} ${spec.path}`).sort()).toEqual(Object.keys(expected).sort())
})

describe.each(routes.map(({ spec }) => [spec.method, spec.path] as const))('%s %s', (method, path) => {
  const allowed = expected[`${method} ${path}`] ?? []
  it.each(callers)('called by %s', async (who) => {
    // Signing in and out would change who the shared visitors are.
    const agent =
      path === '/api/session' ? (who === 'anonymous' ? shop.agent() : await shop.signedIn(who)) : agents.get(who)
    if (!agent) throw new Error(`no visitor ${who}`)
    const call = agent[method](filled(path))
    const reply = await (method === 'get' || method === 'delete' ? call : call.send({}))
    if (allowed === 'anyone' || (who !== 'anonymous' && allowed.includes(who))) {
      expect([401, 403]).not.toContain(reply.status)
      expect(reply.status).toBeLessThan(500)
    } else {
      expect(reply.status).toBe(who === 'anonymous' ? 401 : 403)
      expect(reply.body).toMatchObject({ code: who === 'anonymous' ? 'sign-in-needed' : 'not-allowed' })
      expect(reply.type).toBe('application/problem+json')
    }
  })
})

describe('the OpenAPI document', () => {
  it('describes every route with its roles, and nothing else', async () => {
    const { body } = await shop.agent().get('/api/openapi.json').expect(200)
    const document = body as {
      openapi: string
      paths: Record<string, Record<string, { 'x-roles': string[]; responses: object }>>
    }
    expect(document.openapi).toBe('3.1.0')
    const described = Object.entries(document.paths).flatMap(([path, operations]) =>
      Object.entries(operations).map(([method, { 'x-roles': roles }]) => [`${method} ${path}`, roles] as const),
    )
    const wanted = Object.entries(expected).map(
      ([route, access]) => [openApiPath(route), access === 'anyone' ? ['anyone'] : access] as const,
    )
    const sorted = (list: readonly (readonly [string, readonly string[]])[]) =>
      [...list].map(([route, roles]) => [route, [...roles].sort()] as const).sort(([a], [b]) => a.localeCompare(b))
    expect(sorted(described)).toEqual(sorted(wanted))
  })
})

describe('calls from elsewhere', () => {
  it('a state-changing call on behalf of another site is refused, whoever is signed in', async () => {
    const rider = await shop.signedIn('rider')
    const foreign = await rider.post('/api/account/bikes').set('Sec-Fetch-Site', 'cross-site').send({})
    expect(foreign.body).toMatchObject({ status: 403, code: 'other-site' })
    const origin = await rider.put('/api/basket').set('Origin', 'https://elsewhere.example').send({})
    expect(origin.status).toBe(403)
  })
  it('a form cannot post: only JSON is read', async () => {
    await shop.agent().post('/api/advice').type('form').send({ ride: 'gravel' }).expect(415)
  })
  it('an unknown path is a problem too', async () => {
    const reply = await shop.agent().get('/api/nothing').expect(404)
    expect(reply.body).toMatchObject({ code: 'not-found', instance: '/api/nothing' })
  })
})
