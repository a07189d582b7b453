import type { Transaction } from 'sequelize'
import type { Attachment as Named } from '#shared/ledger/envelope'
import { Attachment } from '../models'

/** Whether what is kept is what was named: the same bytes can't be a photo for one entry and a document for another. */
const isSame = (kept: Pick<Attachment, 'type' | 'size'> | undefined, named: Named): boolean =>
  kept?.type === named.type && kept.size === named.size

/** Which of the files that a shop's ledgers or calibrations name are not kept by the server. */
export async function absentHashes(transaction: Transaction, shopId: string, named: readonly Named[]): Promise<string[]> {
  if (named.length === 0) return []
  const hashes = [...new Set(named.map((one) => one.sha256))]
  const rows = await Attachment.findAll({
    where: { shopId, sha256: hashes },
    attributes: ['sha256', 'type', 'size'],
    raw: true,
    transaction,
  })
  const kept = new Map(rows.map((row) => [row.sha256, row]))
  return hashes.filter((sha256) => named.some((one) => one.sha256 === sha256 && !isSame(kept.get(sha256), one)))
}
