import { describe, expect, it } from 'vitest'
import { lowestLimit } from '#shared/press/ratings'
import type { TypedForce } from '#shared/units'
import { ids, openedPayload } from '../../../tests/factories/test-press'
import type { PlanRegisters } from './api/get-plan-registers'
import { tooWeak, withTooling } from './tooling'

const opened = openedPayload()
const piece = (id: string, code: string, ratedLoad: TypedForce): PlanRegisters['tooling'][number] => ({
  id,
  retired: false,
  details: { code, name: 'Flat nose', kind: 'nose', ratedLoad, ratingFrom: 'Stamped', fit: 'M42', height: null, remark: '' },
})
const [weak, strong, same] = [ids.test, ids.gauge, ids.lead]
const registers: PlanRegisters = {
  presses: [],
  protocols: [],
  instruments: [],
  people: [],
  tooling: [
    piece(weak, 'T-09', { text: '8', unit: 'short-ton' }),
    piece(strong, 'T-01', { text: '20', unit: 'short-ton' }),
    // 12 short tons, the example's rated load, as it is marked on a piece in kN.
    piece(same, 'T-02', { text: '106.75', unit: 'kN' }),
  ],
}
const plain = (text: string | undefined) => text?.replaceAll(/[\u00a0\u202f]/g, ' ')

describe('tooling in a plan', () => {
  it('joins the train as the server adds it, so that the lowest rating counts it', () => {
    const press = withTooling(opened.press, [weak], registers)
    expect(press.train.at(-1)).toMatchObject({ id: weak, kind: 'tooling', name: 'T-09 Flat nose' })
    expect(lowestLimit(press)?.name).toBe('T-09 Flat nose')
    expect(withTooling(opened.press, [], registers)).toBe(opened.press)
  })

  it('says of a piece that carries less than the highest load what it carries, and of no other', () => {
    const said = tooWeak([weak, strong, same], registers, opened)
    expect([...said.keys()]).toEqual([weak])
    expect(plain(said.get(weak))).toBe(
      'T-09 carries no more than 8 short tons, and this test goes to 12.00 short tons. Choose a stronger piece.',
    )
  })

  it('counts the percentage above the rated load', () => {
    const stages = [...opened.protocol.content.stages, { percent: 110, holdSeconds: 600 }]
    const above = { ...opened, protocol: { ...opened.protocol, content: { ...opened.protocol.content, stages } } }
    expect([...tooWeak([strong, same], registers, above).keys()]).toEqual([same])
  })

  it('says nothing while there is nothing to compare with', () => expect(tooWeak([weak], registers, null).size).toBe(0))
})
