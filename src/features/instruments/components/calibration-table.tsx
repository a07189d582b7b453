import type { CalibrationRow } from '#shared/api/instruments'
import { typedWords } from '#shared/instruments/words'
import { DataTable, type Column } from '../../../components/data-table'
import { Mark } from '../../../components/marks'
import { NothingHere } from '../../../components/nothing-here'
import { shortDate } from '../../../lib/dates'
import { CertificateFile } from './certificate-file'

function Found({ result }: { result: CalibrationRow['calibration']['result'] }) {
  const sound = result === 'in tolerance'
  return (
    <span className="flex items-center gap-2">
      <Mark name={sound ? 'within' : 'beyond'} size={20} />
      <span className={sound ? undefined : 'font-semibold text-stop-ink'}>{result}</span>
    </span>
  )
}

function uncertaintyWords({ calibration }: CalibrationRow): string {
  return calibration.uncertainty === null
    ? 'not stated'
    : `± ${typedWords(calibration.uncertainty.value)}, k = ${calibration.uncertainty.k}`
}

const columnsOf = (code: string): readonly Column<CalibrationRow>[] => [
  { id: 'on', header: 'Compared on', names: true, className: 'whitespace-nowrap', cell: (row) => shortDate(row.calibration.calibratedOn) },
  { id: 'found', header: 'Found', className: 'whitespace-nowrap', cell: (row) => <Found result={row.calibration.result} /> },
  { id: 'due', header: 'Next one due', className: 'whitespace-nowrap', cell: (row) => shortDate(row.calibration.dueOn) },
  {
    id: 'certificate',
    header: 'Certificate',
    className: 'w-full',
    cell: (row) => (
      <>
        {row.calibration.certificate}
        <span className="block text-graphite">
          {row.calibration.comparedWith !== '' && `${row.calibration.comparedWith}. `}Entered by {row.createdBy}
        </span>
        <CertificateFile row={row} code={code} />
      </>
    ),
  },
  { id: 'uncertainty', header: 'U on it', className: 'whitespace-nowrap', cell: uncertaintyWords },
]

/** Every calibration the instrument ever had, the latest first. */
export function CalibrationTable({ calibrations, code }: { calibrations: readonly CalibrationRow[]; code: string }) {
  return (
    <DataTable
      caption="Calibrations, the latest first"
      rows={calibrations}
      rowKey={(row) => row.id}
      columns={columnsOf(code)}
      nothing={<NothingHere what="No calibration is entered yet." next="Until there is one, this instrument blocks a new test." />}
      phoneRow={(row) => ({
        mark: <Mark name={row.calibration.result === 'in tolerance' ? 'within' : 'beyond'} />,
        title: shortDate(row.calibration.calibratedOn),
        note: (
          <>
            {row.calibration.certificate}, by {row.createdBy}
            <CertificateFile row={row} code={code} />
          </>
        ),
        aside: row.calibration.result,
        asideNote: `until ${shortDate(row.calibration.dueOn)}`,
      })}
    />
  )
}
