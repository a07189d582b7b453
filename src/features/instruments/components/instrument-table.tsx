import type { ReactNode } from 'react'
import type { InstrumentRow } from '#shared/api/instruments'
import { accuracyWords, instrumentWords, scaleEnd, typedWords } from '#shared/instruments/words'
import { TextLink } from '../../../components/button'
import { DataTable, type Column, type Sort } from '../../../components/data-table'
import { Mark } from '../../../components/marks'
import { shortDate } from '../../../lib/dates'
import { capital } from '../../../lib/words'
import { paths } from '../../../paths'
import { DueCell, calibrationWord } from './calibration-word'

function columnsFor(today: string): Column<InstrumentRow>[] {
  return [
    {
      id: 'code',
      header: 'Code',
      names: true,
      sortable: true,
      className: 'whitespace-nowrap',
      cell: (row) => <TextLink to={paths.instrument.href(row.id)}>{row.details.code}</TextLink>,
    },
    {
      id: 'what',
      header: 'What it is',
      className: 'w-full',
      cell: (row) => (
        <>
          {capital(instrumentWords(row.details))}
          {row.details.description !== '' && <span className="text-graphite">, {row.details.description}</span>}
        </>
      ),
    },
    {
      id: 'range',
      header: 'Scale ends at',
      align: 'right',
      className: 'whitespace-nowrap',
      cell: (row) => typedWords(scaleEnd(row.details)),
    },
    { id: 'step', header: 'One step', align: 'right', className: 'whitespace-nowrap', cell: (row) => typedWords(row.details.increment) },
    {
      id: 'accuracy',
      header: 'Class or limit of error',
      from: 'desktop',
      className: 'whitespace-nowrap pl-3',
      cell: (row) => accuracyWords(row.details),
    },
    {
      id: 'calibrated',
      header: 'Calibrated',
      from: 'desktop',
      className: 'whitespace-nowrap',
      cell: (row) => (row.calibration ? shortDate(row.calibration.calibratedOn) : <span className="text-graphite">—</span>),
    },
    {
      id: 'due',
      header: 'Next one due',
      sortable: true,
      className: 'whitespace-nowrap max-desktop:pl-3',
      cell: (row) => <DueCell calibration={row.calibration} today={today} />,
    },
  ]
}

type InstrumentTableProps = {
  instruments: readonly InstrumentRow[]
  today: string
  sort: Sort
  onSort: (sort: Sort) => void
  nothing: ReactNode
}

/** The register: what each instrument is and whether it may be relied on today. */
export function InstrumentTable({ instruments, today, sort, onSort, nothing }: InstrumentTableProps) {
  return (
    <DataTable
      caption="Instruments of the shop"
      rows={instruments}
      rowKey={(row) => row.id}
      columns={columnsFor(today)}
      sort={sort}
      onSort={onSort}
      nothing={nothing}
      phoneRow={(row) => {
        const { mark, word } = calibrationWord(row.calibration, today)
        return {
          mark: <Mark name={mark} />,
          title: row.details.code,
          note: instrumentWords(row.details),
          aside: word,
          asideNote: typedWords(scaleEnd(row.details)),
          to: paths.instrument.href(row.id),
        }
      }}
    />
  )
}
