import { describe, expect, it } from 'vitest'
import type { Due, Need, TodayPress, UnderWay } from '#shared/api/today'
import { needWords } from './need-words'
import { eventsOf, pressWords, underWayWords } from './today-words'

const id = (index: number) => `01990000-0000-7000-8000-${String(index).padStart(12, '0')}`
const TODAY = '2026-09-21'
const NOW = new Date('2026-09-21T10:25:00Z')

describe('what needs somebody', () => {
  const say = (need: Need) => needWords(need, TODAY)

  it('says of a press why it may not be used, and what to do', () => {
    expect(say({ kind: 'press-shut', pressId: id(1), pressName: 'Press 4', why: 'Hose changed.', since: null })).toMatchObject({
      mark: 'stop',
      title: 'Press 4 may not be used',
      note: 'Hose changed. Plan a proof test.',
      due: 'Now',
    })
  })

  it('counts how long a signature has waited', () => {
    const need: Need = {
      kind: 'countersign',
      proofTestId: id(2),
      number: 'PT-0042',
      pressName: 'Press 5',
      protocolName: 'Off-centre',
      since: '2026-09-12T12:00:00.000Z',
    }
    expect(say(need)).toMatchObject({
      title: 'Countersignature wanted on PT-0042',
      note: 'Press 5, off-centre. You were the witness.',
      due: 'waiting 9 days',
    })
  })

  it('leads from what a press waits for to where it is done', () => {
    const named = { pressId: id(1), pressName: 'Press 4', since: null }
    const to = (need: Need) => say(need).to
    expect(say({ kind: 'tag-hangs', ...named, why: 'The bed looks bent' })).toMatchObject({
      title: 'Take the tag off Press 4',
      note: 'The bed looks bent. Say so when it is off.',
      to: `/presses/${id(1)}#tag`,
    })
    expect(to({ kind: 'repair-open', ...named, repairId: id(9), why: 'Stopped.', since: '2026-09-20T12:00:00.000Z' })).toBe(
      `/presses/${id(1)}#repairs`,
    )
    expect(to({ kind: 'joints-to-examine', ...named, joints: 'joints 5 and 6' })).toBe(`/presses/${id(1)}#joints`)
    expect(to({ kind: 'retest', ...named, repeatsId: id(8), number: 'PT-0041' })).toBe(`/proof-tests/new?press=${id(1)}&repeats=${id(8)}`)
    expect(to({ kind: 'press-shut', ...named, why: 'Hose changed.' })).toBe(`/proof-tests/new?press=${id(1)}`)
    expect(to({ kind: 'press-overdue', pressId: id(1), pressName: 'Press 4', until: '2026-09-01' })).toBe(`/proof-tests/new?press=${id(1)}`)
    const gauge = { instrumentId: id(3), code: 'G-02', instrumentKind: 'gauge' as const }
    expect(to({ kind: 'instrument-out', ...gauge, is: 'out-of-date', dueOn: '2026-09-19' })).toBe(`/instruments/${id(3)}#calibration`)
  })

  it('says how late an instrument is, and when one falls due', () => {
    const named = { instrumentId: id(3), code: 'I-02', instrumentKind: 'indicator' as const }
    expect(say({ kind: 'instrument-out', ...named, is: 'out-of-date', dueOn: '2026-09-19' })).toMatchObject({
      title: 'Indicator I-02 is out of date',
      note: 'Due 19 September. It blocks any new test.',
      due: '2 days late',
      urgency: 'late',
    })
    expect(say({ kind: 'instrument-due', ...named, dueOn: '2026-09-22' })).toMatchObject({ due: 'in 1 day' })
    expect(say({ kind: 'instrument-due', ...named, dueOn: '2026-09-21' })).toMatchObject({ due: 'today' })
    expect(say({ kind: 'instrument-due', ...named, dueOn: '2027-01-05' })).toMatchObject({
      note: '5 January 2027. Send it before the next test.',
    })
  })
})

const press = (given: Partial<TodayPress['press']>, test: TodayPress['test'] = null): TodayPress => ({
  press: {
    id: id(4),
    name: 'Press 2',
    whatFor: 'straightening press',
    kind: 'h-frame',
    status: 'cleared',
    ratedLoad: { text: '12', unit: 'short-ton' },
    clearedTo: { text: '11.7', unit: 'short-ton' },
    clearedUntil: '2027-03-15',
    jointCount: 8,
    jointsAccepted: 8,
    lastChangedAt: '2026-09-15T10:00:00.000Z',
    ...given,
  },
  why: null,
  test,
})

describe('which press may be used', () => {
  const plain = (text: string) => text.replaceAll('\u00a0', ' ')
  const say = (one: TodayPress) => {
    const { mark, use, note } = pressWords(one, TODAY)
    return [mark, plain(use), plain(note)]
  }

  it('names the load with its unit and the last day', () => {
    expect(say(press({}))).toEqual(['within', 'Cleared up to 11.7 short tons', 'until 15 Mar 2027'])
  })

  it('says no when the last day is past, whatever the status says', () => {
    expect(say(press({ clearedUntil: '2026-09-20' }))).toEqual(['stop', 'do not use', 'overdue'])
  })

  it('tells a test under way from one that waits for a signature', () => {
    const test = { proofTestId: id(5), number: 'PT-0042', status: 'under way' as const }
    expect(say(press({ status: 'under test' }, test))).toEqual(['under-way', 'under test', '12 short tons planned'])
    expect(say(press({ status: 'under test' }, { ...test, status: 'to countersign' }))).toEqual([
      'stop',
      'do not use',
      'countersignature missing',
    ])
    expect(say(press({ status: 'under test' }, { ...test, status: 'concluded' }))).toEqual(['stop', 'do not use', 'signature missing'])
  })
})

describe('a test under way', () => {
  const one: UnderWay = {
    test: {
      id: id(6),
      number: 'PT-0044',
      pressId: id(4),
      pressName: 'Press 1',
      protocolName: 'First load by quarters',
      status: 'under way',
      result: null,
      ratedLoad: { text: '30', unit: 'long-ton' },
      reachedPercent: 50,
      stoppedAtPercent: null,
      leadId: id(7),
      leadName: 'Idris Wolcott',
      witnessId: id(8),
      witnessName: 'Pell Navarre',
      openedAt: '2026-09-21T08:00:00.000Z',
      concludedAt: null,
      sealedAt: null,
    },
    whatFor: 'forming press',
    pumpHandId: null,
    climb: {
      datumAt: '2026-09-21T10:02:00.000Z',
      rungs: [
        { percent: 25, holdSeconds: 60, state: 'went-on', at: '2026-09-21T10:13:00.000Z' },
        { percent: 50, holdSeconds: 60, state: 'now', at: '2026-09-21T10:24:00.000Z' },
        { percent: 75, holdSeconds: 120, state: 'to-come', at: null },
        { percent: 100, holdSeconds: 300, state: 'to-come', at: null },
      ],
      levelPercent: 50,
      loaded: true,
    },
  }

  it('shows each stage with its load in words', () => {
    const { stages, short, press: title } = underWayWords(one, id(9), NOW)
    expect(stages.map((stage) => [stage.percent, stage.load, stage.state])).toEqual([
      [0, 'datum', 'datum'],
      [25, '7.5 long tons', 'went-on'],
      [50, '15 long tons', 'now'],
      [75, '22.5 long tons', 'to-come'],
      [100, '30 long tons', 'to-come'],
    ])
    expect(stages[2]?.note).toBe('holding 1 min')
    expect(title).toBe('Press 1, forming press')
    expect(short).toBe('Press 1, at 50\u202f% for 1 min')
  })

  it('names the press once, whether or not its test keeps what it is for', () => {
    const { press: title, short } = underWayWords({ ...one, test: { ...one.test, pressName: 'Press 1, forming press' } }, id(9), NOW)
    expect([title, short]).toEqual(['Press 1, forming press', 'Press 1, at 50\u202f% for 1 min'])
  })

  it('leads the lead to the run, the witness to the view of a witness, and others to the record', () => {
    expect(underWayWords(one, id(7), NOW).action.to).toMatch(/\/run$/)
    expect(underWayWords(one, id(8), NOW).action.to).toMatch(/\/attend$/)
    expect(underWayWords(one, id(9), NOW).action).toMatchObject({ label: 'Watch the test', to: `/proof-tests/${id(6)}` })
  })
})

describe('what falls due', () => {
  const indicator = (code: string, on: string): Due => ({
    kind: 'calibration',
    on,
    instrumentId: id(10),
    code,
    instrumentKind: 'indicator',
  })

  it('gathers instruments of one kind that fall due on one day', () => {
    const due = [
      indicator('I-06', '2026-11-07'),
      indicator('I-04', '2026-11-07'),
      indicator('I-05', '2026-11-07'),
      indicator('I-10', '2026-12-01'),
    ]
    expect(eventsOf(due, id(1)).map((event) => [event.date, event.label])).toEqual([
      ['2026-11-07', 'Indicators I-04 to I-06'],
      ['2026-12-01', 'Indicator I-10, calibration'],
    ])
  })

  it('names a press by its examination', () => {
    const [event] = eventsOf([{ kind: 'clearance', on: '2026-10-12', pressId: id(4), pressName: 'Press 3' }], id(1))
    expect(event).toEqual({ date: '2026-10-12', label: 'Press 3, examination', to: `/presses/${id(4)}` })
  })
})
