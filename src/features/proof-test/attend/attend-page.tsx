import type { ReactElement } from 'react'
import { ButtonLink } from '../../../components/button'
import { PlainScreen } from '../../../components/plain-screen'
import { paths } from '../../../paths'
import { WithRun } from '../loading'
import { AttendScreen } from './attend-screen'

/** The witness's live view of a test; whoever else is named in it may look on. */
export function AttendPage({ testId }: { testId: string }): ReactElement {
  return (
    <WithRun testId={testId}>
      {(run, opened) =>
        run.me.part === null ? (
          <PlainScreen
            title="You have no part in this test"
            actions={<ButtonLink to={paths.proofTest.href(testId)}>Read its record</ButtonLink>}
          >
            <p>
              {opened.people.lead.name} leads it, {opened.people.witness.name} is its witness.
            </p>
          </PlainScreen>
        ) : (
          <AttendScreen run={run} opened={opened} />
        )
      }
    </WithRun>
  )
}
