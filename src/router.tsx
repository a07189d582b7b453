import type { QueryClient } from '@tanstack/react-query'
import { createBrowserRouter, matchRoutes, type RouteObject } from 'react-router-dom'
import { NotFound, RouteError } from './components/route-error'
import { SkeletonPage } from './components/skeleton'
import { paths } from './paths'
import { askWhoIsHere, requireSession } from './routes/session-guard'

/** Screens for whoever comes. */
const openScreens: RouteObject[] = [
  { path: paths.signIn.pattern, lazy: () => import('./routes/sign-in') },
  { path: paths.forgottenPassword.pattern, lazy: () => import('./routes/forgotten-password') },
  { path: paths.newPassword.pattern, lazy: () => import('./routes/new-password') },
  { path: paths.invitation.pattern, lazy: () => import('./routes/invitation') },
  { path: paths.openShop.pattern, lazy: () => import('./routes/open-shop') },
  { path: paths.checkRecord.pattern, lazy: () => import('./routes/check') },
  { path: paths.publicTag.pattern, lazy: () => import('./routes/public-tag') },
]

/** Each screen is a chunk of its own, fetched when it is opened. */
const signedInScreens: RouteObject[] = [
  { path: paths.today.pattern, lazy: () => import('./routes/today') },
  { path: paths.instruments.pattern, lazy: () => import('./routes/instruments') },
  { path: paths.newInstrument.pattern, lazy: () => import('./routes/instrument-form') },
  { path: paths.instrument.pattern, lazy: () => import('./routes/instrument') },
  { path: paths.editInstrument.pattern, lazy: () => import('./routes/instrument-form') },
  { path: paths.tooling.pattern, lazy: () => import('./routes/tooling') },
  { path: paths.newTool.pattern, lazy: () => import('./routes/tooling-form') },
  { path: paths.tool.pattern, lazy: () => import('./routes/tooling-piece') },
  { path: paths.editTool.pattern, lazy: () => import('./routes/tooling-form') },
  { path: paths.protocols.pattern, lazy: () => import('./routes/protocols') },
  { path: paths.newProtocol.pattern, lazy: () => import('./routes/protocol-form') },
  { path: paths.protocol.pattern, lazy: () => import('./routes/protocol') },
  { path: paths.newProtocolVersion.pattern, lazy: () => import('./routes/protocol-form') },
  { path: paths.presses.pattern, lazy: () => import('./routes/presses') },
  { path: paths.newPress.pattern, lazy: () => import('./routes/press-new') },
  { path: paths.press.pattern, lazy: () => import('./routes/press') },
  { path: paths.editPress.pattern, lazy: () => import('./routes/press-edit') },
  { path: paths.pressTag.pattern, lazy: () => import('./routes/press-tag') },
  { path: paths.calendar.pattern, lazy: () => import('./routes/calendar') },
  { path: paths.proofTest.pattern, lazy: () => import('./routes/proof-test-record') },
  { path: paths.planProofTest.pattern, lazy: () => import('./routes/plan-proof-test') },
  { path: paths.proofTests.pattern, lazy: () => import('./routes/proof-tests') },
  { path: paths.people.pattern, lazy: () => import('./routes/people') },
  { path: paths.mail.pattern, lazy: () => import('./routes/mail') },
  { path: paths.letter.pattern, lazy: () => import('./routes/letter') },
  { path: paths.settings.pattern, lazy: () => import('./routes/settings') },
  { path: paths.account.pattern, lazy: () => import('./routes/account') },
  { path: paths.more.pattern, lazy: () => import('./routes/more') },
  { path: paths.thisDevice.pattern, lazy: () => import('./routes/this-device') },
  { path: paths.help.pattern, lazy: () => import('./routes/help') },
  { path: paths.helpTopic.pattern, lazy: () => import('./routes/help-topic') },
]

/** Screens under load bring their own title block instead of the navigation. */
const bareScreens: RouteObject[] = [
  { path: paths.runProofTest.pattern, lazy: () => import('./routes/proof-test-run') },
  { path: paths.attendProofTest.pattern, lazy: () => import('./routes/proof-test-attend') },
]

/** Asks for the session before a screen that needs one is fetched: who has none is spared its code. */
export async function findOutWhoIsHere(client: QueryClient): Promise<void> {
  if (matchRoutes(openScreens, window.location) === null) await askWhoIsHere(client)
}

export function createRouter(client: QueryClient) {
  const loader = requireSession(client)
  return createBrowserRouter([
    {
      ErrorBoundary: RouteError,
      HydrateFallback: SkeletonPage,
      children: [
        ...openScreens,
        {
          loader,
          lazy: async () => ({ Component: (await import('./routes/signed-in')).SignedInBare }),
          children: [{ ErrorBoundary: RouteError, children: bareScreens }],
        },
        {
          loader,
          lazy: async () => ({ Component: (await import('./routes/signed-in')).SignedIn }),
          // A screen that fails keeps the navigation round it.
          children: [{ ErrorBoundary: RouteError, children: [...signedInScreens, { path: '*', Component: NotFound }] }],
        },
      ],
    },
  ])
}
