import { readFileSync, readdirSync } from 'node:fs'
import path from 'node:path'
import { describe, expect, it } from 'vitest'
import { projectRoot } from '#server/config'
import { migrations } from '#server/database/migrations/index'

function sources(folder: string): string[] {
  return readdirSync(path.join(projectRoot, folder), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && entry.name.endsWith('.ts') && !entry.name.endsWith('.test.ts'))
    .map((entry) => path.relative(projectRoot, path.join(entry.parentPath, entry.name)))
}

describe('migrations', () => {
  it('are run all, in the order of their files', () => {
    const files = readdirSync(path.join(projectRoot, 'server/database/migrations')).filter((name) => /^\d{3}-/.test(name))
    expect(migrations.map((migration) => `${migration.name}.ts`)).toEqual(files.sort())
  })
})

describe('ledger entries', () => {
  const writes =
    /LedgerEntry\.(create|bulkCreate|update|upsert|destroy|truncate|build)\b|(INTO|UPDATE|DELETE FROM|REPLACE)\s+`?ledger_entries/i

  it('are written by server/ledger only', () => {
    const writers = sources('server').filter((file) => writes.test(readFileSync(path.join(projectRoot, file), 'utf8')))
    expect(writers.filter((file) => !file.startsWith('server/ledger/'))).toEqual([])
  })

  it('are never changed or deleted by anything', () => {
    const changes = /LedgerEntry\.(update|upsert|destroy|truncate)\b|(UPDATE|DELETE FROM|REPLACE INTO)\s+`?ledger_entries/i
    expect(sources('server').filter((file) => changes.test(readFileSync(path.join(projectRoot, file), 'utf8')))).toEqual([])
  })
})
