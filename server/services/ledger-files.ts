import type { LedgerEntry, LedgerSubject } from '#shared/ledger/envelope'
import { writeLedgerFile } from '#shared/ledger/ledger-file'
import type { AppContext, Work } from '../context'
import { readHead, readSeals, readStored, readTogether } from '../ledger/read'
import { loadSealKey, publicSealKeys } from '../ledger/seal-keys'
import { Press, ProofTest, Shop } from '../models'
import { notFound } from '../problem'
import { fileName } from '../records/file-name'
import { authorize } from './membership'
import { namesOf } from './names'

interface Named {
  /** What the file says it is: "PT-0043", or a press's name. */
  title: string
  /** The words of its file's name. */
  words: string[]
}

async function nameOf(subject: LedgerSubject, { transaction, actor: { shopId } }: Work, id: string): Promise<Named | null> {
  if (subject === 'press') {
    const press = await Press.findOne({ where: { id, shopId }, attributes: ['name'], raw: true, transaction })
    return press && { title: press.name, words: [press.name] }
  }
  const test = await ProofTest.findOne({ where: { id, shopId }, attributes: ['number', 'pressId'], raw: true, transaction })
  if (test === null) return null
  const press = await Press.findOne({ where: { id: test.pressId, shopId }, attributes: ['name'], raw: true, transaction })
  const words = [test.number, ...(press === null ? [] : [press.name])]
  return { title: words.join(', '), words }
}

/** Who wrote entries, as far as the texts can be read: an altered ledger is handed out as well, for it is evidence. */
function authorsOf(texts: readonly string[]): string[] {
  return texts.flatMap((text) => {
    try {
      const { authorId } = JSON.parse(text) as Partial<LedgerEntry>
      return authorId === undefined ? [] : [authorId]
    } catch {
      return []
    }
  })
}

export interface LedgerFile {
  name: string
  text: string
}

/** A ledger as a file, exactly as stored, signed with today's key. 404 for another shop's, 403 where the role may not export. */
export async function ledgerFile({ config, database }: AppContext, work: Work, subject: LedgerSubject, id: string): Promise<LedgerFile> {
  const { transaction, actor, now } = work
  const named = await nameOf(subject, work, id)
  const head = await readHead(database, transaction, id)
  if (named === null || head === null) throw notFound(subject === 'press' ? 'This press' : 'This proof test')
  authorize(actor, 'record:export', { shopId: actor.shopId, testId: id })
  const { seals, entries } = await readTogether(
    () => readSeals(database, transaction, id),
    () => readStored(database, transaction, id),
  )
  const shop = await Shop.findByPk(actor.shopId, { attributes: ['name'], raw: true, transaction })
  const key = loadSealKey(config)
  const used = new Set([key.kid, ...seals.map(({ kid }) => kid)])
  const keys = publicSealKeys(config).filter(({ kid }) => used.has(kid))
  const text = writeLedgerFile(
    {
      subject,
      ledgerId: id,
      shop: shop?.name ?? '',
      title: named.title,
      exportedAt: now.toISOString(),
      entries: entries.map(({ seq, canonical, hash }) => ({ seq, canonical, hash })),
      seals,
      keys: keys.map(({ kid, publicKey, retiredOn }) => ({ kid, publicKey, retired: retiredOn !== null })),
      people: await namesOf(transaction, authorsOf(entries.map(({ canonical }) => canonical))),
    },
    key,
  )
  return { name: fileName(named.words, 'ledger.json'), text }
}
