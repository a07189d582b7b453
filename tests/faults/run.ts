import { spawn } from 'node:child_process'
import { existsSync, rmSync } from 'node:fs'
import { runSeed } from '../support/seeded'
import { killsByProcess, killsOf, lineOf, readTotals, sumOf, TALLIES, type Totals } from './tally'

/*
 * `npm run test:faults`: the whole of what `npm test` runs a bounded part of. The same seed does the same again:
 * SEED=12345 npm run test:faults
 */
const LEAST_KILLS = 200
const seed = runSeed()

function say(line: string): void {
  process.stdout.write(`${line}\n`)
}

interface Part {
  name: string
  args: string[]
  /** What the part has to leave behind for the count, or nothing is known about it. */
  leaves?: string
}

const vitest = (name: string, project: string, file: string, leaves?: string): Part => ({
  name,
  args: ['node_modules/vitest/vitest.mjs', 'run', '--project', project, file],
  leaves,
})

const PARTS: Part[] = [
  { name: 'client', args: ['server/bootstrap/prepare.mjs', 'build'] },
  vitest('tally', 'faults', 'tests/faults/tally.test.ts'),
  vitest('kills', 'faults', 'tests/faults/kills.test.ts', 'kills'),
  vitest('database', 'faults', 'tests/faults/database-start.test.ts'),
  vitest('clients', 'faults', 'tests/faults/clients.test.ts', 'clients'),
  vitest('every-byte', 'faults', 'tests/faults/every-byte.test.ts'),
  vitest('offline', 'e2e', 'tests/e2e/offline.test.ts'),
  { name: 'galera', args: ['--import', 'tsx', 'tests/galera/run.ts'], leaves: 'galera' },
]

interface Outcome {
  name: string
  ok: boolean
  seconds: number
  /** The last count it printed, for a part that leaves none. */
  printed: string | undefined
}

function run({ name, args }: Part): Promise<Outcome> {
  say(`\n── ${name}`)
  const begun = performance.now()
  const child = spawn(process.execPath, args, {
    stdio: ['ignore', 'pipe', 'inherit'],
    env: { ...process.env, FAULTS: 'full', SEED: String(seed) },
  })
  let printed: string | undefined
  child.stdout.setEncoding('utf8').on('data', (text: string) => {
    process.stdout.write(text)
    printed = text.match(/kills \d+ · acknowledged .*/g)?.at(-1) ?? printed
  })
  return new Promise((resolve) => {
    child.once('close', (code) => resolve({ name, ok: code === 0, seconds: (performance.now() - begun) / 1000, printed }))
  })
}

/** Why this run is not in order, in sentences. */
function against(outcomes: readonly Outcome[], totals: ReadonlyMap<string, Totals>, sum: Totals): string[] {
  const wrong = outcomes.filter(({ ok }) => !ok).map(({ name }) => `Part ${name} failed.`)
  for (const { leaves } of PARTS) if (leaves !== undefined && !totals.has(leaves)) wrong.push(`Part ${leaves} left no count.`)
  if (sum.lost > 0) wrong.push(`${sum.lost} acknowledged entries are lost.`)
  if (sum.duplicated > 0) wrong.push(`${sum.duplicated} entries stand there more than once.`)
  const kills = killsOf(totals.get('kills') ?? sumOf([]))
  if (kills < LEAST_KILLS) wrong.push(`Only ${kills} kills of server, database and browser; ${LEAST_KILLS} are asked for.`)
  return wrong
}

async function main(): Promise<number> {
  rmSync(TALLIES, { force: true, recursive: true })
  say(`SEED=${seed} npm run test:faults does this run again.`)
  const outcomes: Outcome[] = []
  for (const part of PARTS) outcomes.push(await run(part))
  const totals = existsSync(TALLIES) ? readTotals() : new Map<string, Totals>()
  say('')
  for (const { name, ok, seconds, printed } of outcomes) {
    const counted = totals.get(name)
    const line = counted ? `${lineOf(counted)} (${killsByProcess(counted)})` : (printed ?? '')
    say(`${ok ? 'ok    ' : 'FAILED'} ${name.padEnd(10)} ${seconds.toFixed(1).padStart(6)} s  ${line}`)
  }
  const sum = sumOf([...totals.values()])
  const wrong = against(outcomes, totals, sum)
  say(`\n${lineOf(sum)}\n${killsByProcess(sum)} · SEED=${seed}`)
  for (const sentence of wrong) say(sentence)
  return wrong.length === 0 ? 0 : 1
}

process.exitCode = await main()
