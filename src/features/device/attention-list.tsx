import { useState, type ReactElement } from 'react'
import { PROOF_TEST_ACTS } from '#shared/proof-test/entries'
import { Button } from '../../components/button'
import { Mark } from '../../components/marks'
import { outbox } from '../../lib/outbox'
import type { Refused } from '../../lib/outbox-database'
import { EntryRow, TestTitle } from './device-list'

const state = (
  <span className="inline-flex items-center gap-2 whitespace-nowrap">
    <Mark name="wait" size={18} /> needs attention
  </span>
)

function RefusedRow({ refused, mine }: { refused: Refused; mine: boolean }): ReactElement {
  const { entry, problem } = refused
  const [busy, setBusy] = useState(false)
  const isAct = PROOF_TEST_ACTS.has(entry.kind)
  const during = (work: Promise<unknown>): void => {
    setBusy(true)
    void work.finally(() => setBusy(false))
  }
  const rules = problem.rules?.length ? ` Rule ${problem.rules.join(', ')}.` : ''
  return (
    <EntryRow one={refused} state={state}>
      <p className="mt-1 text-graphite">
        <TestTitle testId={refused.testId} />
      </p>
      <p className="mt-1">
        {problem.detail}
        {rules}
      </p>
      <p className="mt-1 text-graphite">
        {isAct
          ? 'It was not done. Nothing else waits for it.'
          : 'It has happened, so it is kept here until the server takes it. Everything after it is sent.'}
        {!mine && ' Only the person who made it can have it sent.'}
      </p>
      <div className="mt-2 flex flex-wrap gap-3">
        {mine && (
          <Button size="line" busy={busy && 'Sending'} onClick={() => during(outbox.sendAgain(entry.id))}>
            Send again
          </Button>
        )}
        {isAct && (
          <Button size="line" onClick={() => during(outbox.dismiss(entry.ledgerId, entry.id))}>
            Read: take it off this list
          </Button>
        )}
      </div>
    </EntryRow>
  )
}

/** What the server refused, each with its reason and what can be done about it. */
export function AttentionList({ attention, me }: { attention: readonly Refused[]; me: string }): ReactElement {
  return (
    <ul className="border-t border-hairline">
      {attention.map((refused) => (
        <RefusedRow key={refused.entry.id} refused={refused} mine={refused.entry.authorId === me} />
      ))}
    </ul>
  )
}
