import { createPrivateKey, createPublicKey, verify } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { canonicalText } from '#shared/ledger/canonical'
import { sha256Hex } from '#shared/ledger/chain'
import { checkSeal, makeSeal, publicKeyOf } from '#shared/ledger/seal'

// RFC 8032, 7.1, test 1: secret and public key.
const SECRET = '9d61b19deffd5a60ba844af492ec2cc44449c5697b326919703bac031cae7f60'
const PUBLIC = 'd75a980182b10ab7d54bfed3c964073a0ee172f3daa62325af021a68f707511a'
// FIPS 180-4, example "abc".
const SHA_256_OF_ABC = 'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad'

const fields = {
  kid: 'k1',
  ledgerId: '01994a00-0007-7000-8000-000000000001',
  seq: 71,
  headHash: SHA_256_OF_ABC,
  sealedAt: '2026-09-15T12:11:00.000Z',
}

describe('hash and seal against published values', () => {
  it('hashes "abc" as FIPS 180-4 does', () => {
    expect(sha256Hex('abc')).toBe(SHA_256_OF_ABC)
  })

  it('derives the public key of RFC 8032, 7.1, test 1', () => {
    expect(publicKeyOf(SECRET)).toBe(PUBLIC)
  })

  it('seals so that another implementation of Ed25519 verifies it', () => {
    const seal = makeSeal(fields, SECRET)
    const pkcs8 = Buffer.from(`302e020100300506032b657004220420${SECRET}`, 'hex')
    const key = createPublicKey(createPrivateKey({ key: pkcs8, format: 'der', type: 'pkcs8' }))
    expect(verify(null, Buffer.from(canonicalText(fields)), key, Buffer.from(seal.signature, 'hex'))).toBe(true)
    expect(checkSeal(seal, PUBLIC)).toBe(true)
  })

  it('does not verify when any field, the signature or the key is another', () => {
    const seal = makeSeal(fields, SECRET)
    const changes = [
      { seq: 72 },
      { kid: 'k2' },
      { headHash: 'f'.repeat(64) },
      { sealedAt: '2026-09-15T12:11:00.001Z' },
      { signature: 'f'.repeat(128) },
      { signature: 'nonsense' },
    ]
    for (const change of changes) expect(checkSeal({ ...seal, ...change }, PUBLIC)).toBe(false)
    expect(checkSeal(seal, publicKeyOf('1'.repeat(64)))).toBe(false)
  })
})
