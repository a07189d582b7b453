import { useEffect, useState, type ReactElement, type ReactNode } from 'react'
import { useQueryClient } from '@tanstack/react-query'
import type { Opened } from '#shared/proof-test/entries'
import { Button, ButtonLink } from '../../components/button'
import { PlainScreen } from '../../components/plain-screen'
import { SkeletonPage } from '../../components/skeleton'
import { useAdoptShop } from '../../lib/here'
import { newVersion } from '../../lib/new-version'
import { Disconnected, isNotFound } from '../../lib/problem'
import { paths } from '../../paths'
import { showKept } from './api/get-entries'
import { useRun, type Run } from './use-run'

interface WithRunProps {
  testId: string
  children: (run: Run, opened: Opened) => ReactNode
}

function Failed({ error }: { error: unknown }): ReactElement {
  if (isNotFound(error)) {
    return (
      <PlainScreen title="There is no such test" actions={<ButtonLink to={paths.proofTests.href()}>Proof tests</ButtonLink>}>
        <p>It may belong to another shop. Sign in with the account of that shop.</p>
      </PlainScreen>
    )
  }
  const lost = error instanceof Disconnected
  return (
    <PlainScreen
      mark="not-connected"
      title={lost ? 'Not connected to the server' : 'This test cannot be shown'}
      actions={
        <Button kind="next" onClick={() => window.location.reload()}>
          Try again
        </Button>
      }
    >
      <p>
        {lost
          ? 'This test is not on this device yet. If the press is loaded: open the release valve slowly, then come back.'
          : 'Load the page again. If the press is loaded: open the release valve slowly first.'}
      </p>
    </PlainScreen>
  )
}

function Ready({ run, opened, children }: { run: Run; opened: Opened; children: WithRunProps['children'] }): ReactNode {
  useAdoptShop(opened.shop.id)
  return children(run, opened)
}

/** What this device kept of the test is looked up first: without a network it is all there is. */
function useKeptShown(testId: string): boolean {
  const client = useQueryClient()
  const [shown, setShown] = useState<string | null>(null)
  useEffect(() => {
    let left = false
    void showKept(client, testId).then(() => left || setShown(testId))
    return () => {
      left = true
    }
  }, [client, testId])
  return shown === testId
}

/** A test and its run, once they are here. The run needs an origin that the browser trusts with its storage. */
export function WithRun(props: WithRunProps): ReactNode {
  const shown = useKeptShown(props.testId)
  if (window.isSecureContext === false) {
    return (
      <PlainScreen mark="stop" title="No test is run over an open connection">
        <p>
          This address is neither https nor this machine, so the browser keeps no entries safely and gives no lock on the screen. Open the
          shop’s https address, or run it on the machine that serves it.
        </p>
      </PlainScreen>
    )
  }
  return shown ? <Loaded {...props} /> : <SkeletonPage />
}

function Loaded({ testId, children }: WithRunProps): ReactNode {
  const load = useRun(testId)
  if (load.is === 'loading') return <SkeletonPage />
  if (load.is === 'failed') return <Failed error={load.error} />
  const { opened } = load.run.state
  if (!opened) {
    return (
      <PlainScreen title="This test has not been opened">
        <p>Its first entry is missing. Plan a test from the press’s page.</p>
      </PlainScreen>
    )
  }
  if (load.run.state.unknownKinds > 0) {
    return (
      <PlainScreen
        title="This page is older than the test"
        actions={
          <Button kind="next" onClick={() => void newVersion.load()}>
            Update it
          </Button>
        }
      >
        <p>The test holds entries that this version does not know. If the press is loaded: open the release valve slowly, then update.</p>
      </PlainScreen>
    )
  }
  return (
    <Ready run={load.run} opened={opened}>
      {children}
    </Ready>
  )
}
