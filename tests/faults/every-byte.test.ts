import { describe, expect, it } from 'vitest'
import { verifyLedgerFile } from '#shared/ledger/verify-ledger-file'
import { ledgerFileBytes, ledgerFileOf } from '../factories/ledger-file'
import { stoppedTest } from '../factories/recorded-test'
import { seededRandom } from '../reference/seeded-random'
import { isFullRun } from '../support/seeded'

/** Whole minutes of work: every byte of a file is changed, and each time the whole file is read and checked. */
const MINUTES = 60_000

const SEED = Number(process.env['SEED'] ?? 20_260_915)
/** Each byte in the whole run; in `npm test` one of eight, from the one that the seed says. */
const STEP = isFullRun() ? 1 : 8
const bytes = ledgerFileBytes(ledgerFileOf(stoppedTest()))
const seen = (other: Uint8Array): boolean => !['whole', 'not sealed yet'].includes(verifyLedgerFile(other).verdict)

/** Another value of a byte: one bit turned (case of a letter is bit 5), or any value but its own. */
function another(value: number, random: () => number): number {
  return random() < 0.75 ? value ^ (1 << Math.floor(random() * 8)) : (value + 1 + Math.floor(random() * 255)) % 256
}

describe(`a sealed ledger file of ${bytes.length} bytes, seed ${SEED}`, () => {
  const { rectangular } = seededRandom(SEED)
  const random = () => rectangular(0.5) + 0.5

  it('is whole before anything is done to it', () => {
    expect(verifyLedgerFile(bytes).verdict).toBe('whole')
  })

  it(
    `shows a change of each single byte of it, ${STEP === 1 ? 'all tried' : `one of ${STEP} tried`}`,
    () => {
      const missed: string[] = []
      const work = bytes.slice()
      let tried = 0
      for (let at = SEED % STEP; at < bytes.length; at += STEP) {
        tried += 1
        const value = bytes[at] ?? 0
        const to = another(value, random)
        work[at] = to
        if (!seen(work)) missed.push(`byte ${at}: ${value} to ${to}`)
        work[at] = value
      }
      expect(missed).toEqual([])
      process.stdout.write(`${tried} single bytes changed, ${tried - missed.length} changes found (seed ${SEED})\n`)
    },
    12 * MINUTES,
  )

  it(
    'shows a byte left out and a byte put in',
    () => {
      const missed: string[] = []
      let tried = 0
      for (let at = 0; at < bytes.length; at += 1 + Math.floor(random() * 60 * STEP)) {
        const before = bytes.subarray(0, at)
        const cut = Buffer.concat([before, bytes.subarray(at + 1)])
        const added = Buffer.concat([before, Uint8Array.of(Math.floor(random() * 256)), bytes.subarray(at)])
        if (!seen(cut)) missed.push(`byte ${at} left out`)
        if (!seen(added)) missed.push(`a byte put in at ${at}`)
        tried += 2
      }
      expect(missed).toEqual([])
      process.stdout.write(`${tried} bytes left out or put in, ${tried - missed.length} changes found (seed ${SEED})\n`)
    },
    6 * MINUTES,
  )
})
