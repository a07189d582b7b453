/** Families for text inside drawings, where classes don't reach. */
export const CONDENSED = "'IBM Plex Sans Condensed', 'IBM Plex Sans', system-ui, sans-serif"

/** Sets "75 %" and "21 %" with a narrow space that doesn't break, however the caller spaced it. */
export function setPercent(text: string): string {
  return text.replace(/(\d)[ \u00a0]?%/g, '$1\u202f%')
}

/** Groups the digits before the decimal mark in threes with a narrow space; shorter numbers than `least` digits stay whole. */
export function groupDigits(value: number, decimals = 0, least = 4): string {
  const [whole = '', fraction] = Math.abs(value).toFixed(decimals).split('.')
  const grouped = whole.length < least ? whole : whole.replace(/\B(?=(\d{3})+$)/g, '\u202f')
  return `${value < 0 ? '\u2212' : ''}${grouped}${fraction === undefined ? '' : `.${fraction}`}`
}
