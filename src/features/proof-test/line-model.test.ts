import { describe, expect, it } from 'vitest'
import { recordLine } from '#shared/chart/record-line'
import { evaluateClimb } from '#shared/proof-test/evaluate-climb'
import { checkText } from '#shared/proof-test/check-record'
import { expectedOf } from '#shared/proof-test/expected'
import type { Opened } from '#shared/proof-test/entries'
import type { MemberStrength } from '#shared/structure/member-data'
import { firstClimb, recordedTest } from '../../../tests/factories/recorded-test'
import { ids, openedPayload } from '../../../tests/factories/test-press'
import { lineSpec, predictionFor } from './line-model'

const mm = (text: string) => ({ text, unit: 'mm' as const })

const bed: MemberStrength = {
  role: 'beam',
  section: { shape: 'flat', height: mm('160'), width: mm('20'), sideBySide: 2, plates: [] },
  material: { grade: 'S355JR' },
  support: 'both ends',
  span: mm('640'),
  ramOffset: null,
  hole: null,
  loadShare: null,
}

function withBed(): Opened {
  const opened = openedPayload()
  const idOf = (kind: string) => opened.press.members.find((member) => member.kind === kind)?.id ?? null
  return {
    ...opened,
    press: {
      ...opened.press,
      members: opened.press.members.map((member) => (member.kind === 'bed-beam' ? { ...member, strength: bed } : member)),
    },
    points: opened.points.map((point) => ({ ...point, memberId: idOf(point.id === ids.middle ? 'bed-beam' : 'pin') })),
  }
}

const size = { width: 340, height: 600, percent: 25, alone: false, before: null, leg: 0 }

describe('the expected band on the line', () => {
  const { state } = recordedTest({ climbs: [firstClimb], opened: withBed(), until: 'decided' })
  const climb = evaluateClimb(state, 0, 0)

  it('is there before anything is read, in the test’s unit at the rated load, and the axis takes it in', () => {
    const band = expectedOf(withBed(), 0)
    const spec = lineSpec(withBed(), null, size)
    expect(spec.band?.low).toBeCloseTo((band?.low ?? 0) * 1000, 9)
    expect(spec.band?.high).toBeCloseTo((band?.high ?? 0) * 1000, 9)
    expect(spec.xMax).toBeGreaterThanOrEqual(spec.band?.high ?? 0)
  })

  it('is not drawn where no section is known', () => {
    expect(lineSpec(openedPayload(), null, size).band).toBeNull()
  })

  it('stands on the record as on the run', () => {
    expect(recordLine(withBed(), climb ? [climb] : [], { width: 640, height: 536 }, { corrections: [] })?.band).toEqual(
      lineSpec(withBed(), climb, size).band,
    )
  })

  it('says what to expect of the first stage, before there is a line', () => {
    const datumOnly = climb && { ...climb, stages: [] }
    const first = predictionFor(withBed(), datumOnly, 25)
    const band = expectedOf(withBed(), 0)
    expect(first?.from).toBeLessThan((band?.low ?? 0) / 4)
    expect(first?.to).toBeGreaterThan((band?.high ?? 0) * 0.24)
    expect(predictionFor(openedPayload(), datumOnly, 25)).toBeNull()
  })
})

describe('what a record says of the check', () => {
  it('names the weakest with its figures and how much was not checked', () => {
    expect(checkText(withBed())).toMatch(/^Estimate, weakest: Bed, .*within 58 %, .* of .*; NOT CHECKED: \d+$/)
  })

  it('says NOT CHECKED where nothing was entered', () => {
    expect(checkText(openedPayload())).toContain('NOT CHECKED')
  })
})
