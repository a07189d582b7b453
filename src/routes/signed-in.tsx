import { Outlet, redirect, type LoaderFunctionArgs } from 'react-router-dom'
import type { QueryClient } from '@tanstack/react-query'
import { sessionQuery } from '../features/people/api/get-session'
import { HereProvider } from '../features/people/components/here-provider'
import { SignedInFrame } from '../features/people/components/signed-in-frame'
import { weekday } from '../lib/dates'
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

/** Screens with navigation round them. */
export function SignedIn() {
  return (
    <HereProvider>
      <SignedInFrame day={weekday(new Date())}>
        <Outlet />
      </SignedInFrame>
    </HereProvider>
  )
}

/** Screens that fill the device themselves: the run and the witness's view. */
export function SignedInBare() {
  return (
    <HereProvider staysWhenSignedOut>
      <Outlet />
    </HereProvider>
  )
}
