import { ButtonAnchor } from '../../../components/button'
import { Mark } from '../../../components/marks'
import type { RecordView } from '../record-view'

/** What a reader must see before anything else: this record is not what was sealed. */
export function AlteredPlate({ record, mayExport }: { record: RecordView; mayExport: boolean }) {
  const { broken } = record
  if (broken === null) return null
  return (
    <section role="alert" className="mb-3 flex items-start gap-4 bg-stop px-4 py-5 text-on-stop tablet:gap-6 tablet:px-6">
      <Mark name="stop" size={64} tone="plate" className="h-12 w-12 shrink-0 tablet:h-16 tablet:w-16" />
      <div className="min-w-0">
        <h2 className="text-26 tablet:text-34">
          {broken.at === null ? 'This record is not as it was sealed' : `This record was altered at entry ${broken.at}`}
        </h2>
        <p className="mt-1 text-18">
          {broken.why} Don’t rely on what stands here: keep its ledger file, and compare it with an earlier one.
        </p>
        {mayExport && (
          <ButtonAnchor href={ledgerFileAddress(record.id)} download size="line" className="mt-3">
            Download ledger file
          </ButtonAnchor>
        )}
      </div>
    </section>
  )
}

/** Where the ledger of a test is downloaded as a file. */
export function ledgerFileAddress(testId: string): string {
  return `/api/proof-tests/${encodeURIComponent(testId)}/ledger.json`
}
