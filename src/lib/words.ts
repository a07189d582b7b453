/** A sentence's first letter. */
export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)

/** A sentence ends in a point, whoever wrote it. */
export const asSentence = (text: string): string => (/[.!?]$/.test(text.trim()) ? text.trim() : `${text.trim()}.`)

/** "M. Sandoval" of "Marit Sandoval": a title block and a table have little room, the whole name is on the record. */
export function shortName(name: string): string {
  const words = name.trim().split(/\s+/)
  const last = words.pop() ?? ''
  return [...words.map((word) => `${word.charAt(0)}.`), last].join(' ')
}

/** "3rd": a place in an order. */
export function ordinal(count: number): string {
  const teen = count % 100 >= 11 && count % 100 <= 13
  const ending = teen ? 'th' : (['th', 'st', 'nd', 'rd'][count % 10] ?? 'th')
  return `${count}${ending}`
}
