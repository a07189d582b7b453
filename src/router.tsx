import type { QueryClient } from '@tanstack/react-query'
import { createBrowserRouter, type RouteObject } from 'react-router-dom'
import { NotFound, RouteError } from './components/route-error'
import { SkeletonPage } from './components/skeleton'
import { paths } from './paths'
import { requireSession, SignedIn, SignedInBare } from './routes/signed-in'

/** Each screen is a chunk of its own, fetched when it is opened. */
const signedInScreens: RouteObject[] = [
  { path: paths.today.pattern, lazy: () => import('./routes/today') },
  { path: paths.instruments.pattern, lazy: () => import('./routes/instruments') },
  { path: paths.newInstrument.pattern, lazy: () => import('./routes/instrument-form') },
  { path: paths.instrument.pattern, lazy: () => import('./routes/instrument') },
  { path: paths.editInstrument.pattern, lazy: () => import('./routes/instrument-form') },
  { path: paths.protocols.pattern, lazy: () => import('./routes/protocols') },
  { path: paths.newProtocol.pattern, lazy: () => import('./routes/protocol-form') },
  { path: paths.protocol.pattern, lazy: () => import('./routes/protocol') },
  { path: paths.newProtocolVersion.pattern, lazy: () => import('./routes/protocol-form') },
  { path: paths.presses.pattern, lazy: () => import('./routes/presses') },
  { path: paths.newPress.pattern, lazy: () => import('./routes/press-new') },
  { path: paths.press.pattern, lazy: () => import('./routes/press') },
  { path: paths.editPress.pattern, lazy: () => import('./routes/press-edit') },
  { path: paths.proofTest.pattern, lazy: () => import('./routes/proof-test-record') },
  { path: paths.planProofTest.pattern, lazy: () => import('./routes/plan-proof-test') },
  { path: paths.proofTests.pattern, lazy: () => import('./routes/proof-tests') },
  { path: paths.people.pattern, lazy: () => import('./routes/people') },
  { path: paths.settings.pattern, lazy: () => import('./routes/settings') },
  { path: paths.account.pattern, lazy: () => import('./routes/account') },
  { path: paths.more.pattern, lazy: () => import('./routes/more') },
]

/** Screens under load bring their own title block instead of the navigation. */
const bareScreens: RouteObject[] = [
  { path: paths.runProofTest.pattern, lazy: () => import('./routes/proof-test-run') },
  { path: paths.attendProofTest.pattern, lazy: () => import('./routes/proof-test-attend') },
]

export function createRouter(client: QueryClient) {
  const loader = requireSession(client)
  return createBrowserRouter([
    {
      ErrorBoundary: RouteError,
      HydrateFallback: SkeletonPage,
      children: [
        { path: paths.signIn.pattern, lazy: () => import('./routes/sign-in') },
        { path: paths.openShop.pattern, lazy: () => import('./routes/open-shop') },
        { loader, Component: SignedInBare, children: [{ ErrorBoundary: RouteError, children: bareScreens }] },
        {
          loader,
          Component: SignedIn,
          // A screen that fails keeps the navigation round it.
          children: [{ ErrorBoundary: RouteError, children: [...signedInScreens, { path: '*', Component: NotFound }] }],
        },
      ],
    },
  ])
}
