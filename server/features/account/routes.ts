import { rateLimit } from 'express-rate-limit'
import { z } from 'zod'
import { bike, bikeFacts, bikeList, ownOrderList, session, signIn } from '#contract/account.ts'
import { nothing } from '#contract/common.ts'
import { AppError } from '../../http/errors.ts'
import { route, signedIn, type Call, type Route } from '../../http/route.ts'
import { readUser, renewSession } from '../../http/session.ts'
import { addBike, changeBike, checkSignIn, listBikes, listOwnOrders, removeBike } from './service.ts'

const feature = 'account'
const everyRole = ['rider', 'support', 'product', 'admin'] as const
const bikeId = z.object({ bikeId: z.coerce.number<string>().int().min(1) })

const emailOf = (body: unknown) =>
  signIn.shape.email.safeParse((body as { email?: unknown } | undefined)?.email).data?.toLowerCase() ?? ''

/** Failed sign-ins are counted by caller and account; good ones are not, so nobody can shut out somebody else from elsewhere. */
const limiter = rateLimit({
  windowMs: 5 * 60_000,
  limit: 20,
  standardHeaders: 'draft-8',
  legacyHeaders: false,
  skipSuccessfulRequests: true,
  keyGenerator: (req) => `${req.ip ?? ''} ${emailOf(req.body)}`,
  validate: { keyGeneratorIpFallback: false },
  handler: (_req, _res, next) => {
    next(new AppError('too-many-tries', 429))
  },
})

const withinLimit = ({ req, res }: Pick<Call<unknown, unknown, unknown>, 'req' | 'res'>) =>
  new Promise<void>((resolve, reject) => {
    void limiter(req, res, (error?: unknown) => {
      if (error instanceof Error) reject(error)
      else resolve()
    })
  })

const view = (user: Awaited<ReturnType<typeof readUser>>) => ({
  user: user && { email: user.email, name: user.name, role: user.role, locale: user.locale },
})

export const accountRoutes: Route[] = [
  route(
    {
      method: 'post',
      path: '/api/session',
      feature,
      access: 'anyone',
      summary: 'Sign in',
      body: signIn,
      reply: session,
    },
    async (call) => {
      await withinLimit(call)
      const userId = await checkSignIn(call.body)
      await renewSession(call.req)
      call.req.session.userId = userId
      return view(await readUser(userId))
    },
  ),
  route(
    { method: 'get', path: '/api/session', feature, access: 'anyone', summary: 'Who am I', reply: session },
    ({ user }) => Promise.resolve(view(user)),
  ),
  route(
    { method: 'delete', path: '/api/session', feature, access: 'anyone', summary: 'Sign out', reply: nothing },
    async ({ req, res }) => {
      await new Promise<void>((resolve, reject) => {
        req.session.destroy((error) => {
          if (error) reject(error instanceof Error ? error : new Error('session could not be ended'))
          else resolve()
        })
      })
      res.clearCookie('felloe', { path: '/' })
      return {}
    },
  ),
  route(
    {
      method: 'get',
      path: '/api/account/bikes',
      feature,
      access: everyRole,
      summary: 'My bike passports',
      reply: bikeList,
    },
    (call) => listBikes(signedIn(call).id),
  ),
  route(
    {
      method: 'post',
      path: '/api/account/bikes',
      feature,
      access: everyRole,
      summary: 'Keep a bike',
      body: bikeFacts,
      reply: bike,
      status: 201,
      idempotency: 'optional',
    },
    (call) => addBike(signedIn(call).id, call.body),
  ),
  route(
    {
      method: 'put',
      path: '/api/account/bikes/:bikeId',
      feature,
      access: everyRole,
      summary: 'Change a bike',
      params: bikeId,
      body: bikeFacts,
      reply: bike,
    },
    (call) => changeBike(signedIn(call).id, call.params.bikeId, call.body),
  ),
  route(
    {
      method: 'delete',
      path: '/api/account/bikes/:bikeId',
      feature,
      access: everyRole,
      summary: 'Forget a bike',
      params: bikeId,
      reply: nothing,
    },
    async (call) => {
      await removeBike(signedIn(call).id, call.params.bikeId)
      return {}
    },
  ),
  route(
    {
      method: 'get',
      path: '/api/account/orders',
      feature,
      access: everyRole,
      summary: 'My orders',
      reply: ownOrderList,
    },
    (call) => listOwnOrders(signedIn(call).id),
  ),
]
