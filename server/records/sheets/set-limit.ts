import type { Criterion } from '#shared/proof-test/evaluate-climb'
import { toUnit } from '#shared/units'
import type { RecordOfTest } from '../record'
import { leadFigureIncrement } from '../rows'
import { decimals, type Content } from '../sheet'
import { factorName } from './units'

interface SetLimitInput {
  record: RecordOfTest
  criterion: Criterion | undefined
  /** The coarsest increment behind the figure, m. */
  increment: number
  /** Cell of the full-load deflection. */
  full: string | null
}

/**
 * How much set the protocol lets stay: a share of the full-load deflection, at least two increments, at most what
 * the protocol names. A second set is measured against its own uncertainty, which no formula here recomputes.
 */
export function setLimitContent({ record, criterion, increment, full }: SetLimitInput): Content {
  if (!criterion || criterion.limit === null) return null
  const unit = record.opened.lengthUnit
  const format = decimals(unit === 'in' ? 4 : 3)
  const result = toUnit(criterion.limit, unit)
  if (criterion.label.startsWith('Second set') || full === null) return { number: result, format }
  const step = increment === leadFigureIncrement(record.opened) ? 'lead_increment' : String(increment)
  const shop = `MAX(limit_set*ABS(${full}),2*${step}/${factorName(unit)})`
  const most = record.opened.protocol.content.limits.mostSet
  return { formula: most ? `MIN(${shop},most_set/${factorName(unit)})` : shop, result, format }
}
