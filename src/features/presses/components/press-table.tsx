import type { ReactNode } from 'react'
import type { PressRow } from '#shared/api/presses'
import { typedWords } from '#shared/instruments/words'
import { TextLink } from '../../../components/button'
import { DataTable, type Column, type Sort } from '../../../components/data-table'
import { Mark } from '../../../components/marks'
import { shortDate } from '../../../lib/dates'
import { paths } from '../../../paths'
import { frameWords } from './words'
import { pressUse } from './press-use'

function columnsFor(today: string): Column<PressRow>[] {
  return [
    {
      id: 'name',
      header: 'Press',
      names: true,
      sortable: true,
      className: 'whitespace-nowrap',
      cell: (row) => <TextLink to={paths.press.href(row.id)}>{row.name}</TextLink>,
    },
    {
      id: 'what',
      header: 'What it is',
      cell: (row) => (
        <>
          {row.whatFor !== '' && `${row.whatFor}, `}
          <span className="whitespace-nowrap">{frameWords[row.kind]}</span>
        </>
      ),
    },
    {
      id: 'use',
      header: 'May it be used',
      className: 'whitespace-nowrap',
      cell: (row) => {
        const { mark, use } = pressUse(row, today)
        return (
          <span className="flex items-center gap-3 font-semibold">
            <Mark name={mark} size={22} />
            {use}
          </span>
        )
      },
    },
    { id: 'until', header: 'Until, or why not', className: 'whitespace-nowrap', cell: (row) => pressUse(row, today).note },
    {
      id: 'ratedLoad',
      header: 'Rated load',
      sortable: true,
      align: 'right',
      className: 'whitespace-nowrap',
      cell: (row) => typedWords(row.ratedLoad),
    },
    {
      id: 'joints',
      header: 'Joints accepted',
      align: 'right',
      from: 'desktop',
      className: 'whitespace-nowrap',
      cell: (row) => `${row.jointsAccepted} of ${row.jointCount}`,
    },
    {
      id: 'lastChanged',
      header: 'Last changed',
      sortable: true,
      from: 'desktop',
      className: 'whitespace-nowrap pl-3',
      cell: (row) => shortDate(row.lastChangedAt),
    },
  ]
}

type PressTableProps = {
  presses: readonly PressRow[]
  today: string
  sort: Sort
  onSort: (sort: Sort) => void
  nothing: ReactNode
}

/** The register: which press may be used, to what and until when. */
export function PressTable({ presses, today, sort, onSort, nothing }: PressTableProps) {
  return (
    <DataTable
      caption="Presses of the shop"
      rows={presses}
      rowKey={(row) => row.id}
      columns={columnsFor(today)}
      sort={sort}
      onSort={onSort}
      nothing={nothing}
      phoneRow={(row) => {
        const { mark, use, note } = pressUse(row, today)
        return { mark: <Mark name={mark} />, title: row.name, note: row.whatFor, aside: use, asideNote: note, to: paths.press.href(row.id) }
      }}
    />
  )
}
