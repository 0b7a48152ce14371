/** Looking up orders one has no key for is counted by caller; good look-ups are not. */
import { rateLimit } from 'express-rate-limit'
import type { Request, Response } from 'express'
import { AppError } from '../../http/errors.ts'

const limiter = rateLimit({
  windowMs: 5 * 60_000,
  limit: 100,
  standardHeaders: 'draft-8',
  legacyHeaders: false,
  skipSuccessfulRequests: true,
  handler: (_req, _res, next) => {
    next(new AppError('too-many-tries', 429))
  },
})

/** @throws AppError too-many-tries, 429 */
export const withinGuesses = (req: Request, res: Response) =>
  new Promise<void>((resolve, reject) => {
    void limiter(req, res, (error?: unknown) => {
      if (error instanceof Error) reject(error)
      else resolve()
    })
  })
