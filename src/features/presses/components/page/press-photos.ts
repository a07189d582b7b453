import type { PressState } from '#shared/press/state'
import type { Shown } from '../../../../components/attachments/attachment-strip'
import type { Placed } from '../../../../lib/attachment-places'
import { dateAndTime } from '../../../../lib/dates'

type People = Readonly<Record<string, string>>

/** Photos of entries of a press as its page shows them: what happened, and who wrote it when. */
export function shownOf(photos: readonly Placed[], state: PressState, people: People): Shown[] {
  return photos.map(({ attachment, seq, at, by }) => ({
    attachment,
    place: state.history.find((event) => event.seq === seq)?.text ?? 'An entry of this press',
    note: [people[by], dateAndTime(at)].filter(Boolean).join(', '),
  }))
}

/** Photos of what was done to one joint, or seen at it. */
export const ofJoint = (photos: readonly Placed[], jointId: string | null): Placed[] =>
  photos.filter((one) => one.jointId !== null && one.jointId === jointId)
