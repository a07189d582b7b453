import { describe, expect, it } from 'vitest'
import { killsByProcess, lineOf, sumOf, Tally } from './tally'

function counted(): Tally {
  const tally = new Tally()
  tally.killed('server')
  tally.killed('database')
  tally.killed('database')
  for (const id of ['one', 'two', 'three']) tally.acknowledged(id)
  return tally
}

describe('the tally of a run under faults', () => {
  it('finds every acknowledged entry once, and does not mind entries that nobody was told of', () => {
    const tally = counted()
    tally.saw(['one', 'two', 'three', 'written, but the answer was lost'])
    expect(tally.line()).toBe('kills 3 · acknowledged 3 · found 3 · lost 0 · duplicated 0')
    expect(killsByProcess(tally.totals())).toBe('server 1, database 2, browser 0')
  })

  it('names an acknowledged entry that is nowhere', () => {
    const tally = counted()
    tally.saw(['one', 'three'])
    expect(tally.line()).toBe('kills 3 · acknowledged 3 · found 2 · lost 1 · duplicated 0')
    expect(tally.lost()).toEqual(['two'])
  })

  it('counts each time too many that an entry stands there, over all ledgers, acknowledged or not', () => {
    const tally = counted()
    tally.saw(['one', 'two', 'two', 'three', 'untold'])
    tally.saw(['two', 'untold'])
    expect(tally.line()).toBe('kills 3 · acknowledged 3 · found 3 · lost 0 · duplicated 3')
    expect(tally.duplicated()).toEqual(['two', 'untold'])
  })

  it('counts an entry once however often its client was told', () => {
    const tally = counted()
    tally.acknowledged('one')
    tally.saw(['one', 'two', 'three'])
    expect(tally.totals()).toMatchObject({ acknowledged: 3, lost: 0 })
  })

  it('adds the parts up', () => {
    const whole = counted()
    whole.saw(['one', 'two', 'three'])
    const broken = counted()
    broken.saw(['one', 'one'])
    expect(lineOf(sumOf([whole.totals(), broken.totals()]))).toBe('kills 6 · acknowledged 6 · found 4 · lost 2 · duplicated 1')
  })
})
