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
