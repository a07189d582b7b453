import { createHash } from 'node:crypto'
import { cpSync, existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, statSync, truncateSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { QueryTypes } from 'sequelize'
import type { Sequelize } from 'sequelize'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { entriesResponseSchema } from '#shared/api/ledger'
import type { EntryDraft } from '#shared/ledger/envelope'
import { makeBackup } from '#server/backup/make'
import type { Manifest } from '#server/backup/manifest'
import { restoreBackup } from '#server/backup/restore'
import { readConfig } from '#server/config'
import type { Config } from '#server/config'
import { connect } from '#server/database/connection'
import { migrateUp } from '#server/database/migrator'
import { rotateSealKey } from '#server/ledger/seal-keys'
import { openStorage } from '#server/storage/open-storage'
import { ApiRun, post } from '../factories/api-run'
import { picture } from '../factories/files'
import type { FileToSend } from '../factories/files'
import { password } from '../factories/people'
import { closeTestServer, openTestServer, testServer } from '../support/api-server'
import { alterEntry, forge, readManifest, writeManifest } from '../support/forged-backup'
import { schemaFor } from '../support/schema'
import { startServer } from '../support/server-process'

const note = (text: string) => ({ kind: 'observed', payload: { at: null, what: 'other', note: text } }) as const

const folder = mkdtempSync(path.join(tmpdir(), 'quarterload-backup-'))
let made: Awaited<ReturnType<typeof makeBackup>>
let sealed: ApiRun
let running: ApiRun
let photo: FileToSend
/** Of the test that goes on while the backup is made: answered before it began, and everything that was sent. */
const answeredBefore: string[] = []
const sent: EntryDraft[] = []

function configOf(variables: Record<string, string>): Config {
  return readConfig({ NODE_ENV: 'test', BCRYPT_COST: '4', RELAXED_DURABILITY: '1', ...variables })
}

let fresh = 0
/** A data directory that does not exist yet. */
function freshDirectory(): string {
  fresh += 1
  return path.join(folder, `fresh-${fresh}`)
}

async function backup(config: Config, database: Sequelize, now: Date, keysTarget?: string) {
  const storage = config === testServer().context.config ? testServer().context.storage : await openStorage(config, now)
  return makeBackup({ config, database, storage }, { target: path.join(folder, 'sets'), keysTarget, now })
}

async function observe(text: string): Promise<string> {
  const draft = running.lead.draft(note(text))
  sent.push(draft)
  const { results } = await post(running.staff.lead, running.path, [draft])
  expect(results[0]?.outcome).toBe('kept')
  return draft.id
}

async function headsIn(database: Sequelize): Promise<Record<string, string>> {
  const rows = await database.query<{ id: string; head: string }>("SELECT id, CONCAT(head_seq, ' ', head_hash) AS head FROM ledgers", {
    type: QueryTypes.SELECT,
  })
  return Object.fromEntries(rows.map(({ id, head }) => [id, head]))
}

const headsOf = ({ ledgers }: Manifest) => Object.fromEntries(ledgers.map(({ id, headSeq, headHash }) => [id, `${headSeq} ${headHash}`]))

beforeAll(async () => {
  // A schema of its own: tests beside this one leave ledgers broken on purpose.
  await closeTestServer()
  const { context } = openTestServer(await schemaFor(inject('databaseUrl'), 'backup'))
  await migrateUp(context.database)
  sealed = await ApiRun.open()
  photo = await picture()
  const draft = { ...sealed.lead.draft(note('See the photo.')), attachments: [photo.attachment] }
  await post(sealed.staff.lead, sealed.path, [draft])
  await sealed.staff.lead.client
    .put(`/api/attachments/${photo.attachment.sha256}?ledger=${sealed.id}`)
    .set('Content-Type', photo.attachment.type)
    .send(photo.bytes)
    .expect(204)
  await sealed.refresh()
  await sealed.driveTo('sign')
  expect((await sealed.sign('lead')).status).toBeLessThan(300)
  // What was sealed with a key that was retired must verify after a restore as well.
  rotateSealKey(context.config, new Date())
  await sealed.refresh()
  expect((await sealed.sign('witness')).status).toBeLessThan(300)
  running = await ApiRun.open({ staff: sealed.staff })
  await running.driveTo('set-up')
  for (let count = 1; count <= 3; count += 1) answeredBefore.push(await observe(`Before ${count}: ½ ‰ “Ω” \u2028 🛠`))
  let isOver = false
  const goingOn = (async () => {
    for (let count = 1; !isOver || count < 3; count += 1) await observe(`Meanwhile ${count}`)
  })()
  made = await backup(context.config, context.database, new Date())
  isOver = true
  await goingOn
  await observe('After the backup')
}, 120_000)

afterAll(() => rmSync(folder, { recursive: true, force: true }))

describe('a backup that is made while entries come in', () => {
  it('is of one moment, finds every ledger whole, and says what it holds', () => {
    expect(made.problems).toEqual([])
    const { manifest } = made
    expect(manifest.migrations.length).toBeGreaterThanOrEqual(5)
    expect(manifest.ledgers.length).toBeGreaterThanOrEqual(3)
    const rows = Object.fromEntries(manifest.tables.map((table) => [table.name, table.rows]))
    expect(rows['ledger_entries']).toBe(manifest.ledgers.reduce((sum, { headSeq }) => sum + headSeq, 0))
    expect(rows).toMatchObject({ shops: 1, seals: 2, attachments: 1 })
    expect(manifest.files.map((file) => file.path)).toContain(`attachments/${running.staff.lead.shopId}/${photo.attachment.sha256}`)
    expect(manifest.keyFiles.map((file) => file.path)).toEqual([expect.stringMatching(/^public-key-/), 'sealing-key'])
  })

  it('can be read by the account that made it, and by nobody else', () => {
    for (const entry of readdirSync(made.folder, { recursive: true, withFileTypes: true })) {
      const mode = statSync(path.join(entry.parentPath, entry.name)).mode & 0o777
      expect(mode, entry.name).toBe(entry.isDirectory() ? 0o700 : 0o600)
    }
  })
})

describe('a restore into an empty place', () => {
  it('brings back every ledger, sign-in, the sealed record and the photo; devices send what the backup lacks', async () => {
    const directory = freshDirectory()
    const restored = await restoreBackup(configOf({ DATA_DIR: directory }), { source: made.folder, replace: false, now: new Date() })
    expect(restored).toMatchObject({ ledgers: made.manifest.ledgers.length, attachments: 1, aside: [] })
    const server = await startServer({ DATA_DIR: directory })
    try {
      const { lead } = running.staff
      const headers = { 'content-type': 'application/json', origin: server.address }
      const body = JSON.stringify({ email: lead.email, password })
      const signedIn = await fetch(`${server.address}/api/session`, { method: 'POST', headers, body })
      expect(signedIn.status).toBe(200)
      const cookie = signedIn.headers.get('set-cookie')?.split(';')[0] ?? ''
      const ask = async (place: string) => fetch(`${server.address}${place}`, { headers: { cookie } })
      const entriesOf = async (run: ApiRun) => entriesResponseSchema.parse(await (await ask(run.path)).json()).entries

      const heads = headsOf(made.manifest)
      const record = (await entriesOf(sealed)).at(-1)
      expect(`${record?.seq} ${record?.hash}`).toBe(heads[sealed.id])
      // Every read of a signed record checks its seals: one that did not verify would be refused.
      expect((await ask(`/api/proof-tests/${sealed.id}/ledger.json`)).status).toBe(200)
      const bytes = await ask(`/api/attachments/${photo.attachment.sha256}?ledger=${sealed.id}`)
      expect(Buffer.from(await bytes.arrayBuffer()).equals(photo.bytes)).toBe(true)

      const there = await entriesOf(running)
      expect(`${there.at(-1)?.seq} ${there.at(-1)?.hash}`).toBe(heads[running.id])
      const ids = there.map(({ id }) => id)
      expect(ids).toEqual(expect.arrayContaining(answeredBefore))
      expect(ids).not.toContain(sent.at(-1)?.id)
      const again = JSON.stringify({ sentAt: new Date().toISOString(), entries: sent })
      const answer = await fetch(`${server.address}${running.path}`, { method: 'POST', headers: { ...headers, cookie }, body: again })
      expect(answer.status).toBe(200)
      const after = (await entriesOf(running)).filter(({ kind }) => kind === 'observed').map(({ id }) => id)
      expect(after).toEqual(sent.map(({ id }) => id))
    } finally {
      await server.end()
    }
  })

  it('ends every session: one that was ended after the backup must not live again', async () => {
    const url = await schemaFor(inject('databaseUrl'), 'backup_sessions')
    await restoreBackup(configOf({ DATABASE_URL: url, DATA_DIR: freshDirectory() }), {
      source: made.folder,
      replace: false,
      now: new Date(),
    })
    const database = connect(url)
    try {
      expect(await headsIn(database)).toEqual(headsOf(made.manifest))
      const sql = 'SELECT COUNT(*) AS sessions, SUM(ended_at IS NULL) AS living FROM sessions'
      const [counted] = await database.query<{ sessions: number; living: string }>(sql, { type: QueryTypes.SELECT })
      expect(counted?.sessions).toBeGreaterThan(0)
      expect(Number(counted?.living)).toBe(0)
    } finally {
      await database.close()
    }
  })

  it('takes keys that were put apart, and asks for them when they are not given', async () => {
    const { config, database } = testServer().context
    const apart = await backup(config, database, new Date(Date.now() + 5_000), path.join(folder, 'safe'))
    expect(existsSync(path.join(apart.folder, 'keys'))).toBe(false)
    const directory = freshDirectory()
    const options = { source: apart.folder, replace: false, now: new Date() }
    await expect(restoreBackup(configOf({ DATA_DIR: directory }), options)).rejects.toThrow(
      /keys.*missing.*put apart: name their folder with --keys/,
    )
    expect(existsSync(directory)).toBe(false)
    await restoreBackup(configOf({ DATA_DIR: directory }), { ...options, keys: apart.keysFolder })
    expect(readFileSync(path.join(directory, 'secrets/sealing-key'))).toEqual(
      readFileSync(path.join(config.secretsDirectory, 'sealing-key')),
    )
  })
})

describe('a restore where there is something already', () => {
  it('is refused, and with --replace moves the old database and its keys aside, whole', async () => {
    const directory = freshDirectory()
    const config = configOf({ DATA_DIR: directory })
    const options = { source: made.folder, replace: false, now: new Date() }
    await restoreBackup(config, options)
    const before = readFileSync(path.join(directory, 'secrets/database-password'), 'utf8')
    await expect(restoreBackup(config, options)).rejects.toThrow(/holds a database already\. Nothing was changed\..*--replace/)
    expect(readFileSync(path.join(directory, 'secrets/database-password'), 'utf8')).toBe(before)
    const { aside } = await restoreBackup(config, { ...options, replace: true, now: new Date(Date.now() + 5_000) })
    expect(aside).toHaveLength(2)
    expect(readdirSync(aside[0] ?? '')).toEqual(['mariadb'])
    expect(readFileSync(path.join(aside[1] ?? '', 'database-password'), 'utf8')).toBe(before)
  })

  it('is refused for tables of an outside database, and with --replace moves them into a schema beside it', async () => {
    const url = await schemaFor(inject('databaseUrl'), 'backup_outside')
    const config = configOf({ DATABASE_URL: url, DATA_DIR: freshDirectory() })
    const options = { source: made.folder, replace: false, now: new Date() }
    await restoreBackup(config, options)
    const database = connect(url)
    try {
      await database.query("UPDATE shops SET name = 'Before'")
      await expect(restoreBackup(config, options)).rejects.toThrow(/Something else is connected/)
    } finally {
      await database.close()
    }
    await expect(restoreBackup(config, options)).rejects.toThrow(/holds tables already\. Nothing was changed/)
    const { aside } = await restoreBackup(config, { ...options, replace: true })
    const [, schema] = /schema (\w+)/.exec(aside[0] ?? '') ?? []
    const again = connect(url)
    try {
      const names = (sql: string) => again.query<{ name: string }>(sql, { type: QueryTypes.SELECT })
      expect(await names(`SELECT name FROM ${schema}.shops`)).toEqual([{ name: 'Before' }])
      expect(await names('SELECT name FROM shops')).toEqual([{ name: 'Kiln Lane Fabrication' }])
      expect(await headsIn(again)).toEqual(headsOf(made.manifest))
    } finally {
      await again.close()
    }
  })
})

/** A copy of the set, to be damaged. */
function copyOfSet(): string {
  fresh += 1
  const copy = path.join(folder, `damaged-${fresh}`)
  cpSync(made.folder, copy, { recursive: true })
  return copy
}

const entriesFile = 'tables/ledger_entries.jsonl.gz'

const damages: [string, (set: string) => void, RegExp][] = [
  [
    'one flipped bit of a table',
    (set) => {
      const bytes = readFileSync(path.join(set, entriesFile))
      bytes[400] = (bytes[400] ?? 0) ^ 1
      writeFileSync(path.join(set, entriesFile), bytes)
    },
    /^tables\/ledger_entries\.jsonl\.gz is damaged/,
  ],
  [
    'a table cut short',
    (set) => truncateSync(path.join(set, entriesFile), 500),
    /^tables\/ledger_entries\.jsonl\.gz was cut short: it has 500 bytes/,
  ],
  ['a missing table', (set) => rmSync(path.join(set, 'tables/users.jsonl.gz')), /^tables\/users\.jsonl\.gz is missing/],
  ['a missing attachment', (set) => rmSync(path.join(set, 'attachments'), { recursive: true }), /^attachments\/\S+ is missing/],
  [
    'an attachment that neither set nor manifest has',
    (set) => {
      const manifest = readManifest(set)
      writeManifest(set, { ...manifest, files: manifest.files.filter((file) => !file.path.startsWith('attachments/')) })
    },
    /^attachments\/\S+ is missing/,
  ],
  [
    'a missing manifest',
    (set) => rmSync(path.join(set, 'manifest.json')),
    /^There is no manifest\.json in .*: this is not a whole backup\.$/,
  ],
  [
    'a manifest cut short',
    (set) => truncateSync(path.join(set, 'manifest.json'), 800),
    /^manifest\.json in .* is damaged: it cannot be read\.$/,
  ],
  [
    'a way out of the set in the manifest',
    (set) => {
      const manifest = readManifest(set)
      writeManifest(set, { ...manifest, files: [{ path: '../../etc/passwd', size: 1, sha256: '0'.repeat(64) }] })
    },
    /is damaged at “files\.0\.path”/,
  ],
  ['a missing key', (set) => rmSync(path.join(set, 'keys/sealing-key')), /^Of the keys, sealing-key is missing/],
  [
    'another key in the place of the one that sealed',
    (set) => {
      const key = '1'.repeat(64)
      writeFileSync(path.join(set, 'keys/sealing-key'), key)
      const manifest = readManifest(set)
      const other = { path: 'sealing-key', size: 64, sha256: createHash('sha256').update(key).digest('hex') }
      writeManifest(set, { ...manifest, keyFiles: manifest.keyFiles.map((file) => (file.path === 'sealing-key' ? other : file)) })
    },
    /^Ledger \S+ \(proof-test\) is altered\. The seal over entry \d+ names key [0-9a-f]{16}/,
  ],
  [
    'an altered entry behind hashes that fit',
    (set) => alterEntry(set, sealed.id, false),
    /^Ledger \S+ \(proof-test\) is altered\. Entry 3 does not match its hash\.$/,
  ],
  [
    'a chain written anew behind a seal',
    (set) => alterEntry(set, sealed.id, true),
    /^Ledger \S+ \(proof-test\) is altered\. Entry \d+ is not the one that was sealed/,
  ],
  [
    'an entry left out at the end',
    (set) =>
      forge(
        set,
        'ledger_entries',
        (rows, place) =>
          void rows.splice(
            rows.findLastIndex((row) => row[place('ledger_id')] === running.id),
            1,
          ),
      ),
    /^Ledger \S+ \(proof-test\) is altered\. Entry \d+ is missing/,
  ],
  [
    'an entry under another person’s name beside its text',
    (set) =>
      forge(set, 'ledger_entries', (rows, place) => {
        const row = rows.find((one) => one[place('ledger_id')] === running.id)
        if (row) row[place('author_id')] = running.staff.witness.userId
      }),
    /^Ledger \S+ \(proof-test\) is altered\. Entry 1 is altered: its column author_id/,
  ],
  [
    'a seal taken away',
    (set) => forge(set, 'seals', (rows) => void rows.pop()),
    /^Ledger \S+ \(proof-test\) is altered\. Entry \d+ is a signature, and its seal is missing/,
  ],
  [
    'a schema of a later program',
    (set) => writeManifest(set, { ...readManifest(set), migrations: [...readManifest(set).migrations, '999-later'] }),
    /^This backup was made by a newer Quarterload \(it has 999-later\)\. Update this one, then restore\.$/,
  ],
  [
    'a set of a later program',
    (set) => writeFileSync(path.join(set, 'manifest.json'), JSON.stringify({ format: 2 })),
    /^This backup was made by a newer Quarterload\. Update this one, then restore\.$/,
  ],
]

describe('a damaged set is refused in a sentence, and nothing is written, for', () => {
  it.each(damages)('%s', async (_name, damage, sentence) => {
    const set = copyOfSet()
    damage(set)
    const directory = freshDirectory()
    const restoring = restoreBackup(configOf({ DATA_DIR: directory }), { source: set, replace: false, now: new Date() })
    await expect(restoring).rejects.toThrow(sentence)
    expect(existsSync(directory)).toBe(false)
  })

  it('nobody: the copy as it was made is taken', async () => {
    const options = { source: copyOfSet(), replace: false, now: new Date() }
    await expect(restoreBackup(configOf({ DATA_DIR: freshDirectory() }), options)).resolves.toMatchObject({ attachments: 1 })
  })
})

describe('a row that the database does not take', () => {
  it('leaves an outside database as empty as it was', async () => {
    const set = copyOfSet()
    forge(set, 'memberships', (rows, place) => {
      for (const row of rows) row[place('role')] = 'king'
    })
    const url = await schemaFor(inject('databaseUrl'), 'backup_refused')
    const config = configOf({ DATABASE_URL: url, DATA_DIR: freshDirectory() })
    await expect(restoreBackup(config, { source: set, replace: false, now: new Date() })).rejects.toThrow(/memberships_role/)
    await restoreBackup(config, { source: made.folder, replace: false, now: new Date() })
  })
})

describe('a backup of other versions and of a broken database', () => {
  it('of an older schema is brought up to date when it is restored', async () => {
    const old = connect(await schemaFor(inject('databaseUrl'), 'backup_old'))
    const { config } = testServer().context
    let set: string
    try {
      await migrateUp(old, '003-instruments-and-protocols')
      await old.query(
        `INSERT INTO shops (id, name, force_unit, pressure_unit, length_unit, created_at)
         VALUES ('0198c2a4-0000-7000-8000-000000000001', 'Old Kiln', 'short-ton', 'psi', 'mm', '2025-01-02 03:04:05.678')`,
      )
      set = (await backup(config, old, new Date(Date.now() + 60_000))).folder
    } finally {
      await old.close()
    }
    const url = await schemaFor(inject('databaseUrl'), 'backup_updated')
    await restoreBackup(configOf({ DATABASE_URL: url, DATA_DIR: freshDirectory() }), { source: set, replace: false, now: new Date() })
    const updated = connect(url)
    try {
      const [shop] = await updated.query<{ at: string }>('SELECT CAST(created_at AS CHAR) AS at FROM shops', { type: QueryTypes.SELECT })
      expect(shop?.at).toBe('2025-01-02 03:04:05.678')
      expect(await updated.query('SELECT due_on FROM instruments', { type: QueryTypes.SELECT })).toEqual([])
    } finally {
      await updated.close()
    }
  })

  it('says which ledger is broken, at which entry, and which attachment is gone', async () => {
    const url = await schemaFor(inject('databaseUrl'), 'backup_broken')
    const config = configOf({ DATABASE_URL: url, DATA_DIR: freshDirectory() })
    await restoreBackup(config, { source: made.folder, replace: false, now: new Date() })
    rmSync(path.join(config.dataDirectory, 'attachments'), { recursive: true })
    const broken = connect(url)
    try {
      await broken.query("UPDATE ledger_entries SET canonical = REPLACE(canonical, 'Before 2', 'Before 9') WHERE ledger_id = ?", {
        replacements: [running.id],
      })
      const { problems, folder: set } = await backup(config, broken, new Date(Date.now() + 120_000))
      expect(problems).toEqual([
        expect.stringMatching(new RegExp(`^Ledger ${running.id} \\(proof-test\\) is altered\\. Entry \\d+ does not match its hash\\.$`)),
        `The attachment ${running.staff.lead.shopId}/${photo.attachment.sha256} is missing from the storage.`,
      ])
      const options = { source: set, replace: false, now: new Date() }
      await expect(restoreBackup(configOf({ DATA_DIR: freshDirectory() }), options)).rejects.toThrow(problems[0])
    } finally {
      await broken.close()
    }
  })
})
