import type { ReactElement } from 'react'
import { Mark } from '../../../components/marks'
import { verdictWord, type VerdictRow } from '../../../components/run/verdict-table'
import { setPercent } from '../../../components/typeset'

/** What the stage says while its hold runs: narrow enough to lie beside the dial. */
export function SoFar({ rows, percent }: { rows: readonly VerdictRow[]; percent: number }): ReactElement {
  return (
    <ul aria-label={setPercent(`What was read at ${percent} % so far`)} className="border-t border-hairline">
      {rows.map((row) => (
        <li
          key={row.id}
          className="grid min-h-[42px] grid-cols-[28px_minmax(0,1fr)_auto] items-center gap-x-2 border-b border-hairline text-16 leading-[20px]"
        >
          <Mark name={row.verdict} size={20} />
          <span>
            <span className="font-medium">{setPercent(row.what)}</span>
            <span className="sr-only">, {verdictWord[row.verdict]}</span>
          </span>
          <span className="text-right">
            <span className="block text-18 font-semibold">{setPercent(row.reading)}</span>
            <span className="block text-graphite">{setPercent(row.limit)}</span>
          </span>
        </li>
      ))}
    </ul>
  )
}
