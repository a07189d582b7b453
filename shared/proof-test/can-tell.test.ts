import { describe, expect, it } from 'vitest'
import { ids, openedPayload } from '../../tests/factories/test-press'
import type { MemberStrength } from '../structure/member-data'
import { cannotTell, expectedAtStage } from './can-tell'
import type { Opened } from './entries'
import { expectedOf } from './expected'

const mm = (text: string) => ({ text, unit: 'mm' as const })

function withBed(height: string, increment = '0.01'): Opened {
  const opened = openedPayload()
  const idOf = (kind: string) => opened.press.members.find((member) => member.kind === kind)?.id ?? null
  const bed: MemberStrength = {
    role: 'beam',
    section: { shape: 'flat', height: mm(height), width: mm('20'), sideBySide: 2, plates: [] },
    material: { grade: 'S355JR' },
    support: 'both ends',
    span: mm('640'),
    ramOffset: null,
    hole: null,
    loadShare: null,
  }
  return {
    ...opened,
    press: {
      ...opened.press,
      members: opened.press.members.map((member) => (member.kind === 'bed-beam' ? { ...member, strength: bed } : member)),
    },
    points: opened.points.map((point) => ({ ...point, memberId: idOf(point.id === ids.middle ? 'bed-beam' : 'pin') })),
    instruments: opened.instruments.map((instrument) =>
      instrument.details.kind === 'indicator'
        ? { ...instrument, details: { ...instrument.details, increment: mm(increment), errorLimit: null } }
        : instrument,
    ),
  }
}

describe('what a plan says its instruments cannot tell', () => {
  it('gives the expected band of each stage in proportion', () => {
    const opened = withBed('160')
    const full = expectedOf(opened, 0)
    expect(expectedAtStage(opened, 25)?.low).toBeCloseTo((full?.low ?? 0) / 4, 12)
    expect(expectedAtStage(opened, 100)?.high).toBeCloseTo(full?.high ?? 0, 12)
    expect(expectedAtStage(openedPayload(), 100)).toBeNull()
  })

  it('is silent where nothing is expected, and where the indicators are fine enough', () => {
    expect(cannotTell(openedPayload())).toEqual([])
    expect(cannotTell(withBed('160', '0.0005'))).toEqual([])
  })

  it('says so of set and softening where the least expected movement is a few increments', () => {
    const opened = withBed('160', '0.05')
    const limit = opened.protocol.content.limits
    const least = (expectedOf(opened, 0)?.low ?? 0) * 1000
    // Two increments of 0.05 mm against a share of a few tenths of a millimetre.
    expect(0.1).toBeGreaterThan((limit.setPercent / 100) * least)
    const sentences = cannotTell(opened)
    expect(sentences[0]).toContain(`permanent set of ${limit.setPercent} %`)
    expect(sentences.filter((sentence) => sentence.includes(`${limit.softeningPercent} % softening at`)).length).toBeGreaterThan(0)
    // The first step has no stiffer one before it, so there is no softening at the first stage.
    expect(sentences.some((sentence) => sentence.includes('softening at 25 %'))).toBe(false)
  })
})
