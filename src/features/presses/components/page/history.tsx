import type { PressEvent } from '#shared/press/state'
import { TextLink } from '../../../../components/button'
import { Mark } from '../../../../components/marks'
import { shortDate } from '../../../../lib/dates'
import { paths } from '../../../../paths'

const MARKS = { within: 'within', stop: 'stop', 'under-way': 'under-way' } as const

function Dot({ event }: { event: PressEvent }) {
  const marked = event.mark === 'plain' ? null : MARKS[event.mark]
  return (
    <span className="relative z-10 flex w-[22px] shrink-0 justify-center self-start bg-steel py-0.5">
      {marked ? <Mark name={marked} size={20} /> : <span className="my-1 size-2.5 rounded-full border-2 border-ink" />}
    </span>
  )
}

type HistoryProps = { events: readonly PressEvent[]; people: Readonly<Record<string, string>> }

/** What happened to the press, the latest first, on one line of time. */
export function History({ events, people }: HistoryProps) {
  return (
    <ol className="relative before:absolute before:top-2 before:bottom-2 before:left-[10px] before:w-px before:bg-rule">
      {[...events].reverse().map((event) => (
        <li key={event.seq} className="flex gap-3 pb-3">
          <Dot event={event} />
          <div className="min-w-0">
            <p className="font-semibold">
              {event.proofTestId === null ? event.text : <TextLink to={paths.proofTest.href(event.proofTestId)}>{event.text}</TextLink>}
            </p>
            <p className="text-14 text-graphite max-desktop:text-16">
              {shortDate(event.at)}
              {people[event.authorId] !== undefined && `, ${people[event.authorId]}`}
            </p>
          </div>
        </li>
      ))}
    </ol>
  )
}

/** Examinations of one test, one after the other, are one thing that happened. */
export function gathered(events: readonly PressEvent[]): PressEvent[] {
  const told: (PressEvent & { count: number })[] = []
  for (const event of events) {
    const last = told.at(-1)
    const same =
      event.kind === 'joint-examined' &&
      event.mark === 'plain' &&
      last?.kind === event.kind &&
      last.mark === 'plain' &&
      last.proofTestId === event.proofTestId
    if (last && same) {
      last.count += 1
      last.text = `${last.count} joints examined and accepted`
      last.at = event.at
    } else told.push({ ...event, count: 1 })
  }
  return told
}
