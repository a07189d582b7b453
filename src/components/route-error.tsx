import { isRouteErrorResponse, useLocation, useRouteError } from 'react-router-dom'
import { newVersion } from '../lib/new-version'
import { Disconnected, ProblemError, UnreadableAnswer, sayWhatFailed } from '../lib/problem'
import { paths } from '../paths'
import { Button, ButtonLink } from './button'
import { PlainScreen } from './plain-screen'

const again = (
  <Button kind="next" onClick={() => window.location.reload()}>
    Load this page again
  </Button>
)
const today = <ButtonLink to={paths.today.href()}>Go to Today</ButtonLink>

/** What an address that leads nowhere says. */
export function NotFound() {
  return (
    <PlainScreen
      title="Nothing is kept at this address"
      actions={
        <ButtonLink kind="next" to={paths.today.href()}>
          Go to Today
        </ButtonLink>
      }
    >
      <p>It may be mistyped, or belong to a shop you are not in. Open it from its list.</p>
    </PlainScreen>
  )
}

/** The screen in place of one that failed: what is so, then what to do. */
export function RouteError() {
  const error = useRouteError()
  const { pathname, search } = useLocation()
  const status = isRouteErrorResponse(error) || error instanceof ProblemError ? error.status : undefined
  if (status === 404) return <NotFound />
  if (status === 401) {
    return (
      <PlainScreen
        title="You are signed out"
        actions={
          <ButtonLink kind="next" to={paths.signIn.href({ next: pathname + search })}>
            Sign in again
          </ButtonLink>
        }
      >
        <p>Your session has ended. Sign in again and this page opens where you left it.</p>
      </PlainScreen>
    )
  }
  if (status === 403) {
    return (
      <PlainScreen mark="beyond" title="Your role doesn't open this" actions={today}>
        <p>{error instanceof ProblemError ? error.detail : 'Ask the owner of the shop.'}</p>
      </PlainScreen>
    )
  }
  if (error instanceof ProblemError && error.code === 'altered') {
    return (
      <PlainScreen mark="stop" title="This record can’t be shown: it was altered" actions={today}>
        <p>{error.detail}</p>
      </PlainScreen>
    )
  }
  if (error instanceof Disconnected) {
    return (
      <PlainScreen
        mark="not-connected"
        title="Not connected to the server"
        actions={
          <>
            {again}
            {today}
          </>
        }
      >
        <p>Nothing old is shown in its place. Look at the network of this device, then load the page again.</p>
        <p className="mt-2">
          Readings that were entered on this device are still kept on it. A test that was opened on it goes on from Today.
        </p>
      </PlainScreen>
    )
  }
  if (error instanceof UnreadableAnswer) {
    return (
      <PlainScreen
        title="This page is older than the server"
        actions={
          <Button kind="next" onClick={() => void newVersion.load()}>
            Update it
          </Button>
        }
      >
        <p>Bring it up to date. If a press is loaded: open the release valve slowly first.</p>
      </PlainScreen>
    )
  }
  return (
    <PlainScreen
      mark="wait"
      title="This screen could not be drawn"
      actions={
        <>
          {again}
          {today}
        </>
      }
    >
      <p>{error instanceof ProblemError ? error.detail : sayWhatFailed(error)}</p>
      {error instanceof Error && !(error instanceof ProblemError) && (
        <p className="mt-3 border-t border-hairline pt-3 font-mono text-14 break-words text-graphite">{error.message}</p>
      )}
    </PlainScreen>
  )
}
