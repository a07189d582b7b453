import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { countDevice, type DeviceCount } from './device-count'

const countAll = (numbers: readonly number[]): DeviceCount | undefined =>
  numbers.reduce<DeviceCount | undefined>((before, deviceSeq) => countDevice(before, deviceSeq), undefined)

describe('the count of a device’s entries', () => {
  it('has nothing missing while they come in order from 1', () => {
    expect(countAll([1, 2, 3])).toEqual({ highest: 3, missing: [] })
  })

  it('names what was leapt over, from 1 on, until it arrives', () => {
    expect(countAll([3])).toEqual({ highest: 3, missing: [[1, 2]] })
    expect(countAll([1, 6])).toEqual({ highest: 6, missing: [[2, 5]] })
    expect(countAll([1, 6, 3])).toEqual({
      highest: 6,
      missing: [
        [2, 2],
        [4, 5],
      ],
    })
    expect(countAll([1, 6, 3, 2, 5, 4])).toEqual({ highest: 6, missing: [] })
  })

  it('names exactly what has not arrived, in whatever order and however often the rest came', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 1, max: 40 }), { minLength: 1, maxLength: 80 }), (numbers) => {
        const { highest, missing } = countAll(numbers) ?? { highest: 0, missing: [] }
        const named = missing.flatMap(([first, last]) => Array.from({ length: last - first + 1 }, (_, index) => first + index))
        const lacking = Array.from({ length: highest }, (_, index) => index + 1).filter((number) => !numbers.includes(number))
        expect(highest).toBe(Math.max(...numbers))
        expect(named).toEqual(lacking)
      }),
      { seed: 20_261_201 },
    )
  })
})
