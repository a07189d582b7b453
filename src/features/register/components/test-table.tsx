import type { ReactNode } from 'react'
import type { TestRow } from '#shared/api/proof-tests'
import { groupDigits, parseDecimal, unitLabel } from '#shared/units'
import { TextLink } from '../../../components/button'
import { DataTable, type Column } from '../../../components/data-table'
import { Mark } from '../../../components/marks'
import { classNames } from '../../../lib/class-names'
import { shortDate } from '../../../lib/dates'
import type { Sort } from '../../../lib/sort'
import { shortName } from '../../../lib/words'
import { outcomeOf, sealWord, whereOf } from './outcome'
import { ReachedBar } from './reached-bar'

function Load({ load }: { load: TestRow['ratedLoad'] }) {
  const parsed = parseDecimal(load.text)
  return (
    <span className="flex gap-1.5">
      <span className="w-7 text-right font-semibold">{groupDigits(load.text)}</span>
      <span>{unitLabel(load.unit, { plural: !(parsed.ok && parsed.value === 1) })}</span>
    </span>
  )
}

function columnsFor(userId: string): Column<TestRow>[] {
  const nowrap = 'whitespace-nowrap'
  return [
    {
      id: 'number',
      header: 'Test',
      names: true,
      sortable: true,
      className: nowrap,
      cell: (test) => <TextLink to={whereOf(test, userId)}>{test.number}</TextLink>,
    },
    { id: 'opened', header: 'Opened', sortable: true, className: nowrap, cell: (test) => shortDate(test.openedAt) },
    { id: 'press', header: 'Press', sortable: true, cell: (test) => test.pressName },
    { id: 'load', header: 'Rated load', from: 'desktop', className: nowrap, cell: (test) => <Load load={test.ratedLoad} /> },
    { id: 'protocol', header: 'Protocol', from: 'wide', cell: (test) => test.protocolName },
    {
      id: 'reached',
      header: 'Reached, of rated',
      cell: (test) => <ReachedBar reached={test.reachedPercent} stoppedAt={test.stoppedAtPercent} underWay={test.status === 'under way'} />,
    },
    {
      id: 'result',
      header: 'Result',
      className: nowrap,
      cell: (test) => {
        const { mark, word, stopped } = outcomeOf(test)
        return (
          <span className={classNames('flex items-center gap-2.5 font-medium', stopped && 'text-stop-ink')}>
            <Mark name={mark} size={19} />
            {word}
          </span>
        )
      },
    },
    { id: 'lead', header: 'Lead', className: nowrap, cell: (test) => shortName(test.leadName) },
    { id: 'witness', header: 'Witness', from: 'desktop', className: nowrap, cell: (test) => shortName(test.witnessName) },
    { id: 'seal', header: 'Seal', from: 'wide', className: classNames(nowrap, 'text-graphite'), cell: sealWord },
  ]
}

type TestTableProps = { tests: readonly TestRow[]; userId: string; sort: Sort; onSort: (sort: Sort) => void; nothing: ReactNode }

/** The register: how far each test climbed, what came of it, who answers for it. */
export function TestTable({ tests, userId, sort, onSort, nothing }: TestTableProps) {
  return (
    <DataTable
      caption="Proof tests of the shop"
      tight
      rows={tests}
      rowKey={(test) => test.id}
      columns={columnsFor(userId)}
      sort={sort}
      onSort={onSort}
      nothing={nothing}
      phoneRow={(test) => {
        const { mark, word, stopped } = outcomeOf(test)
        return {
          mark: <Mark name={mark} />,
          title: test.number,
          note: `${test.pressName}, ${shortDate(test.openedAt)}`,
          aside: <span className={classNames(stopped && 'text-stop-ink')}>{word}</span>,
          asideNote: `at ${test.reachedPercent}\u202f%`,
          to: whereOf(test, userId),
        }
      }}
    />
  )
}
