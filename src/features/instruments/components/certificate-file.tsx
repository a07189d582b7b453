import type { CalibrationRow } from '#shared/api/instruments'
import { AttachmentStrip } from '../../../components/attachments/attachment-strip'
import type { Owner } from '../../../lib/attachment-database'
import { useOwnFiles, whereIs, type Files } from '../../../lib/attachment-held'
import { shortDate } from '../../../lib/dates'

/** The certificate itself, where one was added: a picture opens large, a PDF in a tab of its own. */
export function CertificateFile({ row, code }: { row: CalibrationRow; code: string }) {
  const { certificateFile: file, calibration } = row
  const owner: Owner = `calibration:${row.id}`
  const own = useOwnFiles(owner, file !== null)
  if (file === null) return null
  const files: Files = { owner, where: (attachment) => whereIs(attachment, own.files, [{ ...file, seq: 0, lost: null }]) }
  const { present: _present, ...attachment } = file
  return (
    <AttachmentStrip
      className="mt-2"
      files={files}
      shown={[
        {
          attachment,
          place: `Certificate ${calibration.certificate} of ${code}`,
          note: `Compared on ${shortDate(calibration.calibratedOn)}. Entered by ${row.createdBy}`,
        },
      ]}
    />
  )
}
