import type { Opened } from '../proof-test/entries'
import { expectedOf } from '../proof-test/expected'
import { toUnit } from '../units'
import type { LineChartSpec } from './line-spec'

/**
 * The expected band of a leg as a chart draws it: deflections at the rated load in the test's unit. Null where no
 * sections are known. An estimate; see `expectedOf`.
 */
export function chartBand(opened: Opened, leg: number): LineChartSpec['band'] {
  const band = expectedOf(opened, leg)
  return band && { low: toUnit(band.low, opened.lengthUnit), high: toUnit(band.high, opened.lengthUnit) }
}
