import { randomBytes } from 'node:crypto'
import { Agent, createServer, request } from 'node:http'
import type { RequestListener, Server } from 'node:http'
import mariadb from 'mariadb'
import type { Connection } from 'mariadb'
import { v7 as newId } from 'uuid'
import { appendResponseSchema } from '#shared/api/ledger'
import { testListSchema } from '#shared/api/proof-tests'
import { FIRST_PREV_HASH } from '#shared/ledger/chain'
import { migrateUp } from '#server/database/migrator'
import { ApiRun } from '../factories/api-run'
import { openTestServer } from '../support/api-server'
import { inTurn, ratioLine } from './measure'
import type { Line } from './measure'

const TESTS = 100_000
const agent = new Agent({ keepAlive: true, maxSockets: 1 })

interface Listening {
  address: string
  server: Server
}

function listen(answer: RequestListener): Promise<Listening> {
  const server = createServer(answer)
  return new Promise((resolve) => {
    server.listen(0, '127.0.0.1', () => {
      const address = server.address()
      resolve({ address: `http://127.0.0.1:${typeof address === 'object' && address !== null ? address.port : 0}`, server })
    })
  })
}

interface Answer {
  status: number | undefined
  cookie: string
  text: string
}

/** One request on a connection that stays open, read to its end. */
function ask(url: string, options: { cookie?: string; body?: object } = {}): Promise<Answer> {
  const { origin } = new URL(url)
  const headers = { origin, cookie: options.cookie ?? '', 'content-type': 'application/json' }
  return new Promise((resolve, reject) => {
    const asked = request(url, { agent, headers, method: options.body === undefined ? 'GET' : 'POST' }, (response) => {
      const chunks: Buffer[] = []
      response.on('data', (chunk: Buffer) => chunks.push(chunk))
      response.on('error', reject)
      response.on('end', () => {
        const cookie = response.headers['set-cookie']?.[0]?.split(';')[0] ?? ''
        resolve({ status: response.statusCode, cookie, text: Buffer.concat(chunks).toString('utf8') })
      })
    })
    asked.on('error', reject)
    asked.end(options.body === undefined ? undefined : JSON.stringify(options.body))
  })
}

async function askFor(url: string, cookie: string): Promise<string> {
  const { status, text } = await ask(url, { cookie })
  if (status !== 200) throw new Error(`${url} answered ${status}: ${text}`)
  return text
}

/** Rows as they would be after years: over 300 presses, from five years back, in no order of their ids. */
async function fillRegister(bare: Connection, { staff }: ApiRun): Promise<void> {
  const { shopId } = staff.lead
  const begun = Date.parse('2021-10-01T08:00:00Z')
  const presses = Array.from({ length: 300 }, () => newId())
  const now = new Date()
  const ledger = (id: string, subject: string) => [id, shopId, subject, 0, FIRST_PREV_HASH, now]
  const intoLedgers = 'INSERT INTO ledgers (id, shop_id, subject, head_seq, head_hash, created_at) VALUES (?, ?, ?, ?, ?, ?)'
  await bare.batch(
    intoLedgers,
    presses.map((id) => ledger(id, 'press')),
  )
  const perBatch = 5_000
  for (let from = 0; from < TESTS; from += perBatch) {
    const numbers = Array.from({ length: perBatch }, (_, index) => from + index + 10)
    const rows = numbers.map((number) => ({ number, id: `${randomBytes(4).toString('hex')}${newId().slice(8)}` }))
    await bare.beginTransaction()
    await bare.batch(
      intoLedgers,
      rows.map(({ id }) => ledger(id, 'proof-test')),
    )
    await bare.batch(
      `INSERT INTO proof_tests (id, shop_id, number, number_index, press_id, press_name, protocol_name, status, result, rated_load_newton,
         rated_load_text, rated_load_unit, reached_percent, stopped_at_percent, lead_id, lead_name, witness_id, witness_name, opened_at,
         concluded_at, sealed_at, head_seq)
       VALUES (?, ?, ?, ?, ?, ?, 'First load by quarters', 'signed', 'accepted', 106757.3, '12', 'short-ton', 100, NULL, ?, ?, ?, ?, ?, ?, ?, 60)`,
      rows.map(({ number, id }) => {
        const press = number % presses.length
        const opened = new Date(begun + number * 1_500_000)
        const concluded = new Date(opened.getTime() + 7_200_000)
        return [
          ...[id, shopId, `PT-${String(number).padStart(4, '0')}`, number, presses[press], `Press ${press}, straightening press`],
          ...[staff.lead.userId, staff.lead.name, staff.witness.userId, staff.witness.name, opened, concluded, concluded],
        ]
      }),
    )
    await bare.commit()
  }
  await bare.query('ANALYZE TABLE proof_tests')
}

/** The cursor of the last page, found as a reader would: from page to page, in big steps and then in small ones. */
async function lastPage(list: string, cookie: string): Promise<string> {
  let cursor: string | null = null
  for (const limit of [100, 25]) {
    for (;;) {
      const page = testListSchema.parse(
        JSON.parse(await askFor(`${list}&limit=${limit}${cursor === null ? '' : `&cursor=${cursor}`}`, cookie)),
      )
      if (page.older === null || (limit === 100 && page.proofTests.length < 100)) break
      // Small steps begin a big one before the end.
      const next = testListSchema.parse(JSON.parse(await askFor(`${list}&limit=${limit}&cursor=${page.older}`, cookie)))
      if (limit === 100 && next.older === null) break
      cursor = page.older
    }
  }
  if (cursor === null) throw new Error('The register has more than one page.')
  return cursor
}

const REGISTER_ROW = `id, shop_id, number, press_id, press_name, protocol_name, status, result, rated_load_text, rated_load_unit, reached_percent,
  stopped_at_percent, lead_id, lead_name, witness_id, witness_name, opened_at, concluded_at, sealed_at`

async function registerLines(bare: Connection, run: ApiRun, address: string, cookie: string): Promise<Line[]> {
  const { shopId } = run.staff.lead
  const list = `${address}/api/proof-tests?shop=${shopId}&sort=-opened`
  const cursor = await lastPage(list, cookie)
  const sql = `SELECT ${REGISTER_ROW} FROM proof_tests WHERE shop_id = ? ORDER BY opened_at DESC, id DESC LIMIT 26`
  const floor = await listen((_request, response) => {
    void bare.query(sql, [shopId]).then((rows: unknown[]) => {
      response.setHeader('Content-Type', 'application/json').end(JSON.stringify(rows.slice(0, 25)))
    })
  })
  const [first = [], last = [], plain = []] = await inTurn([
    () => askFor(`${list}&limit=25`, cookie),
    () => askFor(`${list}&limit=25&cursor=${cursor}`, cookie),
    () => askFor(floor.address, ''),
  ])
  floor.server.close()
  return [
    ratioLine(`register, 25 of ${TESTS.toLocaleString('en')} tests`, first, 'the bare driver behind node:http', plain, 2),
    ratioLine('register, last page', last, 'the first page', first, 1.5),
  ]
}

async function appendLine(bare: Connection, run: ApiRun, address: string, cookie: string): Promise<Line> {
  const draft = () => run.lead.draft({ kind: 'observed', payload: { at: null, what: 'noise', note: 'A click at the left pin, once.' } })
  const append = async () => {
    const body = { sentAt: new Date().toISOString(), entries: [draft()] }
    const { text } = await ask(`${address}${run.path}`, { cookie, body })
    const [result] = appendResponseSchema.parse(JSON.parse(text)).results
    if (result?.outcome !== 'kept') throw new Error(`The entry was not kept: ${text}`)
  }
  await bare.query('CREATE TABLE bench_entries (id CHAR(36) NOT NULL PRIMARY KEY, canonical LONGTEXT NOT NULL) ENGINE=InnoDB')
  const canonical = JSON.stringify({ ...draft(), prevHash: FIRST_PREV_HASH })
  const insert = () => bare.query('INSERT INTO bench_entries (id, canonical) VALUES (?, ?)', [newId(), canonical])
  const [appended = [], inserted = []] = await inTurn([append, insert])
  return ratioLine('append of one entry', appended, 'a bare INSERT with its durable commit', inserted, 2)
}

/** Everything that needs a database: asked over HTTP as a browser asks, by one person at a time. */
export async function serverLines(databaseUrl: string): Promise<Line[]> {
  const { app, context } = openTestServer(databaseUrl)
  await migrateUp(context.database)
  const bare = await mariadb.createConnection(databaseUrl)
  const main = await listen(app)
  try {
    const run = await ApiRun.open()
    await run.driveTo('set-up')
    const { email, password } = run.staff.lead
    const { cookie } = await ask(`${main.address}/api/session`, { body: { email, password } })
    const append = await appendLine(bare, run, main.address, cookie)
    await fillRegister(bare, run)
    return [...(await registerLines(bare, run, main.address, cookie)), append]
  } finally {
    agent.destroy()
    main.server.close()
    await bare.end()
  }
}
