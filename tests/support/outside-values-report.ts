import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { z } from 'zod'

const comparedSchema = z.array(z.object({ source: z.string(), values: z.int().positive(), worst: z.number().nonnegative().nullable() }))

/**
 * A table of the values from outside that the reference tests compared, from what each of them left in `folder`:
 * source, how many values, and the worst relative difference. A difference without end is stored as null.
 */
export function outsideValuesTable(folder: string): { lines: string[]; values: number; sources: number } {
  const files = existsSync(folder) ? readdirSync(folder).filter((file) => file.endsWith('.json')) : []
  const rows = new Map<string, { values: number; worst: number }>()
  for (const file of files) {
    for (const { source, values, worst } of comparedSchema.parse(JSON.parse(readFileSync(join(folder, file), 'utf8')))) {
      const sofar = rows.get(source) ?? { values: 0, worst: 0 }
      rows.set(source, { values: sofar.values + values, worst: Math.max(sofar.worst, worst ?? Infinity) })
    }
  }
  const sorted = [...rows].sort(([a], [b]) => a.localeCompare(b))
  const total = sorted.reduce((sum, [, { values }]) => sum + values, 0)
  const width = Math.max(6, ...sorted.map(([source]) => source.length))
  const line = (source: string, values: string, worst: string) => `${source.padEnd(width)}  ${values.padStart(7)}  ${worst.padStart(9)}`
  return {
    lines: [
      line('source', 'values', 'worst'),
      ...sorted.map(([source, { values, worst }]) => line(source, String(values), worst === 0 ? '0' : worst.toExponential(1))),
      line(`${sorted.length} sources`, String(total), ''),
    ],
    values: total,
    sources: sorted.length,
  }
}
