import type { Shown } from '../../components/attachments/attachment-strip'
import type { Where } from '../../lib/attachment-held'
import type { Placed } from '../../lib/attachment-places'
import { dateAndTime } from '../../lib/dates'
import { capital } from '../../lib/words'
import type { RecordView } from './record-view'

/** What a photo or document of a test is of: "Joint 7, examined before load". */
export function placeOf({ kind, seq, jointId, occasion }: Placed, { state, opened }: RecordView): string {
  const joint = opened.joints.find(({ id }) => id === jointId)
  if (kind === 'joint-examined') return `Joint ${joint?.number ?? '?'}, examined ${occasion ?? ''}`
  if (kind === 'joint-worked') return `Joint ${joint?.number ?? '?'}, worked on`
  if (kind === 'opened') return opened.engineer ? `The document of ${opened.engineer.name}, engineer` : 'With the opening'
  const note = state.observations.find((one) => one.seq === seq)
  return note ? `${capital(note.what)}: ${note.note}` : capital(kind.replaceAll('-', ' '))
}

/** Every photo and document of a record, with what it is of and who added it when. */
export function shownIn(record: RecordView): Shown[] {
  return record.photos.map((one) => ({
    attachment: one.attachment,
    place: placeOf(one, record),
    note: `Entry ${one.seq}, ${record.nameOf(one.by)}, ${dateAndTime(one.at)}`,
  }))
}

export interface MissingFile extends Shown {
  where: Where
}

/** What keeps a record from being signed: bytes that the server lacks and nobody has given up, each once. */
export function missingOf(record: RecordView, where: (attachment: Shown['attachment']) => Where): MissingFile[] {
  const lost = new Set(record.state.attachments.flatMap((one) => (one.lost ? [one.sha256] : [])))
  const seen = new Set<string>()
  return shownIn(record).flatMap((one) => {
    const { sha256 } = one.attachment
    const is = where(one.attachment)
    if (lost.has(sha256) || seen.has(sha256) || is.is === 'server' || is.is === 'lost' || is.is === 'unknown') return []
    seen.add(sha256)
    return [{ ...one, where: is }]
  })
}
