import { redirect, type LoaderFunctionArgs } from 'react-router-dom'
import type { QueryClient } from '@tanstack/react-query'
import { sessionQuery } from '../features/people/api/get-session'
import { isSignedOut } from '../lib/problem'
import { paths } from '../paths'

/** Lets nobody in without a session; the way back leads to the page that was asked for. */
export const requireSession =
  (client: QueryClient) =>
  async ({ request }: LoaderFunctionArgs) => {
    try {
      await client.ensureQueryData(sessionQuery())
      return null
    } catch (error) {
      if (!isSignedOut(error)) throw error
      const { pathname, search } = new URL(request.url)
      return redirect(paths.signIn.href({ next: pathname + search }))
    }
  }

/** The same before there is a router: the address becomes that of the sign-in, and leads back. */
export async function askWhoIsHere(client: QueryClient): Promise<void> {
  try {
    await client.ensureQueryData(sessionQuery())
  } catch (error) {
    // What else went wrong is said by the screen, which asks again.
    if (!isSignedOut(error)) return
    const { pathname, search } = window.location
    window.history.replaceState(null, '', paths.signIn.href({ next: pathname + search }))
  }
}
