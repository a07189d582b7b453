import { groupDigits } from '#shared/units'
import type { Content } from '../sheet'
import { momentText } from '../record'

/** What stands in a cell of the spreadsheet, as it reads on paper. */
export function contentText(content: Content): string {
  if (content === null) return ''
  if (typeof content === 'string') return content
  if ('words' in content) return content.words
  if ('moment' in content) return content.moment === null ? '' : momentText(content.moment)
  const value = 'formula' in content ? content.result : content.number
  if (value === null) return ''
  if (typeof value === 'string') return value
  const { format } = content
  const decimals = /\.(0+)/.exec(format)?.[1]?.length ?? 0
  if (format.endsWith('%')) return `${(value * 100).toFixed(decimals).replace('-', '−')} %`
  if (format === 'General') return String(value)
  return groupDigits(value.toFixed(decimals).replace('-', '−'))
}
