import { describe, expect, it } from 'vitest'
import { daysBetween, longDate, shortDate, weekday } from './dates'
import { ownPath } from './own-path'
import { chooseShop } from './shop-memory'

const shops = [{ id: 'a' }, { id: 'b' }, { id: 'c' }]

describe('the shop a tab shows', () => {
  it('is the one its address names, before the one it remembers', () => expect(chooseShop(shops, 'c', 'b')?.id).toBe('c'))
  it('is the remembered one when the address names none', () => expect(chooseShop(shops, null, 'b')?.id).toBe('b'))
  it('is the first when neither is a shop of this person', () => expect(chooseShop(shops, 'x', 'y')?.id).toBe('a'))
  it('is none when the person belongs to none', () => expect(chooseShop([], 'a', 'a')).toBeUndefined())
})

describe('the way back after signing in', () => {
  it('leads to a page of our own', () => expect(ownPath('/presses?shop=a')).toBe('/presses?shop=a'))
  it.each(['//elsewhere.example', '/\\elsewhere.example', 'https://elsewhere.example', '', null])('never leads elsewhere: %s', (asked) => {
    expect(ownPath(asked)).toBeUndefined()
  })
})

describe('dates as they are read', () => {
  it('a calendar date is the same day in every time zone', () => expect(longDate('2026-09-21')).toBe('21 September 2026'))
  it('writes every month with three letters where columns are narrow', () => expect(shortDate('2026-09-21')).toBe('21 Sep 2026'))
  it('names the day of the week', () => expect(weekday('2026-09-21')).toBe('Mon 21 September'))
  it('counts days over a change of the clocks', () => expect(daysBetween('2026-03-28', '2026-03-30')).toBe(2))
})
