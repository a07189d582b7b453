import type { StoredFile } from '../context'

const name = String.raw`[\da-zA-Z][\w-]*(?:\.[\w-]+)*`
const plainPath = new RegExp(`^${name}(?:/${name})*$`)

/**
 * Keeps keys from leaving their place, whatever they are made of.
 * @throws RangeError for a key that is no path of plain names.
 */
export function checkKey(key: string): string {
  if (!plainPath.test(key)) throw new RangeError(`No file can be kept as ${JSON.stringify(key)}.`)
  return key
}

export function inKeyOrder(files: readonly StoredFile[]): StoredFile[] {
  return [...files].sort((a, b) => (a.key < b.key ? -1 : a.key > b.key ? 1 : 0))
}
