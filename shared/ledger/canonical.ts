/**
 * The canonical text of a JSON value, after RFC 8785 (JSON Canonicalization Scheme): members sorted by
 * UTF-16 code units, no blanks, numbers as ECMAScript writes them.
 * Throws TypeError on what JSON cannot carry (NaN, infinities, functions, lone surrogates).
 */
export function canonicalText(value: unknown): string {
  if (value === null || typeof value === 'boolean') return String(value)
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw new TypeError('A number in a ledger entry must be finite.')
    return JSON.stringify(value)
  }
  if (typeof value === 'string') {
    if (!value.isWellFormed()) throw new TypeError('A text in a ledger entry holds half a character.')
    return JSON.stringify(value)
  }
  if (Array.isArray(value)) return `[${value.map((item) => canonicalText(item ?? null)).join(',')}]`
  if (typeof value === 'object') {
    const members = Object.entries(value)
      .filter(([, member]) => member !== undefined)
      .sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0))
      .map(([key, member]) => `${canonicalText(key)}:${canonicalText(member)}`)
    return `{${members.join(',')}}`
  }
  throw new TypeError(`A ledger entry cannot hold a ${typeof value}.`)
}
