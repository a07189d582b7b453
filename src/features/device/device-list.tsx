import { Fragment, useState, type ReactElement, type ReactNode } from 'react'
import { Button, TextLink } from '../../components/button'
import { EntryPlace } from '../../components/entry-place'
import { Section } from '../../components/page'
import { dateAndTime } from '../../lib/dates'
import type { Sent, Waiting } from '../../lib/outbox-database'
import { testName } from '../../lib/test-names'
import { paths } from '../../paths'
import { entryWords } from './entry-words'

const FIRST_SHOWN = 12

function byTest<T extends Waiting>(entries: readonly T[]): [string, T[]][] {
  const groups = new Map<string, T[]>()
  for (const one of entries) groups.set(one.testId, [...(groups.get(one.testId) ?? []), one])
  return [...groups]
}

/** One entry: what it is, what it says as typed, when, and how far it has come. */
export function EntryRow({ one, state, children }: { one: Waiting; state: ReactNode; children?: ReactNode }): ReactElement {
  const { what, says } = entryWords(one.entry)
  return (
    <li className="border-b border-hairline py-2.5">
      <div className="grid gap-x-6 gap-y-1 tablet:grid-cols-[minmax(0,1fr)_11rem_auto] tablet:items-baseline">
        <p className="min-w-0">
          <span className="font-semibold">{what}</span>
          {says !== '' && <span className="ml-3 wrap-anywhere">{says}</span>}
        </p>
        <p className="text-graphite">{dateAndTime(one.entry.observedAt)}</p>
        <div className="tablet:w-40">{state}</div>
      </div>
      {children}
    </li>
  )
}

function TestEntries({ testId, entries }: { testId: string; entries: readonly Sent[] }): ReactElement {
  const [all, setAll] = useState(false)
  const newestFirst = entries.toSorted((a, b) => b.seq - a.seq)
  const shown = all ? newestFirst : newestFirst.slice(0, FIRST_SHOWN)
  const sealed = entries.filter((one) => one.sealed).length
  return (
    <Section level={3} className="mt-4" title={<TestTitle testId={testId} />} note={`${entries.length} from here, ${sealed} sealed`}>
      <ul className="border-t border-hairline">
        {shown.map((one) => (
          <EntryRow key={one.entry.id} one={one} state={<EntryPlace place={one.sealed ? 'sealed' : 'server'} />} />
        ))}
      </ul>
      {shown.length < entries.length && (
        <Button size="line" className="mt-3" onClick={() => setAll(true)}>
          Show {entries.length - shown.length} more
        </Button>
      )}
    </Section>
  )
}

export function TestTitle({ testId }: { testId: string }): ReactElement {
  return <TextLink to={paths.proofTest.href(testId)}>{testName(testId) ?? 'A proof test'}</TextLink>
}

/** What the server has, test by test. */
export function SentList({ sent }: { sent: readonly Sent[] }): ReactElement {
  return (
    <>
      {byTest(sent).map(([testId, entries]) => (
        <TestEntries key={testId} testId={testId} entries={entries} />
      ))}
    </>
  )
}

/** What waits, test by test, in the order it is sent. */
export function WaitingList({ waiting }: { waiting: readonly Waiting[] }): ReactElement {
  return (
    <>
      {byTest(waiting).map(([testId, entries]) => (
        <Fragment key={testId}>
          <h3 className="mt-3 mb-1 text-18">
            <TestTitle testId={testId} />
          </h3>
          <ul className="border-t border-hairline">
            {entries.map((one) => (
              <EntryRow key={one.entry.id} one={one} state={<EntryPlace place="tablet" />} />
            ))}
          </ul>
        </Fragment>
      ))}
    </>
  )
}
