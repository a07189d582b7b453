import { createHash, randomBytes, timingSafeEqual } from 'node:crypto'

/** A secret for a link, of 256 random bits. Only its hash is kept with what it opens. */
export const newToken = (): string => randomBytes(32).toString('base64url')

export const hashOfToken = (token: string): string => createHash('sha256').update(token).digest('hex')

/** Whether a hash that the database found is the token's, in a time that says nothing: its collation decides nothing here. */
export function isTokenOf(token: string, hash: string): boolean {
  const [own, kept] = [Buffer.from(hashOfToken(token)), Buffer.from(hash)]
  return own.length === kept.length && timingSafeEqual(own, kept)
}
