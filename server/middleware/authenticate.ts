import { parseCookie } from 'cookie'
import type { Request, RequestHandler } from 'express'
import type { AppContext } from '../context'
import { notSignedIn } from '../problem'
import { resumeSession } from '../services/sessions'
import type { SignedIn } from '../services/sessions'

export const sessionCookie = 'quarterload_session'

const signedIn = new WeakMap<Request, SignedIn>()

export function sessionTokenOf(request: Request): string | undefined {
  const header = request.headers.cookie
  return header === undefined ? undefined : parseCookie(header)[sessionCookie]
}

/** Refuses whoever has no living session on the server; the cookie alone proves nothing. */
export function authenticate(context: AppContext): RequestHandler {
  return async (request, _response, next) => {
    const token = sessionTokenOf(request)
    const session = token === undefined ? undefined : await resumeSession(context, token)
    if (session === undefined) throw notSignedIn()
    signedIn.set(request, session)
    next()
  }
}

/** The person behind a request that went through `authenticate`. */
export function personOf(request: Request): SignedIn {
  const session = signedIn.get(request)
  if (session === undefined) throw notSignedIn()
  return session
}
