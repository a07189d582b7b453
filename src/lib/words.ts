/** A sentence's first letter. */
export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)

/** "M. Sandoval" of "Marit Sandoval": a title block and a table have little room, the whole name is on the record. */
export function shortName(name: string): string {
  const words = name.trim().split(/\s+/)
  const last = words.pop() ?? ''
  return [...words.map((word) => `${word.charAt(0)}.`), last].join(' ')
}
