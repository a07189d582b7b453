import { describe, expect, it } from 'vitest'
import type { TestRow } from '#shared/api/proof-tests'
import { testsAsked } from './asked'
import { outcomeOf, sealWord, whereOf } from './components/outcome'

const id = (index: number) => `01990000-0000-7000-8000-${String(index).padStart(12, '0')}`
const row = (given: Partial<TestRow>): TestRow => ({
  id: id(1),
  number: 'PT-0044',
  pressId: id(2),
  pressName: 'Press 1',
  protocolName: 'Off-centre',
  status: 'signed',
  result: 'accepted',
  ratedLoad: { text: '12', unit: 'short-ton' },
  reachedPercent: 100,
  stoppedAtPercent: null,
  leadId: id(3),
  leadName: 'Idris Wolcott',
  witnessId: id(4),
  witnessName: 'Pell Navarre',
  openedAt: '2026-09-21T08:00:00.000Z',
  concludedAt: null,
  sealedAt: '2026-09-21T12:00:00.000Z',
  ...given,
})

describe('what came of a test', () => {
  it('is the conclusion only once both have signed', () => {
    expect(outcomeOf(row({ result: 'accepted' }))).toMatchObject({ mark: 'within', word: 'Accepted' })
    expect(outcomeOf(row({ result: 'rejected' }))).toMatchObject({ mark: 'stop', word: 'Rejected', stopped: true })
    expect(outcomeOf(row({ status: 'to countersign', result: 'accepted' }))).toMatchObject({ word: 'To countersign' })
    expect(outcomeOf(row({ status: 'concluded', result: 'accepted' }))).toMatchObject({ word: 'To sign' })
  })

  it('is sealed by both, or signed by the lead only', () => {
    expect(sealWord(row({}))).toBe('sealed')
    expect(sealWord(row({ status: 'to countersign', sealedAt: null }))).toBe('lead only')
    expect(sealWord(row({ status: 'under way', sealedAt: null }))).toBe('—')
  })
})

it('a test that goes on is opened where the person has a part in it, every other one at its record', () => {
  const goesOn = row({ status: 'under way' })
  expect(whereOf(goesOn, id(3))).toBe(`/proof-tests/${id(1)}/run`)
  expect(whereOf(goesOn, id(4))).toBe(`/proof-tests/${id(1)}/attend`)
  expect(whereOf(goesOn, id(5))).toBe(`/proof-tests/${id(1)}`)
  expect(whereOf(row({}), id(3))).toBe(`/proof-tests/${id(1)}`)
})

describe('what the address asks of the register', () => {
  const view = (params: Record<string, string>) => ({
    value: (name: string) => params[name] ?? '',
    sortName: '-opened' as const,
    cursor: undefined,
  })

  it('is everything, newest first, when it says nothing', () => {
    const { asked, note, narrowed } = testsAsked(id(9), view({}))
    expect(asked).toEqual({ shop: id(9), sort: '-opened' })
    expect(note).toBe('newest first')
    expect(narrowed).toBe(false)
  })

  it('tells a result from what a test waits for', () => {
    expect(testsAsked(id(9), view({ result: 'rejected' })).asked).toMatchObject({ result: 'rejected' })
    expect(testsAsked(id(9), view({ result: 'to countersign' })).asked).toMatchObject({ status: 'to countersign' })
    expect(testsAsked(id(9), view({ result: 'nonsense' })).narrowed).toBe(false)
  })

  it('says between which days it looks, and where the reader is', () => {
    const { asked, note } = testsAsked(id(9), view({ from: '2026-04-01', to: '2026-09-30' }))
    expect(note).toBe('from 1 April 2026 to 30 September 2026, newest first')
    expect(asked).toMatchObject({ from: '2026-04-01', to: '2026-09-30', zone: new Date().getTimezoneOffset() })
  })

  it('leaves out what can be no day or no id, so that a mistyped address still shows the list', () => {
    expect(testsAsked(id(9), view({ from: 'yesterday', press: 'Press 2' })).asked).toEqual({ shop: id(9), sort: '-opened' })
  })
})
