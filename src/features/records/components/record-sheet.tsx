import type { PaperSize } from '#shared/api/records'
import { ButtonAnchor, ButtonLink, TextLink } from '../../../components/button'
import { inset } from '../../../components/page'
import { ZonedSheet } from '../../../components/zoned-sheet'
import { useFiles } from '../../../lib/attachment-held'
import { classNames } from '../../../lib/class-names'
import { useTitle } from '../../../lib/use-title'
import { paths } from '../../../paths'
import type { RecordView } from '../record-view'
import type { SignTurn } from '../sign-turn'
import { Corrections } from './corrections'
import { AlteredPlate, ledgerFileAddress } from './altered-plate'
import { CriteriaTable } from './criteria-table'
import { Cautions, Notices } from './notices'
import { EveryCriterion } from './every-criterion'
import { ForceBudget } from './force-budget'
import { LedgerList } from './ledger-list'
import { RecordChart } from './record-chart'
import { RecordFacts } from './record-facts'
import { RecordCourse, RecordHead, RecordResult } from './record-head'
import { RecordJoints } from './record-joints'
import { RecordPhotos } from './record-photos'
import { SignPanel } from './sign-panel'
import { SignatureBlocks } from './signature-blocks'
import { StagesAsRead } from './stages-table'

interface RecordSheetProps {
  record: RecordView
  turn: SignTurn
  mayExport: boolean
  /** The part that the reader has in this test. */
  part: 'lead' | 'witness' | 'other'
  today: Date
}

const PAPERS: readonly { paper: PaperSize; name: string }[] = [
  { paper: 'a4', name: 'A4' },
  { paper: 'letter', name: 'Letter' },
]

function Actions({ record, turn, mayExport, part }: RecordSheetProps) {
  const file = `/api/proof-tests/${encodeURIComponent(record.id)}/record`
  return (
    <nav aria-label="This record" className="flex flex-wrap items-center justify-between gap-3 py-3 print:hidden">
      <TextLink to={paths.proofTests.href()}>All proof tests</TextLink>
      <div className="flex flex-wrap gap-3 max-tablet:w-full max-tablet:flex-col">
        {mayExport && record.broken === null && (
          <>
            <ButtonAnchor href={ledgerFileAddress(record.id)} download size="line">
              Download ledger file
            </ButtonAnchor>
            <ButtonAnchor href={`${file}.xlsx`} download size="line">
              Download spreadsheet
            </ButtonAnchor>
            {PAPERS.map(({ paper, name }) => (
              <ButtonAnchor key={paper} href={`${file}.pdf?paper=${paper}`} download size="line">
                Download PDF, {name}
              </ButtonAnchor>
            ))}
          </>
        )}
        {(record.standing === 'under way' || record.standing === 'stopped') && part === 'lead' && (
          <ButtonLink to={paths.runProofTest.href(record.id)} size="line">
            Open the run
          </ButtonLink>
        )}
        {(turn.is === 'lead' || turn.is === 'witness') && (
          <ButtonAnchor href="#sign" size="line" kind="next">
            {turn.is === 'lead' ? 'To the signature' : 'To the countersignature'}
          </ButtonAnchor>
        )}
      </div>
    </nav>
  )
}

/** The record of one proof test as one sheet, and what may be done about it. */
export function RecordSheet(props: RecordSheetProps) {
  const { record, turn, today } = props
  const files = useFiles('proof-tests', record.id, record.photos.length)
  useTitle(`${record.opened.number} ${record.opened.press.name}`)
  return (
    <div className={classNames(inset, 'mx-auto w-full max-w-[1328px] pb-8 max-tablet:px-2 print:max-w-none print:p-0')}>
      <Actions {...props} />
      <AlteredPlate record={record} mayExport={props.mayExport} />
      <ZonedSheet tone="sheet" className="tablet:p-3 print:p-0">
        <article className="px-3 pt-4 tablet:px-6">
          <RecordHead record={record} />
          <RecordResult record={record} />
          <RecordCourse record={record} />
          <div className="grid gap-x-8 gap-y-5 pt-2 print:block wide:grid-cols-[minmax(0,54%)_minmax(0,1fr)]">
            <div className="grid gap-4 max-tablet:-mx-3">
              {record.opened.legs.map((leg, index) => (
                <RecordChart key={leg.label} record={record} leg={index} />
              ))}
            </div>
            <div className="grid content-start gap-x-8 gap-y-3 desktop:max-wide:grid-cols-2 print:block print:pt-4">
              <CriteriaTable record={record} />
              <RecordFacts record={record} />
            </div>
          </div>
          <StagesAsRead record={record} />
          <RecordJoints record={record} />
          <ForceBudget record={record} />
          <EveryCriterion record={record} />
          <LedgerList record={record} />
          <Corrections record={record} />
          <RecordPhotos record={record} files={files} />
          <Notices record={record} />
          <Cautions record={record} />
        </article>
        <SignatureBlocks record={record} today={today} />
      </ZonedSheet>
      <SignPanel record={record} turn={turn} files={files} mayGiveUp={props.part !== 'other'} />
    </div>
  )
}
