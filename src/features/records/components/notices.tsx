import type { ReactNode } from 'react'
import { cautionsOf } from '#shared/proof-test/record'
import { Mark, type MarkName } from '../../../components/marks'
import { dateAndTime } from '../../../lib/dates'
import type { RecordView } from '../record-view'

interface Notice {
  title: string
  mark: MarkName
  lines: string[]
}

function noticesOf(record: RecordView): Notice[] {
  const { state, evaluation, differences, nameOf } = record
  const { stopped } = state
  const notices: Notice[] = [
    {
      title: 'Entries of a kind this page does not know',
      mark: 'wait',
      lines:
        state.unknownKinds > 0 ? [`${state.unknownKinds} in all. Load the page again to update it before you rely on this record.`] : [],
    },
    {
      title: 'After the seal',
      mark: 'stop',
      lines:
        state.lateFacts > 0
          ? [
              `${state.lateFacts} ${state.lateFacts === 1 ? 'entry' : 'entries'} arrived after the countersignature. The clearance is suspended until somebody has looked.`,
            ]
          : [],
    },
    {
      title: 'Today’s arithmetic differs from what was frozen at the conclusion',
      mark: 'undecided',
      lines: differences.map(({ what, frozen, today }) => `${what}: frozen ${frozen}; today ${today}.`),
    },
    {
      title: 'Stopped',
      mark: 'stop',
      lines: stopped
        ? [
            `${stopped.why.replace(/\.$/, '')}. Called by ${nameOf(stopped.by)}, ${dateAndTime(stopped.at)}${stopped.atPercent === null ? '' : `, at ${stopped.atPercent}\u202f%`}.`,
          ]
        : [],
    },
    { title: 'Against “accepted”', mark: 'beyond', lines: record.standing === 'under way' ? [] : evaluation.against },
    {
      title: 'Irregular entries',
      mark: 'undecided',
      lines: state.irregular.map(
        ({ seq, kind, rules }) => `Entry ${seq}, ${kind.replaceAll('-', ' ')}: against ${rules.join(', ')}. It happened, so it stands.`,
      ),
    },
    {
      title: 'Reasons given',
      mark: 'wait',
      lines: state.reasons.map(({ seq, rule, reason, by }) => `Entry ${seq}, ${rule}: ${reason} ${nameOf(by)}.`),
    },
    {
      title: 'Observed',
      mark: 'now',
      lines: state.observations.map(({ seq, what, note, by, at }) => `Entry ${seq}, ${what}: ${note} ${nameOf(by)}, ${dateAndTime(at)}.`),
    },
    {
      title: 'Declined to countersign',
      mark: 'stop',
      lines: state.declined.map(({ printedName, why, at }) => `${printedName}, ${dateAndTime(at)}: ${why}`),
    },
  ]
  return notices.filter(({ lines }) => lines.length > 0)
}

function NoticeBlock({ title, mark, children }: { title: string; mark: MarkName; children: ReactNode }) {
  return (
    <section className="flex gap-3 border-t border-hairline py-2">
      <Mark name={mark} size={20} className="mt-0.5 shrink-0" />
      <div className="min-w-0">
        <h2 className="text-16">{title}</h2>
        {children}
      </div>
    </section>
  )
}

/** Everything a reader must not miss beside the figures: what was irregular, seen, reasoned, or came late. */
export function Notices({ record }: { record: RecordView }) {
  const notices = noticesOf(record)
  if (notices.length === 0) return null
  return (
    <div className="pt-3">
      {notices.map(({ title, mark, lines }) => (
        <NoticeBlock key={title} title={title} mark={mark}>
          {lines.map((line) => (
            <p key={line}>{line}</p>
          ))}
        </NoticeBlock>
      ))}
    </div>
  )
}

/** What these figures are not. */
export function Cautions({ record }: { record: RecordView }) {
  return <p className="border-t border-hairline pt-3 pb-4 text-graphite">{cautionsOf(record.state, record.evaluation).join(' ')}</p>
}
