import { spawnSync } from 'node:child_process'
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs'
import { z } from 'zod'
import { lineOf, readTotals, sumOf, TALLIES } from './faults/tally'
import { outsideValuesTable } from './support/outside-values-report'

interface Outcome {
  name: string
  passed: number
  failed: number
  /** Words of the tool that did the part, where it has some. */
  detail: string
  seconds: number
}

const report = '.artefacts/vitest.json'
/** Where the reference tests leave what they compared; `tests/support/outside-values.ts` writes it. */
const outsideValues = '.artefacts/outside-values'
const reportSchema = z.object({
  success: z.boolean(),
  numPassedTests: z.int(),
  numFailedTests: z.int(),
  numPendingTests: z.int(),
  numTodoTests: z.int(),
  testResults: z.array(z.object({ name: z.string(), status: z.string(), message: z.string() })),
})

function say(line: string): void {
  process.stdout.write(`${line}\n`)
}

function run(command: string[]): { ok: boolean; seconds: number } {
  const [program = '', ...args] = command
  const begun = performance.now()
  const { status } = spawnSync(program, args, { stdio: 'inherit' })
  return { ok: status === 0, seconds: (performance.now() - begun) / 1000 }
}

/** A part that is right or wrong as a whole. */
function check(name: string, command: string[]): Outcome {
  say(`\n── ${name}`)
  const { ok, seconds } = run(command)
  return { name, passed: ok ? 1 : 0, failed: ok ? 0 : 1, detail: ok ? 'in order' : 'failed, see above', seconds }
}

/** Vitest's own account, read back from its report. A test that was skipped has not passed, and counts as failed. */
function tests(command: string[]): Outcome {
  say('\n── tests')
  rmSync(report, { force: true })
  rmSync(outsideValues, { force: true, recursive: true })
  rmSync(TALLIES, { force: true, recursive: true })
  const { ok, seconds } = run(command)
  const name = 'tests'
  let parsed: z.infer<typeof reportSchema>
  try {
    parsed = reportSchema.parse(JSON.parse(readFileSync(report, 'utf8')))
  } catch {
    return { name, passed: 0, failed: 1, detail: 'vitest left no report, see above', seconds }
  }
  const { numPassedTests: passed, numFailedTests, numPendingTests: skipped, numTodoTests: left } = parsed
  const files = parsed.testResults.length
  const brokenFiles = parsed.testResults.filter((file) => file.status === 'failed').length
  let failed = numFailedTests + skipped + left
  // A file that could not be loaded, or an error outside of any test, has no test to count.
  if (failed === 0 && (!ok || !parsed.success || brokenFiles > 0 || passed === 0)) failed = Math.max(1, brokenFiles)
  const detail = `vitest: ${files} files, ${passed} passed, ${numFailedTests} failed, ${skipped + left} skipped`
  return { name, passed, failed, detail, seconds }
}

/** Values from outside that were compared, with the worst difference of each source; a run that compared none is not in order. */
function outsideValuesCompared(): Outcome {
  say('\n── values from outside, with the worst difference relative to each source’s own value')
  const { lines, values, sources } = outsideValuesTable(outsideValues)
  for (const line of lines) say(line)
  const detail = values > 0 ? `${values} compared, from ${sources} sources` : 'none compared: the reference tests left nothing'
  return { name: 'values', passed: values > 0 ? 1 : 0, failed: values > 0 ? 0 : 1, detail, seconds: 0 }
}

/** What was killed, and what came through, in the part of the fault tests that runs here; `npm run test:faults` runs all. */
function faultsCounted(): Outcome {
  say('\n── entries under faults')
  const sum = sumOf(existsSync(TALLIES) ? [...readTotals().values()] : [])
  const inOrder = sum.acknowledged > 0 && sum.lost === 0 && sum.duplicated === 0
  say(lineOf(sum))
  return { name: 'faults', passed: inOrder ? 1 : 0, failed: inOrder ? 0 : 1, detail: lineOf(sum), seconds: 0 }
}

function main(): number {
  mkdirSync('.artefacts', { recursive: true })
  const node = process.execPath
  const outcomes = [
    check('types', [node, 'node_modules/typescript/bin/tsc', '--noEmit']),
    check('lint', [node, 'node_modules/eslint/bin/eslint.js', '.']),
    check('build', [node, 'server/bootstrap/prepare.mjs', 'build', '--force']),
    tests([node, 'node_modules/vitest/vitest.mjs', 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`]),
    outsideValuesCompared(),
    faultsCounted(),
  ]
  say('')
  for (const { name, failed, detail, seconds } of outcomes) {
    say(`${failed === 0 ? 'ok    ' : 'FAILED'} ${name.padEnd(6)} ${seconds.toFixed(1).padStart(6)} s  ${detail}`)
  }
  const passed = outcomes.reduce((sum, outcome) => sum + outcome.passed, 0)
  const failed = outcomes.reduce((sum, outcome) => sum + outcome.failed, 0)
  say(`\n${passed} passed, ${failed} failed`)
  return failed === 0 ? 0 : 1
}

process.exitCode = main()
