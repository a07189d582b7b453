import type { ReactElement } from 'react'
import type { Opened } from '#shared/proof-test/entries'
import { ButtonLink } from '../../../components/button'
import { PlainScreen } from '../../../components/plain-screen'
import { paths } from '../../../paths'
import { WithRun } from '../loading'
import type { Run } from '../use-run'
import { RunScreen } from './run-screen'

function NotYours({ run, opened }: { run: Run; opened: Opened }): ReactElement {
  const { lead, witness } = opened.people
  const attends = run.me.part === 'witness'
  return (
    <PlainScreen
      title={attends ? 'You attend this test as its witness' : 'You have no part in this test'}
      actions={
        attends ? (
          <ButtonLink kind="next" to={paths.attendProofTest.href(run.testId)}>
            Attend {opened.number}
          </ButtonLink>
        ) : (
          <ButtonLink to={paths.proofTest.href(run.testId)}>Read its record</ButtonLink>
        )
      }
    >
      <p>
        {lead.name} leads it, {witness.name} is its witness.{' '}
        {attends ? 'The lead runs it on the tablet behind the shield.' : 'Only they and the pump hand write in it.'}
      </p>
    </PlainScreen>
  )
}

/** The run belongs to the lead and the pump hand; the witness has a view of their own. */
export function RunPage({ testId }: { testId: string }): ReactElement {
  return (
    <WithRun testId={testId}>
      {(run, opened) =>
        run.me.part === 'lead' || run.me.part === 'pump hand' ? (
          <RunScreen run={run} opened={opened} />
        ) : (
          <NotYours run={run} opened={opened} />
        )
      }
    </WithRun>
  )
}
