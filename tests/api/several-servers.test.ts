import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { QueryTypes } from 'sequelize'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { v7 as newId } from 'uuid'
import { entriesResponseSchema } from '#shared/api/ledger'
import { checkChain, type StoredEntry } from '#shared/ledger/chain'
import { connect } from '#server/database/connection'
import { failuresPerAccount } from '#server/services/sign-in-limits'
import { ApiRun, Device, post } from '../factories/api-run'
import { aimClientsAt, ApiClient } from '../factories/client'
import { openStaffedShop } from '../factories/people'
import { balance, type Balancer } from '../support/balancer'
import { EventStream } from '../support/event-stream'
import { schemaFor } from '../support/schema'
import { startServer, type ServerProcess } from '../support/server-process'

const note = (text: string) => ({ kind: 'observed', payload: { at: null, what: 'noise', note: text } }) as const

let directory: string
let databaseUrl: string
let servers: ServerProcess[]
let balancer: Balancer

/** Two app servers as they would stand behind a proxy, on a database that neither has migrated yet. */
beforeAll(async () => {
  directory = mkdtempSync(path.join(tmpdir(), 'quarterload-several-'))
  databaseUrl = await schemaFor(inject('databaseUrl'), `several_${process.env['VITEST_POOL_ID'] ?? '1'}`)
  const database = connect(databaseUrl, { poolSize: 1 })
  const name = new URL(databaseUrl).pathname.slice(1)
  await database.query(`DROP DATABASE ${name}`)
  await database.close()
  await schemaFor(inject('databaseUrl'), `several_${process.env['VITEST_POOL_ID'] ?? '1'}`)
  const environment = {
    DATABASE_URL: databaseUrl,
    TRUST_PROXY: '1',
    // A disk of its own for each, and one folder of secrets for both.
    SECRETS_DIR: path.join(directory, 'secrets'),
  }
  servers = await Promise.all(['one', 'two'].map((own) => startServer({ ...environment, DATA_DIR: path.join(directory, own) })))
  balancer = await balance(servers.map((server) => server.address))
  aimClientsAt(balancer.address)
})

afterAll(async () => {
  await balancer.close()
  await Promise.all(servers.map((server) => server.end()))
  rmSync(directory, { recursive: true, force: true })
})

async function stored(ledgerId: string): Promise<StoredEntry[]> {
  const database = connect(databaseUrl, { poolSize: 1 })
  try {
    return await database.query<StoredEntry>('SELECT seq, canonical, hash FROM ledger_entries WHERE ledger_id = ? ORDER BY seq', {
      replacements: [ledgerId],
      type: QueryTypes.SELECT,
    })
  } finally {
    await database.close()
  }
}

describe('two app servers on one database', { timeout: 120_000 }, () => {
  it('take a test from the press to the seals, with others writing beside it at both', async () => {
    const run = await ApiRun.open()
    const writers = [new Device(run.staff.lead, run.id), new Device(run.staff.witness, run.id)]
    const notes = writers.map(async (device) => {
      for (let index = 1; index <= 25; index += 1) {
        const { results } = await post(device.person, run.path, [device.draft(note(`Note ${index}.`))])
        expect(results.map((result) => result.outcome)).toEqual(['kept'])
      }
    })
    await Promise.all([run.driveTo('sign'), ...notes])
    await run.refresh()
    expect((await run.sign('lead')).status).toBe(201)
    await run.refresh()
    expect((await run.sign('witness')).status).toBe(201)

    const entries = await stored(run.id)
    expect(checkChain(entries)).toMatchObject({ whole: true, entries: entries.length })
    expect(checkChain(await stored(run.pressId))).toMatchObject({ whole: true })
    const answers = await Promise.all(
      [1, 2].map(async () => entriesResponseSchema.parse((await run.staff.crew.client.get(run.path).expect(200)).body)),
    )
    expect(answers[0]).toEqual(answers[1])
    // One key sealed both signatures, whichever server took them.
    expect(new Set(answers[0]?.sealed.map((seal) => seal.kid)).size).toBe(1)
    expect(answers[0]?.sealed).toHaveLength(2)
    const next = await ApiRun.open({ staff: run.staff, pressId: run.pressId })
    expect(next.state.opened).not.toBeNull()
    expect(balancer.given.every((count) => count > 50)).toBe(true)
  })

  it('answer an entry resent to the other server the same, and write it once, also at the same moment', async () => {
    const run = await ApiRun.open()
    for (let index = 0; index < 10; index += 1) {
      const draft = run.lead.draft(note(`Said twice, ${index}.`))
      const [first, second] = await Promise.all([post(run.staff.lead, run.path, [draft]), post(run.staff.lead, run.path, [draft])])
      expect(second.results).toEqual(first.results)
    }
    expect(await stored(run.id)).toHaveLength(11)
  })

  it('know one session: it holds at both, and ends at both', async () => {
    const { lead } = await openStaffedShop()
    for (let turn = 0; turn < 4; turn += 1) await lead.client.get('/api/session').expect(200)
    await lead.client.delete('/api/session').expect(204)
    for (let turn = 0; turn < 4; turn += 1) await lead.client.get('/api/session').expect(401)
  })

  it('count wrong passwords together', async () => {
    const { lead } = await openStaffedShop()
    const client = new ApiClient()
    const statuses: number[] = []
    for (let attempt = 0; attempt <= failuresPerAccount; attempt += 1) {
      statuses.push((await client.post('/api/session', { email: lead.email, password: 'not the password' })).status)
    }
    expect(statuses).toEqual([...Array.from({ length: failuresPerAccount }, () => 401), 429])
  })

  it('give two tests that open at once two numbers', async () => {
    const staff = await openStaffedShop()
    const runs = await Promise.all([ApiRun.open({ staff }), ApiRun.open({ staff }), ApiRun.open({ staff })])
    expect(new Set(runs.map((run) => run.state.opened?.number)).size).toBe(3)
  })

  it('tell each other’s watchers what was written at the other', async () => {
    const run = await ApiRun.open()
    const response = await new ApiClient().post('/api/session', { email: run.staff.witness.email, password: run.staff.witness.password })
    const cookie = String(response.headers['set-cookie']).split(';')[0] ?? ''
    const streams = await Promise.all(
      servers.map((server) => EventStream.open(`${server.address}/api/stream?ledgers=${run.id}`, { cookie })),
    )
    try {
      for (let seq = 2; seq <= 5; seq += 1) {
        await post(run.staff.lead, run.path, [run.lead.draft(note('A click.'))])
        const waits = await Promise.all(streams.map((stream) => stream.until((one) => one.heads()[run.id] === seq)))
        process.stdout.write(`two servers: told after ${waits.map((wait) => wait.toFixed(0)).join(' and ')} ms\n`)
      }
    } finally {
      await Promise.all(streams.map((stream) => stream.close()))
    }
  })

  it('go on when one of them is killed, with what it had answered for', async () => {
    const run = await ApiRun.open()
    aimClientsAt(servers[0]?.address ?? '', 20_000)
    const { lead } = run.staff
    const other = new ApiClient()
    await other.post('/api/session', { email: lead.email, password: lead.password }).expect(200)
    const answeredFor = new Set<string>()
    const device = new Device({ ...lead, client: other }, run.id)
    const dead = servers.splice(1, 1)
    const writing = Array.from({ length: 20 }, async (_, index) => {
      const draft = device.draft(note(`Note ${index}.`))
      const { results } = await post(index % 2 === 0 ? device.person : lead, run.path, [draft]).catch(() => ({ results: [] }))
      for (const result of results) answeredFor.add(result.id)
    })
    await Promise.all(dead.map((server) => server.end('SIGKILL')))
    await Promise.all(writing)
    const draft = device.draft({ kind: 'observed', payload: note('After the kill.').payload })
    const { results } = await post(device.person, run.path, [{ ...draft, id: newId() }])
    expect(results[0]?.outcome).toBe('kept')
    const entries = await stored(run.id)
    const kept = new Set(entries.map((entry) => (JSON.parse(entry.canonical) as { id: string }).id))
    expect(answeredFor.size).toBeGreaterThanOrEqual(10)
    expect([...answeredFor].filter((id) => !kept.has(id))).toEqual([])
    expect(checkChain(entries)).toMatchObject({ whole: true })
  })
})
