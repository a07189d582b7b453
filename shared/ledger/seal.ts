import { ed25519 } from '@noble/curves/ed25519.js'
import { bytesToHex, hexToBytes, utf8ToBytes } from '@noble/hashes/utils.js'
import { canonicalText } from './canonical'

/** A signature of the shop's server over the head of a ledger, made when a person signed. */
export interface Seal {
  kid: string
  ledgerId: string
  seq: number
  headHash: string
  sealedAt: string
  signature: string
}

function sealBytes(seal: Omit<Seal, 'signature'>): Uint8Array {
  const { kid, ledgerId, seq, headHash, sealedAt } = seal
  return utf8ToBytes(canonicalText({ kid, ledgerId, seq, headHash, sealedAt }))
}

/** Seals a ledger's head with Ed25519 (RFC 8032). `secretKey` is 32 bytes in hexadecimal. */
export function makeSeal(seal: Omit<Seal, 'signature'>, secretKey: string): Seal {
  return { ...seal, signature: bytesToHex(ed25519.sign(sealBytes(seal), hexToBytes(secretKey))) }
}

/** True when the seal was made with the key whose public half (32 bytes, hexadecimal) is given. */
export function checkSeal(seal: Seal, publicKey: string): boolean {
  return checkText(sealBytes(seal), seal.signature, publicKey)
}

/** Signs a text with Ed25519 (RFC 8032). `secretKey` is 32 bytes in hexadecimal; so is the answer, of 64 bytes. */
export function signText(text: string, secretKey: string): string {
  return bytesToHex(ed25519.sign(utf8ToBytes(text), hexToBytes(secretKey)))
}

/**
 * True when the signature over the text was made with the key whose public half is given. Both are lower-case
 * hexadecimal: the same bytes spelled in capitals are another spelling, and refused. RFC 8032 5.1.7, strictly.
 */
export function checkText(text: string | Uint8Array, signature: string, publicKey: string): boolean {
  if (!/^[0-9a-f]{128}$/.test(signature) || !/^[0-9a-f]{64}$/.test(publicKey)) return false
  try {
    const bytes = typeof text === 'string' ? utf8ToBytes(text) : text
    return ed25519.verify(hexToBytes(signature), bytes, hexToBytes(publicKey), { zip215: false })
  } catch {
    return false
  }
}

/** The public half of a sealing key, in hexadecimal. */
export function publicKeyOf(secretKey: string): string {
  return bytesToHex(ed25519.getPublicKey(hexToBytes(secretKey)))
}
