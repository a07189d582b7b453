import { unitLabel, type ForceUnit } from '#shared/units'

const MONTHS = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December']

/** "21 September 2026", of a calendar date or of a moment in UTC. */
export function dayInWords(value: string | Date): string {
  const [year = '', month = '', day = ''] = (typeof value === 'string' ? value : value.toISOString()).slice(0, 10).split('-')
  return `${Number(day)} ${MONTHS[Number(month) - 1] ?? ''} ${year}`
}

/** "21 September 2026, 14:27 UTC": a letter is read anywhere. */
export function momentInWords(value: string | Date): string {
  const text = typeof value === 'string' ? value : value.toISOString()
  return `${dayInWords(text)}, ${text.slice(11, 16)} UTC`
}

/** "11.7 short tons". */
export const loadInWords = ({ text, unit }: { text: string; unit: ForceUnit }): string =>
  `${text} ${unitLabel(unit, { plural: text !== '1' })}`
