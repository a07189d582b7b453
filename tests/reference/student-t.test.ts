import { describe, expect, it } from 'vitest'
import { studentTCdf, studentTQuantile } from '#shared/statistics/student-t'
import reference from '../../fixtures/reference/student-t.json'
import { comparedWith } from '../support/outside-values'

const TABLE = 'NIST/SEMATECH e-Handbook 1.3.6.7.2, table digits'
const COMPUTED = 'Student t, computed beside that table'

describe('Student t against NIST/SEMATECH e-Handbook 1.3.6.7.2', () => {
  it.each(reference.rows)('ν = $nu', (row) => {
    expect(comparedWith(TABLE, Number(studentTQuantile(0.975, row.nu).toFixed(3)), row.p0975)).toBe(0)
    expect(comparedWith(TABLE, Number(studentTQuantile(0.95, row.nu).toFixed(3)), row.p095)).toBe(0)
    expect(comparedWith(COMPUTED, studentTQuantile(0.975, row.nu), row.computed0975)).toBeLessThan(1e-9)
    expect(comparedWith(COMPUTED, studentTQuantile(0.95, row.nu), row.computed095)).toBeLessThan(1e-9)
    expect(comparedWith(COMPUTED, studentTCdf(row.computed0975, row.nu), 0.975)).toBeLessThan(1e-9)
  })
})
