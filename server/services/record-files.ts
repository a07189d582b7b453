import type { NamedAttachment } from '#shared/ledger/attachments'
import { inTransaction, type AppContext } from '../context'
import { Problem } from '../problem'
import { MOST_PICTURES, PICTURE_LONGEST, type RecordFiles, type RecordPicture } from '../records/files'
import { pictureOf } from './attachments'
import { absentHashes } from './held-files'

/** What the server has of the photos and documents that a record names, the first `most` of them as pictures. */
export async function recordFiles(
  context: AppContext,
  shopId: string,
  named: readonly NamedAttachment[],
  most: number = MOST_PICTURES,
): Promise<RecordFiles> {
  const absent = new Set(await inTransaction(context, (transaction) => absentHashes(transaction, shopId, named)))
  const present = new Set(named.flatMap(({ sha256 }) => (absent.has(sha256) ? [] : [sha256])))
  const altered = new Set<string>()
  const pictures = new Map<string, RecordPicture>()
  const photos = new Map(named.flatMap((one) => (present.has(one.sha256) && one.type !== 'application/pdf' ? [[one.sha256, one]] : [])))
  // One after the other: sixty photos opened at once would be a lot of memory.
  for (const [sha256, photo] of [...photos].slice(0, most)) {
    try {
      const picture = await pictureOf(context, shopId, photo, PICTURE_LONGEST)
      if (picture) pictures.set(sha256, picture)
    } catch (error) {
      // A record says what became of its photos; it doesn't fail to print for one of them.
      if (!(error instanceof Problem)) throw error
      if (error.code === 'altered-file') altered.add(sha256)
      else present.delete(sha256)
    }
  }
  return { present, altered, pictures }
}
