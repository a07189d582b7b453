import { clocksApart } from '#shared/ledger/clocks'
import { shortDate, clockTime } from '../../../lib/dates'
import type { RecordView } from '../record-view'

const moment = (at: string): string => `${shortDate(at)}, ${clockTime(at, { seconds: true })}`

/** Every entry as it stands in the ledger: who made it, when by the device's clock, when by the server's, and what it goes against. */
export function LedgerList({ record }: { record: RecordView }) {
  const { entries } = record
  return (
    <details className="pt-5">
      <summary className="min-h-12 cursor-pointer py-2 text-18 font-semibold">Every entry, {entries.length} in all, by both clocks</summary>
      <div className="overflow-x-auto">
        <table aria-label="Every entry by both clocks" className="w-full border-t border-ink text-left font-condensed">
          <thead>
            <tr className="border-b border-ink align-bottom">
              <th className="py-1.5 pr-3 text-right font-semibold">Entry</th>
              <th className="py-1.5 pr-3 font-semibold">What</th>
              <th className="py-1.5 pr-3 font-semibold">Who</th>
              <th className="py-1.5 pr-3 font-semibold">Made, by the device’s clock</th>
              <th className="py-1.5 pr-3 font-semibold">Received, by the server’s clock</th>
              <th className="py-1.5 font-semibold">Against</th>
            </tr>
          </thead>
          <tbody>
            {entries.map((entry) => {
              const apart = clocksApart(entry)
              return (
                <tr key={entry.id} className="border-b border-hairline align-top">
                  <td className="py-1.5 pr-3 text-right">{entry.seq}</td>
                  <td className="py-1.5 pr-3">{entry.kind.replaceAll('-', ' ')}</td>
                  <td className="py-1.5 pr-3">{record.nameOf(entry.authorId)}</td>
                  <td className="py-1.5 pr-3 whitespace-nowrap">{moment(entry.observedAt)}</td>
                  <td className="py-1.5 pr-3">
                    <span className="whitespace-nowrap">{moment(entry.receivedAt)}</span>
                    {apart !== '' && <strong className="block font-semibold">{apart}</strong>}
                  </td>
                  <td className="py-1.5">
                    {entry.irregular.length > 0 && <strong className="text-stop-ink">{entry.irregular.join(', ')}</strong>}
                  </td>
                </tr>
              )
            })}
          </tbody>
        </table>
      </div>
    </details>
  )
}
