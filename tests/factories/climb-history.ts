import type { ClimbHistory } from '#shared/api/press-history'
import { ids } from './test-press'

/** One climb of a test as the press's history tells it: 60 kN/mm, nothing near its limit. */
export const climbHistory = (number: string, change: Partial<ClimbHistory> = {}): ClimbHistory => ({
  proofTestId: ids.test,
  number,
  on: '2026-09-15T10:00:00.000Z',
  result: 'accepted',
  repeats: null,
  leg: 'Ram central',
  climb: 0,
  of: 'bed middle less mean of pins',
  stiffness: 60e6,
  stiffnessU: 0.5e6,
  set: 0.02e-3,
  setLimit: 0.045e-3,
  pressureLoss: 0.012,
  pressureLossLimit: 0.05,
  line: [],
  ...change,
})
