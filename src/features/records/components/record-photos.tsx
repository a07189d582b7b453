import { AttachmentStrip } from '../../../components/attachments/attachment-strip'
import type { Files } from '../../../lib/attachment-held'
import { shownIn } from '../file-places'
import type { RecordView } from '../record-view'

/** What entries show and rest on besides their words: each with the entry that names it. */
export function RecordPhotos({ record, files }: { record: RecordView; files: Files }) {
  const shown = shownIn(record)
  if (shown.length === 0) return null
  const lost = record.state.attachments.filter((one) => one.lost !== null)
  return (
    <section aria-labelledby="photos-title" className="pt-5">
      <h2 id="photos-title" className="pb-2 text-20">
        Photos and documents
      </h2>
      <AttachmentStrip files={files} shown={shown} captions />
      {lost.map(({ sha256, seq, name, lost: given }) => (
        <p key={`${seq}${sha256}`} className="mt-2 border-t border-hairline pt-2">
          {name ?? 'A photo'} of entry {seq} was declared lost by {record.nameOf(given?.by ?? '')}: {given?.why}
        </p>
      ))}
    </section>
  )
}
