import { readdirSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { describe, expect, it } from 'vitest'
import { CHANGE_RULES } from '#shared/press/changes'
import { PRESS_RULES } from '#shared/press/decide'
import { PROOF_TEST_RULES } from '#shared/proof-test/decide'

const ledgers = [
  {
    name: 'a proof test',
    numbers: ['R1', ...PROOF_TEST_RULES.map((rule) => rule.id)],
    files: ['shared/proof-test/decide.test.ts', 'shared/proof-test/decide-load.test.ts'],
  },
  { name: 'a press', numbers: [...PRESS_RULES, ...CHANGE_RULES].map((rule) => rule.id), files: ['shared/press/decide.test.ts'] },
]

/** Rule numbers in the names of tests: `it('R14: …')`, `it('R23 and R24: …')`. */
function quoted(files: readonly string[]): Set<string> {
  const text = files.map((file) => readFileSync(file, 'utf8')).join('\n')
  const names = text.matchAll(/\bit\(\s*'((?:[RP]\d+)(?:(?:, | and )[RP]\d+)*):/g)
  return new Set([...names].flatMap(([, list = '']) => list.split(/, | and /)))
}

describe.each(ledgers)('the numbered rules of $name', ({ numbers, files }) => {
  it('each have a number of their own', () => {
    expect(new Set(numbers).size).toBe(numbers.length)
  })

  it('are each quoted by at least one test', () => {
    const tests = quoted(files)
    expect(numbers.filter((number) => !tests.has(number))).toEqual([])
  })

  it('and no test quotes a number that no rule has', () => {
    expect([...quoted(files)].filter((number) => !numbers.includes(number))).toEqual([])
  })
})

function sources(...folders: string[]): string[] {
  return folders.flatMap((folder) =>
    readdirSync(folder, { recursive: true, encoding: 'utf8' })
      .filter((file) => /\.tsx?$/.test(file))
      .map((file) => path.join(folder, file)),
  )
}

describe('sources', () => {
  it('quote no rule number that does not exist', () => {
    const all = new Set(ledgers.flatMap(({ numbers }) => numbers))
    const strays = sources('server', 'src').flatMap((file) =>
      [...readFileSync(file, 'utf8').matchAll(/'([RP]\d+)'/g)].map(([, number = '']) => number).filter((number) => !all.has(number)),
    )
    expect(strays).toEqual([])
  })
})
