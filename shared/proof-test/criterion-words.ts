import { formatForce } from '../units'
import type { Opened } from './entries'
import { lengthText, type Criterion } from './figures'

/** "± 6 %", "± 0.02 mm": the expanded uncertainty (k = 2) of what a criterion judges, in the unit of its limit. */
export function uncertaintyWords(opened: Opened, criterion: Pick<Criterion, 'id' | 'U'>): string {
  const { id, U } = criterion
  if (U === null || !Number.isFinite(U)) return '—'
  if (id.startsWith('softening') || id === 'pressure-loss' || id === 'stage-reached') return `± ${(U * 100).toFixed(1)} %`
  if (id === 'rating') return `± ${formatForce(U, opened.forceUnit)}`
  return `± ${lengthText(opened, U)}`
}
