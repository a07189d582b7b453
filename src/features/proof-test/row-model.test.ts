import { describe, expect, it } from 'vitest'
import { commitField, EMPTY_ROW, pressBackspace, pressKey, readingsOf, typeInto, type RowSource } from './row-model'

const gauge: RowSource = { id: 'g', label: 'Gauge', unit: 'psi', unitText: 'psi', kind: 'force' }
const middle: RowSource = { id: 'm', label: 'Middle', unit: 'mm', unitText: 'mm', kind: 'point' }
const sources = [gauge, middle]
const never = () => null
const always = () => 'That is far off.'

describe('a row that is being typed', () => {
  it('starts empty: nothing is filled in beforehand', () => {
    expect(readingsOf(sources, EMPTY_ROW)).toEqual([])
  })

  it('keeps the text as typed, by keys or by keyboard', () => {
    const focused = { ...EMPTY_ROW, focused: 'm' }
    const typed = ['1', ',', '6', '4'].reduce(pressKey, focused)
    expect(typed.texts).toEqual({ m: '1,64' })
    expect(pressBackspace(typed).texts).toEqual({ m: '1,6' })
    expect(pressKey(typed, '-').texts).toEqual({ m: '-1,64' })
  })

  it('refuses what cannot be read, and a gauge below zero', () => {
    expect(commitField(typeInto(EMPTY_ROW, 'm', '.5'), sources, 'm', never)).toMatchObject({
      ok: false,
      draft: { texts: { m: '.5' }, errors: { m: 'Put a digit before the decimal sign, as in 0.5.' } },
    })
    expect(commitField(typeInto(EMPTY_ROW, 'g', '-50'), sources, 'g', never).ok).toBe(false)
    expect(commitField(typeInto(EMPTY_ROW, 'm', '-0.02'), sources, 'm', never).ok).toBe(true)
  })

  it('asks for a surprising reading again without showing it, and takes the same number twice', () => {
    const once = commitField(typeInto(EMPTY_ROW, 'm', '1.9'), sources, 'm', always)
    expect(once).toMatchObject({ ok: false, draft: { texts: { m: '' }, typedAgain: [] } })
    expect(once.draft.errors['m']).toBe('That is far off. Look again and type it once more.')
    const twice = commitField(typeInto(once.draft, 'm', '1,90'), sources, 'm', always)
    expect(twice).toMatchObject({ ok: true, draft: { texts: { m: '1,90' }, typedAgain: ['m'], errors: {} } })
  })

  it('asks once more when the two differ', () => {
    const once = commitField(typeInto(EMPTY_ROW, 'm', '1.9'), sources, 'm', always)
    const other = commitField(typeInto(once.draft, 'm', '1.8'), sources, 'm', always)
    expect(other.ok).toBe(false)
    expect(other.draft.errors['m']).toMatch(/^The two you typed differ\./)
    expect(commitField(typeInto(other.draft, 'm', '1.8'), sources, 'm', always).ok).toBe(true)
  })

  it('has to be typed twice again after it was changed', () => {
    const once = commitField(typeInto(EMPTY_ROW, 'm', '1.9'), sources, 'm', always)
    const twice = commitField(typeInto(once.draft, 'm', '1.9'), sources, 'm', always)
    expect(typeInto(twice.draft, 'm', '1.95').typedAgain).toEqual([])
  })
})
