import { mkdtempSync, readdirSync, rmSync, utimesSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, expect, it } from 'vitest'
import { FORMER_BUILDS_STAY, pruneFormerBuilds } from './former-builds'

const now = Date.parse('2026-11-01T12:00:00Z')
let folder: string

function file(name: string, age: number): void {
  writeFileSync(path.join(folder, name), name)
  const at = (now - age) / 1000
  utimesSync(path.join(folder, name), at, at)
}

beforeEach(() => {
  folder = mkdtempSync(path.join(tmpdir(), 'quarterload-assets-'))
})
afterEach(() => rmSync(folder, { recursive: true, force: true }))

it('keeps what a page of a former build may still ask for, and takes away what is older than that', () => {
  file('run-aaaa.js', FORMER_BUILDS_STAY + 1000)
  file('run-bbbb.js', FORMER_BUILDS_STAY - 1000)
  file('run-cccc.js', 0)
  expect(pruneFormerBuilds(folder, new Set(['run-cccc.js']), now)).toEqual(['run-aaaa.js'])
  expect(readdirSync(folder).sort()).toEqual(['run-bbbb.js', 'run-cccc.js'])
})

it('never takes away a file of this build, however old its date', () => {
  file('font-dddd.woff2', 2 * FORMER_BUILDS_STAY)
  expect(pruneFormerBuilds(folder, new Set(['font-dddd.woff2']), now)).toEqual([])
  expect(readdirSync(folder)).toEqual(['font-dddd.woff2'])
})
