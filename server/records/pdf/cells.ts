import type { ShownReading } from '#shared/proof-test/record-stages'
import type { CriterionVerdict } from '#shared/proof-test/evaluate-climb'
import { verdictWord } from '#shared/proof-test/record'
import { STOP, SOUND, GRAPHITE, plain, type Run, type Style } from './typesetter'

/** Styles of words in a table's cell; the table gives them their size. */
const styled = (style: Omit<Style, 'size'>): Style => ({ family: 'condensed', ...style, size: 0 })

export const strong = (text: string): Run[] => plain(text, styled({ weight: 600 }))
export const quiet = (text: string): Run[] => plain(text, styled({ ink: GRAPHITE }))
export const normal = (text: string): Run[] => plain(text, styled({}))
export const sound = (text: string): Run[] => plain(text, styled({ weight: 600, ink: SOUND }))
export const stopped = (text: string): Run[] => plain(text, styled({ weight: 600, ink: STOP }))
export const mono = (text: string): Run[] => plain(text, styled({ family: 'mono' }))

/** What was typed first, struck through, and what counts, with the letter of its correction. */
export function readingCell(reading: ShownReading | null): Run[] | null {
  if (reading === null) return null
  const letters = reading.struck.map(({ letter }) => letter).join('')
  return [
    ...reading.struck.flatMap(({ text }) => [...plain(text, styled({ struck: true })), ...normal('\u00a0')]),
    ...normal(reading.text),
    ...(letters === '' ? [] : plain(letters, styled({ weight: 600, ink: STOP, raised: true }))),
  ]
}

/** A verdict's word; in red where it is beyond. */
export function verdictCell(verdict: CriterionVerdict): Run[] {
  const word = verdictWord(verdict)
  if (verdict === 'within') return sound(word)
  return verdict === 'beyond' ? stopped(word) : strong(word)
}
