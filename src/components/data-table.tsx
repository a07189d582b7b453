import type { ReactNode } from 'react'
import { classNames } from '../lib/class-names'
import type { Sort } from '../lib/sort'
import { usePhone } from '../lib/use-media'
import { SortGlyph } from './glyphs'
import { Sheet } from './plate'
import { RuledList, RuledRow, type RuledRowProps } from './ruled-list'

export type { Sort }

export type Column<Row> = {
  id: string
  header: ReactNode
  cell: (row: Row) => ReactNode
  align?: 'left' | 'right'
  sortable?: boolean
  /** The cell that names the row. */
  names?: boolean
  /** Left out where the screen is narrower than this. */
  from?: 'desktop' | 'wide'
  className?: string
}

type DataTableProps<Row> = {
  /** Said to who can't see the heading above. */
  caption: string
  rows: readonly Row[]
  rowKey: (row: Row) => string
  columns: readonly Column<Row>[]
  /** The same row in two lines, for the phone. */
  phoneRow: (row: Row) => RuledRowProps
  sort?: Sort
  onSort?: (sort: Sort) => void
  /** Columns closer together, for a table of many. */
  tight?: boolean
  /** In place of rows when there are none. */
  nothing: ReactNode
}

const hidden = { desktop: 'hidden desktop:table-cell', wide: 'hidden wide:table-cell' } as const

function nextSort(column: string, sort: Sort | undefined): Sort {
  const ascending = sort?.column === column && sort.direction === 'descending'
  return { column, direction: ascending ? 'ascending' : 'descending' }
}

type HeaderCellProps<Row> = { column: Column<Row>; sort: Sort | undefined; onSort: ((sort: Sort) => void) | undefined; tight: boolean }

function HeaderCell<Row>({ column, sort, onSort, tight }: HeaderCellProps<Row>) {
  const direction = sort?.column === column.id ? sort.direction : 'none'
  const sorts = column.sortable === true && onSort !== undefined
  return (
    <th
      scope="col"
      aria-sort={sorts ? direction : undefined}
      className={classNames(
        'border-b border-hairline pt-4 pb-1 align-bottom font-condensed text-14 font-medium text-graphite last:pr-0',
        tight ? 'pr-2' : 'pr-3',
        column.align === 'right' ? 'text-right' : 'text-left',
        column.from && hidden[column.from],
        column.className,
      )}
    >
      {sorts ? (
        <button
          type="button"
          onClick={() => onSort(nextSort(column.id, sort))}
          className={classNames(
            '-my-2 inline-flex items-center gap-1 rounded-field py-2 hover:text-ink',
            direction !== 'none' && 'font-semibold text-ink',
          )}
        >
          {column.header}
          <SortGlyph direction={direction} />
        </button>
      ) : (
        column.header
      )}
    </th>
  )
}

/**
 * A list of one kind of thing: a real table from the tablet on, rows of two lines on the phone. It never
 * scrolls sideways; what doesn't fit says `from` which width on it is shown.
 */
export function DataTable<Row>({ caption, rows, rowKey, columns, phoneRow, sort, onSort, tight = false, nothing }: DataTableProps<Row>) {
  const phone = usePhone()
  if (rows.length === 0) return <Sheet className="py-4">{nothing}</Sheet>
  if (phone) {
    return (
      <RuledList className="border-t-2 border-t-ink">
        {rows.map((row) => (
          <RuledRow key={rowKey(row)} {...phoneRow(row)} />
        ))}
      </RuledList>
    )
  }
  return (
    <Sheet>
      <table className="w-full border-collapse">
        <caption className="sr-only">{caption}</caption>
        <thead>
          <tr>
            {columns.map((column) => (
              <HeaderCell key={column.id} column={column} sort={sort} onSort={onSort} tight={tight} />
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={rowKey(row)} className="group border-b border-hairline last:border-b-0 hover:bg-field">
              {columns.map((column) => {
                const classes = classNames(
                  'h-14 py-1 last:pr-0 desktop:h-10',
                  tight ? 'pr-2' : 'pr-3',
                  column.align === 'right' && 'text-right',
                  column.from && hidden[column.from],
                  column.className,
                )
                return column.names ? (
                  <th key={column.id} scope="row" className={classNames(classes, 'text-left font-semibold')}>
                    {column.cell(row)}
                  </th>
                ) : (
                  <td key={column.id} className={classes}>
                    {column.cell(row)}
                  </td>
                )
              })}
            </tr>
          ))}
        </tbody>
      </table>
    </Sheet>
  )
}
