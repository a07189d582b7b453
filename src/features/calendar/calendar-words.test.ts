import { describe, expect, it } from 'vitest'
import type { CalendarItem } from '#shared/api/calendar'
import { monthAfter, monthsOf } from './calendar-words'

const id = (index: number) => `01990000-0000-7000-8000-${String(index).padStart(12, '0')}`
const TODAY = '2026-12-01'
const gauge = (on: string, code = 'PG-1'): CalendarItem => ({ kind: 'calibration', on, instrumentId: id(1), code, instrumentKind: 'gauge' })
const press = { pressId: id(2), pressName: 'Ferry' }

describe('the calendar', () => {
  it('puts what is late first, the longest first, and the rest into its months', () => {
    const items: CalendarItem[] = [
      gauge('2027-02-04'),
      { kind: 'clearance', on: '2026-11-30', ...press },
      gauge('2026-10-17', 'PG-3'),
      { kind: 'retest', on: '2026-10-22', ...press, number: 'PT-0004' },
      gauge(TODAY, 'PG-2'),
    ]
    const { late, months } = monthsOf(items, TODAY, 12)
    expect(late.map(({ title, due }) => [title, due])).toEqual([
      ['Gauge PG-3, calibration', '45 days late'],
      ['Ferry, repeat PT-0004', 'waiting 40 days'],
      ['Ferry, examination', '1 day late'],
    ])
    expect(months).toHaveLength(12)
    expect(months[0]).toMatchObject({ name: 'December 2026', rows: [{ title: 'Gauge PG-2, calibration', due: 'today' }] })
    expect(months[1]).toMatchObject({ name: 'January 2027', rows: [] })
    expect(months[2]?.rows).toMatchObject([{ due: 'in 65 days', late: false }])
  })

  it('leads an examination that waits to the joints', () => {
    const { late } = monthsOf([{ kind: 'examination', on: '2026-11-20', ...press, joints: 'joints 5 and 6' }], TODAY, 12)
    expect(late).toMatchObject([{ title: 'Ferry, examine joints 5 and 6', to: `/presses/${id(2)}#joints`, due: 'waiting 11 days' }])
  })

  it('counts months over the end of a year', () => {
    expect(monthAfter('2026-12', 1)).toBe('2027-01')
    expect(monthAfter('2026-01', -120)).toBe('2016-01')
  })
})
