import { mkdirSync, writeFileSync } from 'node:fs'
import { basename, join } from 'node:path'
import { afterAll, expect } from 'vitest'

/** Where each test file leaves what it compared, for the run to count at its end. */
export const OUTSIDE_VALUES_FOLDER = '.artefacts/outside-values'

/** How many values of one source were compared, and the largest difference relative to the source's own value. */
export interface Compared {
  source: string
  values: number
  worst: number
}

const bySource = new Map<string, Compared>()
let testPath: string | undefined

/**
 * Notes that one of the program's values was compared with one from outside, and returns the difference relative
 * to the outside value, for the test to judge. A value of zero outside is met exactly or infinitely far off; a value
 * that the program doesn't give at all (null) likewise.
 */
export function comparedWith(source: string, ours: number | null, theirs: number): number {
  testPath = expect.getState().testPath
  const difference = ours === null || Number.isNaN(ours) ? Infinity : ours === theirs ? 0 : Math.abs((ours - theirs) / theirs)
  const sofar = bySource.get(source) ?? { source, values: 0, worst: 0 }
  bySource.set(source, { source, values: sofar.values + 1, worst: Math.max(sofar.worst, difference) })
  return difference
}

afterAll(() => {
  if (testPath === undefined) return
  mkdirSync(OUTSIDE_VALUES_FOLDER, { recursive: true })
  writeFileSync(join(OUTSIDE_VALUES_FOLDER, `${basename(testPath, '.test.ts')}.json`), JSON.stringify([...bySource.values()], null, 2))
})
