import { describe, expect, it } from 'vitest';
import { studentTCdf, studentTQuantile } from '#shared/statistics/student-t';
import reference from '../../fixtures/reference/student-t.json';

describe('Student t against NIST/SEMATECH e-Handbook 1.3.6.7.2', () => {
  it.each(reference.rows)('ν = $nu', (row) => {
    expect(Number(studentTQuantile(0.975, row.nu).toFixed(3))).toBe(row.p0975);
    expect(Number(studentTQuantile(0.95, row.nu).toFixed(3))).toBe(row.p095);
    expect(studentTQuantile(0.975, row.nu)).toBeCloseTo(row.computed0975, 8);
    expect(studentTQuantile(0.95, row.nu)).toBeCloseTo(row.computed095, 8);
    expect(studentTCdf(row.computed0975, row.nu)).toBeCloseTo(0.975, 9);
  });
});
