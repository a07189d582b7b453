import { mkdtempSync, readFileSync, readdirSync, rmSync, statSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { loadOrCreateSecret } from './secrets'

let directory: string

beforeEach(() => {
  directory = path.join(mkdtempSync(path.join(tmpdir(), 'quarterload-secrets-')), 'secrets')
})

afterEach(() => {
  rmSync(path.dirname(directory), { recursive: true, force: true })
})

describe('a secret', () => {
  it('is made once, and read by its owner only', () => {
    const made = loadOrCreateSecret(directory, 'session-secret')
    expect(made).toMatch(/^[0-9a-f]{64}$/)
    expect(loadOrCreateSecret(directory, 'session-secret')).toBe(made)
    expect(statSync(directory).mode & 0o777).toBe(0o700)
    expect(statSync(path.join(directory, 'session-secret')).mode & 0o777).toBe(0o600)
  })

  it('leaves no draft behind and differs from the next one', () => {
    expect(loadOrCreateSecret(directory, 'one')).not.toBe(loadOrCreateSecret(directory, 'two'))
    expect(readdirSync(directory).sort()).toEqual(['one', 'two'])
    expect(readFileSync(path.join(directory, 'one'), 'utf8')).toMatch(/\n$/)
  })
})
