import { formatForce } from '../units'
import type { Opened } from './entries'
import { lengthText, percentText, type Criterion } from './figures'

/** "± 6 %", "± 0.02 mm": the expanded uncertainty (k = 2) of what a criterion judges, in the unit of its limit. */
export function uncertaintyWords(opened: Opened, criterion: Pick<Criterion, 'id' | 'U'>): string {
  const { id, U } = criterion
  if (U === null || !Number.isFinite(U)) return '—'
  if (id.startsWith('softening') || id === 'pressure-loss' || id === 'stage-reached') return `± ${(U * 100).toFixed(1)} %`
  if (id === 'rating') return `± ${formatForce(U, opened.forceUnit)}`
  return `± ${lengthText(opened, U)}`
}

/**
 * How far a value stays below its limit, in the limit's own unit; with a minus where it is beyond. A dash where there is
 * no such figure: for what was not read, and for a stage or a prediction, which lie between two limits.
 */
export function marginWords(opened: Opened, { id, value, limit }: Pick<Criterion, 'id' | 'value' | 'limit'>): string {
  if (value === null || limit === null || id === 'stage-reached' || id.startsWith('prediction')) return '—'
  const left = limit - value
  if (id.startsWith('softening') || id === 'pressure-loss') return percentText(left, 1)
  if (id === 'rating') return formatForce(left, opened.forceUnit)
  return lengthText(opened, left)
}
