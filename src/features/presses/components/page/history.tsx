import { typedWords } from '#shared/instruments/words'
import type { PressEvent, PressState } from '#shared/press/state'
import { AttachmentStrip } from '../../../../components/attachments/attachment-strip'
import { TextLink } from '../../../../components/button'
import { Mark } from '../../../../components/marks'
import { setPercent } from '../../../../components/typeset'
import type { Files } from '../../../../lib/attachment-held'
import type { Placed } from '../../../../lib/attachment-places'
import { dateAndTime, shortDate } from '../../../../lib/dates'
import { paths } from '../../../../paths'

const TURNS: Record<NonNullable<PressEvent['clearance']>, string> = {
  ended: 'The clearance ended with it.',
  held: 'The clearance was suspended with it.',
  'holds again': 'The clearance held again from then on.',
}

const MARKS = { within: 'within', stop: 'stop', 'under-way': 'under-way' } as const

function Dot({ event }: { event: PressEvent }) {
  const marked = event.mark === 'plain' ? null : MARKS[event.mark]
  return (
    <span className="relative z-10 flex w-[22px] shrink-0 justify-center self-start bg-steel py-0.5">
      {marked ? <Mark name={marked} size={20} /> : <span className="my-1 size-2.5 rounded-full border-2 border-ink" />}
    </span>
  )
}

type HistoryProps = {
  events: readonly (PressEvent & { seqs: readonly number[] })[]
  people: Readonly<Record<string, string>>
  photos: readonly Placed[]
  files: Files
}

/** What happened to the press, the latest first, on one line of time. */
export function History({ events, people, photos, files }: HistoryProps) {
  return (
    <ol className="relative before:absolute before:top-2 before:bottom-2 before:left-[10px] before:w-px before:bg-rule">
      {[...events].reverse().map((event) => (
        <li key={event.seq} className="flex gap-3 pb-3">
          <Dot event={event} />
          <div className="min-w-0">
            <p className="font-semibold">
              {event.proofTestId === null ? (
                setPercent(event.text)
              ) : (
                <TextLink to={paths.proofTest.href(event.proofTestId)}>{setPercent(event.text)}</TextLink>
              )}
            </p>
            <p className="text-14 text-graphite max-desktop:text-16">
              {shortDate(event.at)}
              {people[event.authorId] !== undefined && `, ${people[event.authorId]}`}
            </p>
            {event.clearance !== null && <p className="text-14 font-medium max-desktop:text-16">{TURNS[event.clearance]}</p>}
            <AttachmentStrip
              className="mt-2"
              files={files}
              shown={photos
                .filter(({ seq }) => event.seqs.includes(seq))
                .map(({ attachment, at, by }) => ({
                  attachment,
                  place: event.text,
                  note: [people[by], dateAndTime(at)].filter(Boolean).join(', '),
                }))}
            />
          </div>
        </li>
      ))}
    </ol>
  )
}

/** Examinations of one test, one after the other, are one thing that happened. */
export function gathered(events: readonly PressEvent[]): (PressEvent & { seqs: readonly number[] })[] {
  const told: (PressEvent & { seqs: number[] })[] = []
  for (const event of events) {
    const last = told.at(-1)
    const same =
      event.kind === 'joint-examined' &&
      event.mark === 'plain' &&
      last?.kind === event.kind &&
      last.mark === 'plain' &&
      last.clearance === null &&
      last.proofTestId === event.proofTestId
    if (last && same) {
      last.seqs.push(event.seq)
      last.text = `${last.seqs.length} joints examined and accepted`
      last.at = event.at
      last.clearance = event.clearance
    } else told.push({ ...event, seqs: [event.seq] })
  }
  return told
}

/** What happened, with the day on which a clearance ran out: nobody enters that, and it ends the clearance all the same. */
export function toldUntil(state: Pick<PressState, 'history' | 'clearance' | 'headSeq'>, today: string): PressEvent[] {
  const { history, clearance, headSeq } = state
  if (clearance.is !== 'cleared' || clearance.clearance.until >= today) return history
  const { until, load } = clearance.clearance
  const ranOut: PressEvent = {
    seq: headSeq + 1,
    at: until,
    authorId: '',
    kind: 'ran-out',
    text: `The clearance up to ${typedWords(load)} ran out`,
    mark: 'stop',
    proofTestId: null,
    clearance: null,
    attachments: [],
  }
  return [...history, ranOut]
}
