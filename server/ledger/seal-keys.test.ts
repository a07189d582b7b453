import { mkdtempSync, readFileSync, readdirSync, rmSync, statSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { checkSeal, makeSeal } from '#shared/ledger/seal'
import { loadSealKey, publicSealKeys, rotateSealKey } from './seal-keys'

let folder: string
const config = () => ({ secretsDirectory: path.join(folder, 'secrets') })

beforeEach(() => {
  folder = mkdtempSync(path.join(tmpdir(), 'quarterload-keys-'))
})
afterEach(() => rmSync(folder, { recursive: true, force: true }))

const over = (kid: string) => ({ kid, ledgerId: 'l', seq: 7, headHash: 'f'.repeat(64), sealedAt: '2026-09-15T12:11:00.000Z' })

describe('the key that seals', () => {
  it('changes for everybody who shares the folder, and the old one’s public half stays served', () => {
    const before = loadSealKey(config())
    const seal = makeSeal(over(before.kid), before.secretKey)
    const { old, fresh } = rotateSealKey(config(), new Date('2026-10-01T08:00:00Z'))
    expect(old).toMatchObject({ kid: before.kid, publicKey: before.publicKey, retiredOn: '2026-10-01T08:00:00.000Z' })
    expect(loadSealKey(config())).toEqual(fresh)
    const keys = publicSealKeys(config())
    expect(keys.map(({ kid, retiredOn }) => [kid, retiredOn === null])).toEqual([
      [fresh.kid, true],
      [before.kid, false],
    ])
    expect(checkSeal(seal, keys.find(({ kid }) => kid === seal.kid)?.publicKey ?? '')).toBe(true)
    expect(checkSeal(seal, fresh.publicKey)).toBe(false)
  })

  it('may change often; of each retired key only the public half is left', () => {
    const secrets = [1, 2, 3].map((day) => {
      const { secretKey } = loadSealKey(config())
      rotateSealKey(config(), new Date(Date.UTC(2026, 9, day)))
      return secretKey
    })
    expect(publicSealKeys(config())).toHaveLength(4)
    const directory = config().secretsDirectory
    const texts = readdirSync(directory).map((name) => readFileSync(path.join(directory, name), 'utf8'))
    for (const secret of secrets) expect(texts.join('\n')).not.toContain(secret)
    for (const name of readdirSync(directory)) expect(statSync(path.join(directory, name)).mode & 0o777).toBe(0o600)
  })
})
