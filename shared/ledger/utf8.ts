export { utf8ToBytes } from '@noble/hashes/utils.js'

/** UTF-8 bytes as text. What is not UTF-8 becomes U+FFFD and a byte order mark stays, so that both show when it is written again. */
export function bytesToUtf8(bytes: Uint8Array): string {
  return new TextDecoder('utf-8', { ignoreBOM: true }).decode(bytes)
}
