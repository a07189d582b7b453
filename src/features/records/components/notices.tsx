import type { ReactNode } from 'react'
import { cautionsOf } from '#shared/proof-test/record'
import { noticesOf } from '#shared/proof-test/record-words'
import { Mark, type MarkName } from '../../../components/marks'
import { LOCAL_DATES } from '../../../lib/dates'
import type { RecordView } from '../record-view'

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
  const notices = noticesOf(record, LOCAL_DATES)
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
