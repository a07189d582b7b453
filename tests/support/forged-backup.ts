import { createHash } from 'node:crypto'
import { readFileSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { gunzipSync, gzipSync } from 'node:zlib'
import { canonicalText } from '#shared/ledger/canonical'
import { FIRST_PREV_HASH, sha256Hex } from '#shared/ledger/chain'
import type { Manifest } from '#server/backup/manifest'

export function readManifest(set: string): Manifest {
  return JSON.parse(readFileSync(path.join(set, 'manifest.json'), 'utf8')) as Manifest
}

export function writeManifest(set: string, manifest: Manifest): void {
  writeFileSync(path.join(set, 'manifest.json'), JSON.stringify(manifest))
}

type Rows = (string | null)[][]

/** Changes the rows of a table and makes every hash of the set fit them, as somebody who knows the program could. */
export function forge(set: string, name: string, change: (rows: Rows, place: (column: string) => number) => void): void {
  const manifest = readManifest(set)
  const table = manifest.tables.find((one) => one.name === name)
  const file = manifest.files.find((one) => one.path === table?.file)
  if (!table || !file) throw new Error(`The set has a table ${name}.`)
  const lines = gunzipSync(readFileSync(path.join(set, file.path)))
    .toString('utf8')
    .split('\n')
    .slice(0, -1)
  const rows = lines.map((line) => JSON.parse(line) as (string | null)[])
  change(rows, (column) => table.columns.findIndex((one) => one.name === column))
  const content = rows.map((row) => `${JSON.stringify(row)}\n`).join('')
  const bytes = gzipSync(content)
  writeFileSync(path.join(set, file.path), bytes)
  Object.assign(file, { size: bytes.length, sha256: createHash('sha256').update(bytes).digest('hex') })
  Object.assign(table, { rows: rows.length, content: createHash('sha256').update(content).digest('hex') })
  writeManifest(set, manifest)
}

/** Alters the third entry of a ledger; `rehashed` writes the whole chain after it anew, and the ledger's head. */
export function alterEntry(set: string, ledgerId: string, rehashed: boolean): void {
  let head = FIRST_PREV_HASH
  forge(set, 'ledger_entries', (rows, place) => {
    for (const row of rows.filter((one) => one[place('ledger_id')] === ledgerId)) {
      const text = JSON.parse(row[place('canonical')] ?? '') as Record<string, unknown>
      if (text['seq'] === 3) text['observedAt'] = '2020-01-01T00:00:00.000Z'
      if (rehashed) text['prevHash'] = head
      row[place('canonical')] = canonicalText(text)
      if (!rehashed) continue
      row[place('prev_hash')] = head
      head = sha256Hex(row[place('canonical')] ?? '')
      row[place('hash')] = head
    }
  })
  if (!rehashed) return
  forge(set, 'ledgers', (rows, place) => {
    for (const row of rows) if (row[place('id')] === ledgerId) row[place('head_hash')] = head
  })
  const manifest = readManifest(set)
  writeManifest(set, { ...manifest, ledgers: manifest.ledgers.map((one) => (one.id === ledgerId ? { ...one, headHash: head } : one)) })
}
