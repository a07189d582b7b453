import type { ReactNode } from 'react'
import type { ToolingRow } from '#shared/api/tooling'
import { typedWords } from '#shared/instruments/words'
import { TextLink } from '../../../components/button'
import { DataTable, type Column, type Sort } from '../../../components/data-table'
import { paths } from '../../../paths'
import { TOOLING_WORDS } from '../words'
import { PieceMark } from './piece-drawing'

const columns: Column<ToolingRow>[] = [
  {
    id: 'code',
    header: 'Number',
    names: true,
    sortable: true,
    className: 'whitespace-nowrap',
    cell: (row) => <TextLink to={paths.tool.href(row.id)}>{row.details.code}</TextLink>,
  },
  {
    id: 'kind',
    header: 'Kind',
    className: 'whitespace-nowrap',
    cell: ({ details }) => (
      <span className="inline-flex items-center gap-2 align-middle">
        <PieceMark kind={details.kind} />
        {TOOLING_WORDS[details.kind].name}
      </span>
    ),
  },
  { id: 'name', header: 'What it is', className: 'w-full', cell: (row) => row.details.name },
  { id: 'fit', header: 'What it fits', from: 'desktop', className: 'whitespace-nowrap', cell: (row) => row.details.fit },
  {
    id: 'rated',
    header: 'Rated load',
    align: 'right',
    className: 'whitespace-nowrap pl-3',
    cell: (row) => <span className="font-semibold">{typedWords(row.details.ratedLoad)}</span>,
  },
  {
    id: 'from',
    header: 'Rating comes from',
    from: 'desktop',
    className: 'pl-3',
    cell: (row) => <span className="whitespace-nowrap">{row.details.ratingFrom}</span>,
  },
]

type ToolingTableProps = { tooling: readonly ToolingRow[]; sort: Sort; onSort: (sort: Sort) => void; nothing: ReactNode }

/** The register: each piece, and the load it carries. */
export function ToolingTable({ tooling, sort, onSort, nothing }: ToolingTableProps) {
  return (
    <DataTable
      caption="Tooling of the shop"
      rows={tooling}
      rowKey={(row) => row.id}
      columns={columns}
      sort={sort}
      onSort={onSort}
      nothing={nothing}
      phoneRow={({ id, details }) => ({
        mark: <PieceMark kind={details.kind} />,
        title: details.code,
        note: details.name,
        aside: typedWords(details.ratedLoad),
        asideNote: TOOLING_WORDS[details.kind].name,
        to: paths.tool.href(id),
      })}
    />
  )
}
