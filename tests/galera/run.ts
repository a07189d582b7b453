import { chmodSync, mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { v7 as newId } from 'uuid'
import { checkChain, type StoredEntry } from '#shared/ledger/chain'
import type { Step } from '#shared/proof-test/steps'
import { delay } from '#server/database/mariadb-process'
import { ApiRun } from '../factories/api-run'
import { aimClientsAt, answered } from '../factories/client'
import { leaveTotals, Tally } from '../faults/tally'
import { balance } from '../support/balancer'
import { startServer } from '../support/server-process'
import { Cluster, type Node } from './cluster'
import { requirePackages } from './packages'
import { driveTo, NoteWriters } from './writers'

/** Far longer than a cluster takes to agree that a node is gone. */
const patience = 60_000
/** Where the run stands when a node is killed: before load, under load, and while it recovers. */
const killedBefore: Step['name'][] = ['seating', 'independent', 'recovery']

const say = (line: string) => process.stdout.write(`${line}\n`)

function must(holds: boolean, sentence: string): void {
  if (!holds) throw new Error(`Not so: ${sentence}`)
  say(`ok  ${sentence}`)
}

/** Every app server uses the same node, for as long as it stands: the one with the app's connections. */
async function usedNode(nodes: readonly Node[]): Promise<Node> {
  const counted = await Promise.all(
    nodes.map(async (node) => {
      const connection = await node.connect()
      const rows: { count: number | bigint }[] = await connection.query('SELECT COUNT(*) AS count FROM information_schema.processlist')
      await connection.end()
      return { node, count: Number(rows[0]?.count) }
    }),
  )
  counted.sort((a, b) => b.count - a.count)
  if (counted[0] === undefined) throw new Error('A cluster has nodes.')
  return counted[0].node
}

async function stored(node: Node, ledgerId: string): Promise<(StoredEntry & { id: string })[]> {
  const connection = await node.connect()
  try {
    await connection.query('SET SESSION wsrep_sync_wait = 1')
    return await connection.query('SELECT seq, canonical, hash, id FROM ledger_entries WHERE ledger_id = ? ORDER BY seq', [ledgerId])
  } finally {
    await connection.end()
  }
}

/** One node killed while three devices write; the run goes on, and the node comes back by itself. */
async function killDuring(cluster: Cluster, run: ApiRun, tally: Tally, until: Step['name']): Promise<void> {
  const victim = await usedNode(cluster.nodes)
  const writers = new NoteWriters(run, tally)
  await delay(1_000)
  await Promise.all([driveTo(run, tally, until), delay(300 + Math.random() * 400).then(() => victim.kill())])
  tally.killed('database')
  const atKill = writers.written
  await delay(2_000)
  const before = Date.now()
  await victim.start({ returns: true })
  const back = ((Date.now() - before) / 1000).toFixed(1)
  await writers.end()
  const stood = (writers.longestWait / 1000).toFixed(1)
  say(
    `    node ${victim.name} killed on the way to ${until}: ${writers.written} notes, ${writers.written - atKill} of them after the kill; ` +
      `longest wait for an answer ${stood} s; back and in step after ${back} s, given ${victim.lastTransfer()}`,
  )
}

async function checkEverywhere(cluster: Cluster, run: ApiRun, tally: Tally): Promise<void> {
  const ledgers = await Promise.all(cluster.nodes.map((node) => stored(node, run.id)))
  const presses = await Promise.all(cluster.nodes.map((node) => stored(node, run.pressId)))
  const [first = []] = ledgers
  tally.saw(first.map((entry) => entry.id))
  for (const [index, node] of cluster.nodes.entries()) {
    const ledger = ledgers[index] ?? []
    const press = presses[index] ?? []
    must(
      checkChain(ledger).whole && checkChain(press).whole,
      `node ${node.name}: both chains whole, ${ledger.length} and ${press.length} entries`,
    )
    must(JSON.stringify(ledger) === JSON.stringify(first), `node ${node.name}: the same entries in the same order`)
  }
}

async function main(directory: string): Promise<boolean> {
  const cluster = new Cluster(directory, requirePackages(directory))
  const closers: (() => Promise<unknown>)[] = [() => cluster.stop()]
  const tally = new Tally()
  try {
    say('Starting three nodes and two app servers …')
    await cluster.start()
    const environment = {
      DATABASE_URL: cluster.url,
      DATA_DIR: path.join(directory, 'app'),
      TRUST_PROXY: '1',
      // The nodes are set up as a shop's would be, and are checked at the start like those.
      RELAXED_DURABILITY: '0',
    }
    const servers = await Promise.all([startServer(environment), startServer(environment)])
    for (const server of servers) closers.push(() => server.end())
    const balancer = await balance(servers.map((server) => server.address))
    closers.push(() => balancer.close())
    aimClientsAt(balancer.address, patience)

    const run = await ApiRun.open()
    for (const until of killedBefore) await killDuring(cluster, run, tally, until)
    await driveTo(run, tally, 'sign')
    for (const as of ['lead', 'witness'] as const) {
      const entryId = newId()
      const signed = await answered(() => run.sign(as, { entryId }))
      must(signed.status === 201, `the ${as} signs`)
      tally.acknowledged(entryId)
      await run.refresh()
    }
    await checkEverywhere(cluster, run, tally)
    const next = await ApiRun.open({ staff: run.staff, pressId: run.pressId })
    must(next.state.opened !== null, 'the press is not blocked: the next test of it opens')
    must(
      balancer.given.every((count) => count > 50),
      `both app servers took part: ${balancer.given.join(' and ')} requests`,
    )
  } finally {
    for (const close of closers.reverse()) await close()
  }
  leaveTotals('galera', tally.totals())
  say(tally.line())
  const { lost, duplicated } = tally.totals()
  return lost === 0 && duplicated === 0
}

const directory = mkdtempSync(path.join(tmpdir(), 'quarterload-galera-'))
chmodSync(directory, 0o755)
try {
  process.exitCode = (await main(directory)) ? 0 : 1
  rmSync(directory, { recursive: true, force: true })
} catch (error) {
  process.stderr.write(
    `${error instanceof Error ? (error.stack ?? error.message) : String(error)}\nThe nodes’ logs are under ${directory}\n`,
  )
  process.exitCode = 1
}
