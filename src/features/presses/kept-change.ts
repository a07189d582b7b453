import type { Attachment } from '#shared/ledger/envelope'
import type { PressChange } from '#shared/press/entries'
import { dropDraft, keepDraft, readDraft } from '../../lib/drafts'

/** Goes up when the form's fields change, so that an older draft isn't poured into it. */
const VERSION = 1

/** A change that somebody began to report: it outlives a reload, and leaving the page. */
export interface KeptChange {
  change?: PressChange['change']
  why: string
  jointIds: readonly string[]
  photos: Attachment[]
}

const nameOf = (pressId: string, userId: string): string => `change.${pressId}.${userId}`

export const readKeptChange = (pressId: string, userId: string): KeptChange | undefined =>
  readDraft<KeptChange>(nameOf(pressId, userId), VERSION)

export const dropKeptChange = (pressId: string, userId: string): void => dropDraft(nameOf(pressId, userId))

/** Keeps what was entered so far; a form in which nothing was entered is nothing to come back to. */
export function keepChange(pressId: string, userId: string, entered: KeptChange): void {
  const { change, why, jointIds, photos } = entered
  const empty = change === undefined && why === '' && jointIds.length === 0 && photos.length === 0
  if (empty) dropKeptChange(pressId, userId)
  else keepDraft(nameOf(pressId, userId), VERSION, entered)
}
