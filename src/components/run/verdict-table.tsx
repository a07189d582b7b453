import type { ReactElement } from 'react'
import { Mark } from '../marks'
import type { MarkName } from '../marks'
import { setPercent } from '../typeset'
import type { Verdict } from './verdict-scale'

export interface VerdictRow {
  id: string
  verdict: Verdict
  /** What was read, for example "Softening, 50 to 75". */
  what: string
  reading: string
  limit: string
}

const MARK: Record<Verdict, MarkName> = {
  within: 'within',
  beyond: 'beyond',
  undecided: 'undecided',
  wait: 'wait',
  'not-read': 'not-read',
}

/** The word beside each mark: no state is told by its shape alone. */
export const verdictWord: Record<Verdict, string> = {
  within: 'Within',
  beyond: 'Beyond',
  undecided: 'Undecided',
  wait: 'Wait',
  'not-read': 'Not read',
}

const WORD: Record<Verdict, string> = {
  within: 'font-medium text-sound',
  beyond: 'font-semibold text-stop-ink',
  undecided: 'font-semibold text-ink',
  wait: 'font-semibold text-ink',
  'not-read': 'text-ink',
}

const HEAD = 'pb-1 text-left font-condensed text-16 font-medium text-graphite'

/** Every criterion on one line: verdict, what was read, reading, limit. On a phone the line folds in two. */
export function VerdictTable({ rows, caption }: { rows: VerdictRow[]; caption: string }): ReactElement {
  return (
    <table className="block w-full border-collapse tablet:table">
      <caption className="sr-only">{caption}</caption>
      <thead className="sr-only tablet:not-sr-only tablet:table-header-group">
        <tr>
          <th scope="col" className="w-[34px]">
            <span className="sr-only">Mark</span>
          </th>
          <th scope="col" className={`${HEAD} w-[86px]`}>
            Verdict
          </th>
          <th scope="col" className={HEAD}>
            What was read
          </th>
          <th scope="col" className={`${HEAD} w-px text-right`}>
            Reading
          </th>
          <th scope="col" className={`${HEAD} w-px text-right`}>
            Limit
          </th>
        </tr>
      </thead>
      <tbody className="block tablet:table-row-group">
        {rows.map((row) => {
          const told = row.verdict !== 'not-read'
          return (
            <tr
              key={row.id}
              className="grid min-h-[56px] grid-cols-[32px_1fr_auto] items-center gap-x-2 border-t border-hairline py-2 tablet:table-row tablet:h-[38px] tablet:py-0"
            >
              <td className="row-span-2 tablet:table-cell tablet:pr-[10px] tablet:align-middle">
                <Mark name={MARK[row.verdict]} size={24} />
              </td>
              <td className={`whitespace-nowrap text-18 tablet:table-cell tablet:pr-4 ${WORD[row.verdict]}`}>{verdictWord[row.verdict]}</td>
              <th scope="row" className="col-start-2 row-start-2 text-left text-16 font-normal text-ink tablet:table-cell tablet:text-18">
                {setPercent(row.what)}
              </th>
              <td
                className={`col-start-3 row-start-1 whitespace-nowrap text-right text-18 text-ink tablet:table-cell ${told ? 'font-semibold' : ''}`}
              >
                {setPercent(row.reading)}
              </td>
              <td className="col-start-3 row-start-2 whitespace-nowrap text-right text-16 text-ink tablet:table-cell tablet:pl-4 tablet:text-18">
                {setPercent(row.limit)}
              </td>
            </tr>
          )
        })}
      </tbody>
    </table>
  )
}
