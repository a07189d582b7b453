import { stringifySetCookie } from 'cookie'
import { Router } from 'express'
import type { Request, Response } from 'express'
import { changePasswordRequestSchema, signInRequestSchema } from '#shared/api/session'
import type { AppContext } from '../context'
import { authenticate, personOf, sessionCookie, sessionTokenOf } from '../middleware/authenticate'
import { parseBody } from '../middleware/validate'
import { presentSession } from '../presenters/people'
import { guestTestsOf } from '../services/guests'
import { changePassword, endSession, resumeSession, shopsOf, signIn, tokenFor } from '../services/sessions'
import type { Client, SignedIn } from '../services/sessions'

export function clientOf(request: Request): Client {
  return { address: request.ip ?? 'unknown', userAgent: request.get('user-agent') ?? '' }
}

function cookieOptions(context: AppContext) {
  return { name: sessionCookie, httpOnly: true, sameSite: 'lax', path: '/', secure: context.config.isHttps } as const
}

/** Sets the cookie and answers the session. */
export async function sendSignedIn(context: AppContext, response: Response, session: SignedIn, status: number): Promise<void> {
  response.append(
    'Set-Cookie',
    stringifySetCookie({ ...cookieOptions(context), value: tokenFor(context, session), expires: session.expiresAt }),
  )
  response.status(status).json(presentSession(session, await shopsOf(session.userId), await guestTestsOf(session.userId)))
}

export function sessionRoutes(context: AppContext): Router {
  const router = Router()

  router.post('/session', async (request, response) => {
    const body = parseBody(request, signInRequestSchema)
    await sendSignedIn(context, response, await signIn(context, body, clientOf(request)), 200)
  })

  router.get('/session', authenticate(context), async (request, response) => {
    const session = personOf(request)
    response.json(presentSession(session, await shopsOf(session.userId), await guestTestsOf(session.userId)))
  })

  // Signing out works without a session too: the cookie goes in any case.
  router.delete('/session', async (request, response) => {
    const token = sessionTokenOf(request)
    const session = token === undefined ? undefined : await resumeSession(context, token)
    if (session !== undefined) await endSession(context, session.sessionId)
    response.append('Set-Cookie', stringifySetCookie({ ...cookieOptions(context), value: '', maxAge: 0 }))
    response.status(204).end()
  })

  router.post('/session/password', authenticate(context), async (request, response) => {
    const body = parseBody(request, changePasswordRequestSchema)
    await changePassword(context, personOf(request), body, clientOf(request).address)
    response.status(204).end()
  })

  return router
}
