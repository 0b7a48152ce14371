/**
 * A state-changing call that a browser makes on behalf of another site is refused. Browsers always send Sec-Fetch-Site or
 * Origin with such calls; a caller that sends neither is a program of its own and carries no stranger's cookie.
 */
import type { RequestHandler } from 'express'
import { AppError } from './errors.ts'

const reading = new Set(['GET', 'HEAD', 'OPTIONS'])

export const sameSiteOnly =
  (publicUrl: string): RequestHandler =>
  (req, _res, next) => {
    if (reading.has(req.method)) {
      next()
      return
    }
    const site = req.get('sec-fetch-site')
    const origin = req.get('origin')
    const ownOrigins = [new URL(publicUrl).origin, `${req.protocol}://${req.get('host') ?? ''}`]
    const foreign =
      site !== undefined
        ? site !== 'same-origin' && site !== 'none'
        : origin !== undefined && !ownOrigins.includes(origin)
    next(foreign ? new AppError('other-site', 403) : undefined)
  }
