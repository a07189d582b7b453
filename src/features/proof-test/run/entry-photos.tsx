import type { ReactElement } from 'react'
import type { Attachment } from '#shared/ledger/envelope'
import { AttachmentStrip, type Shown } from '../../../components/attachments/attachment-strip'
import { PhotoField } from '../../../components/attachments/photo-field'
import { notYetNamed, type Placed } from '../../../lib/attachment-places'
import { clockTime } from '../../../lib/dates'
import type { Run } from '../use-run'

interface PhotosFieldProps {
  run: Run
  label?: string
  chosen: readonly Attachment[]
  onChange: (chosen: Attachment[]) => void
  className?: string
}

/** What of a draft no entry names yet: what was entered isn't entered again. */
export const photosToEnter = (run: Run, chosen: readonly Attachment[]): Attachment[] => notYetNamed(chosen, run.photos)

/** Photos that go with the next entry. */
export function EntryPhotos({ run, label = 'Photos', chosen, onChange, className }: PhotosFieldProps): ReactElement {
  return <PhotoField className={className} label={label} owner={run.files.owner} chosen={photosToEnter(run, chosen)} onChange={onChange} />
}

/** What is to be seen of the photos that entries name: at this place, by whom, when. */
export function shownOf(run: Run, placed: readonly Placed[], place: (one: Placed) => string): Shown[] {
  return placed.map((one) => ({
    attachment: one.attachment,
    place: place(one),
    note: [run.people[one.by], clockTime(one.at)].filter(Boolean).join(', '),
  }))
}

/** The photos of some entries of the run, in a row; Stop stays free under the large one. */
export function EnteredPhotos({ run, shown, className }: { run: Run; shown: readonly Shown[]; className?: string }): ReactElement | null {
  return <AttachmentStrip files={run.files} shown={shown} leavesFoot className={className} />
}

interface JointPhotosProps {
  run: Run
  jointId: string
  number: number
  className?: string
}

/** Photos of one joint, from all its entries. */
export function JointPhotos({ run, jointId, number, className = 'mt-3' }: JointPhotosProps): ReactElement | null {
  const mine = run.photos.filter((one) => one.jointId === jointId)
  const place = ({ kind, occasion }: Placed): string =>
    `Joint ${number}, ${kind === 'joint-worked' ? 'worked on' : `examined ${occasion ?? ''}`}`
  return <EnteredPhotos run={run} shown={shownOf(run, mine, place)} className={className} />
}
