import { spawnSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import { fingerprintOf, kidOf } from '#shared/ledger/check-ledger'
import { ledgerFileBytes, PUBLIC_KEY } from '../tests/factories/ledger-file'
import { projectRoot } from './config'

const folder = mkdtempSync(path.join(tmpdir(), 'quarterload-verify-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))

const bytes = ledgerFileBytes()
const file = path.join(folder, 'PT-0043.ledger.json')
writeFileSync(file, bytes)

function verify(args: string[], input?: Uint8Array): { status: number | null; said: string } {
  const { status, stdout, stderr } = spawnSync(process.execPath, ['--import', 'tsx', 'server/verify-cli.ts', ...args], {
    cwd: projectRoot,
    input,
    encoding: 'utf8',
  })
  return { status, said: stdout + stderr }
}

describe('the command that checks a ledger file', { timeout: 60_000 }, () => {
  it('says whole, and by whom, for a file or what is piped in', () => {
    const named = verify([file, '--key', fingerprintOf(PUBLIC_KEY)])
    expect(named.status).toBe(0)
    expect(named.said).toMatch(/^Whole: \d+ entries, nothing altered\./)
    expect(named.said).toContain('Marit Sandoval')
    expect(verify(['-'], bytes)).toMatchObject({ status: 0, said: expect.stringContaining('compare the fingerprint') })
  })

  it('takes the keys as the server answers them', () => {
    const keys = path.join(folder, 'keys.json')
    const served = { kid: kidOf(PUBLIC_KEY), publicKey: PUBLIC_KEY, since: '2026-09-01T00:00:00.000Z', retiredOn: null }
    writeFileSync(keys, JSON.stringify({ keys: [served] }))
    expect(verify([file, '--keys', keys]).status).toBe(0)
    writeFileSync(keys, JSON.stringify({ keys: [] }))
    expect(verify([file, '--keys', keys])).toMatchObject({ status: 1, said: expect.stringContaining('Wrong key') })
  })

  it('ends with 1 for an altered file, another key, another file, and none', () => {
    const altered = bytes.slice()
    altered[2000] = (altered[2000] ?? 0) ^ 1
    expect(verify(['-'], altered)).toMatchObject({ status: 1, said: expect.stringMatching(/^Altered at entry 1\./) })
    expect(verify([file, '--key', 'f'.repeat(64)])).toMatchObject({ status: 1, said: expect.stringMatching(/^Wrong key\./) })
    expect(verify(['package.json'])).toMatchObject({ status: 1, said: expect.stringMatching(/^Not a ledger file\./) })
    expect(verify([path.join(folder, 'none')]).status).toBe(1)
  })
})
