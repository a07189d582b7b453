import { describe, expect, it } from 'vitest'
import { openedPayload } from '../../tests/factories/test-press'
import { toolingText } from './record-facts'

const opened = openedPayload()
const others = opened.press.train.filter(({ kind }) => kind !== 'tooling')
const nose = {
  id: opened.press.train[0]?.id ?? '',
  kind: 'tooling' as const,
  name: 'T-01 Flat nose',
  ratedForce: { text: '20', unit: 'short-ton' as const },
  ratedPressure: null,
}
const told = (train: typeof opened.press.train) =>
  toolingText({ ...opened, press: { ...opened.press, train } })?.replaceAll(/[\u00a0\u202f]/g, ' ')

describe('the tooling on a record', () => {
  it('stands with what each piece carries', () => {
    expect(told([...others, nose, { ...nose, name: 'T-02 Plate', ratedForce: { text: '30', unit: 'long-ton' } }])).toBe(
      'T-01 Flat nose, 20 short tons; T-02 Plate, 30 long tons',
    )
  })

  it('is not mentioned where there was none', () => expect(told(others)).toBeUndefined())
})
