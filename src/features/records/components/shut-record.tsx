import { ButtonLink } from '../../../components/button'
import { Page } from '../../../components/page'
import { paths } from '../../../paths'
import type { RecordView } from '../record-view'

/** In place of the record of a test under way, for its witness. */
export function ShutRecord({ record }: { record: RecordView }) {
  const { opened } = record
  return (
    <Page title={`${opened.number} ${opened.press.name}`} narrow>
      <p className="text-18">This test is under way, and you are its witness.</p>
      <p className="pb-6 text-18">
        You read the gauge for yourself, without the lead’s figures. The record opens to you when the test is concluded, and asks for your
        countersignature.
      </p>
      <ButtonLink kind="next" to={paths.attendProofTest.href(record.id)}>
        Attend the test
      </ButtonLink>
    </Page>
  )
}
