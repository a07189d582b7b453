import { describe, expect, it } from 'vitest'
import { firstClimb, recordedTest } from '../../tests/factories/recorded-test'
import { ids, openedPayload } from '../../tests/factories/test-press'
import type { MemberStrength } from '../structure/member-data'
import { findingsOf } from '../ledger/rules'
import { emptyProofTest } from './apply'
import { decideProofTest } from './decide'
import type { Opened } from './entries'
import { evaluateClimb } from './evaluate-climb'
import { checkOf, expectedOf } from './expected'

const mm = (text: string) => ({ text, unit: 'mm' as const })

/** A bed of two flats, 160 × 20 mm on edge, 640 mm between its pins; `depth` in mm. */
function bed(depth: string): MemberStrength {
  return {
    role: 'beam',
    section: { shape: 'flat', height: mm(depth), width: mm('20'), sideBySide: 2, plates: [] },
    material: { grade: 'S355JR' },
    support: 'both ends',
    span: mm('640'),
    ramOffset: null,
    hole: null,
    loadShare: null,
  }
}

function withBed(depth: string): Opened {
  const opened = openedPayload()
  const bedId = opened.press.members.find((member) => member.kind === 'bed-beam')?.id
  const pinId = opened.press.members.find((member) => member.kind === 'pin')?.id
  return {
    ...opened,
    press: {
      ...opened.press,
      members: opened.press.members.map((member) => (member.id === bedId ? { ...member, strength: bed(depth) } : member)),
    },
    points: opened.points.map((point) => ({ ...point, memberId: (point.id === ids.middle ? bedId : pinId) ?? null })),
  }
}

describe('the expected deflection of a test', () => {
  it('is PL³/48EI plus shear for the bed middle less its pins, in a band about it', () => {
    const band = expectedOf(withBed('160'), 0)
    // By hand: P = 106.757 kN, L = 0.64 m, E = 210 GPa, I = 2·20·160³/12 mm⁴ = 1.3653e-5 m⁴.
    const bending = (106_757 * 0.64 ** 3) / (48 * 210e9 * 1.36533e-5)
    expect(band?.deflection).toBeGreaterThan(bending)
    expect(band?.deflection).toBeLessThan(bending * 1.35)
    expect(band?.low).toBeLessThan(band?.deflection ?? 0)
    expect(band?.high).toBeGreaterThan(band?.deflection ?? 0)
  })

  it('is null while no section is known', () => {
    expect(expectedOf(openedPayload(), 0)).toBeNull()
  })

  it('predicts the first stage, before there is a line', () => {
    const { state } = recordedTest({ climbs: [firstClimb], opened: withBed('160'), until: 'decided' })
    const first = evaluateClimb(state, 0, 0)?.stages[0]
    expect(first?.prediction).not.toBeNull()
    // The frame of the example bends 0.43 mm at a quarter, far more than two such flats would: wait.
    expect(first?.criteria.find((criterion) => criterion.id === 'prediction')?.verdict).toBe('wait')
    expect(evaluateClimb(recordedTest({ climbs: [firstClimb], until: 'decided' }).state, 0, 0)?.stages[0]?.prediction).toBeNull()
  })
})

describe('the load path check of a test', () => {
  const rules = (opened: Opened) => {
    const mark = { at: '2026-09-14T15:20:00.000Z', bootId: ids.test, monotonicMs: 0 }
    const asked = { kind: 'opened', payload: opened, overrides: [], authorId: ids.lead, mark }
    return findingsOf(decideProofTest(emptyProofTest(ids.test), asked))
  }

  it('counts a tacked joint as it will be, since the walk-down keeps load off until it is finished', () => {
    const opened = withBed('160')
    const tacked = { ...opened, joints: opened.joints.map((joint) => ({ ...joint, makeUp: 'tacked' as const })) }
    expect(checkOf(tacked).results.filter((result) => result.verdict === 'beyond')).toEqual([])
  })

  it('lets a bed open that keeps its stated share of yield, and says what it did not check', () => {
    expect(rules(withBed('160'))).toEqual([])
    expect(checkOf(withBed('160')).notChecked).toBeGreaterThan(0)
  })

  it('R52: holds back one that does not, by name, unless a named engineer’s document stands against it', () => {
    const [finding] = rules(withBed('80'))
    expect(finding?.rule).toBe('R52')
    expect(finding?.says).toMatch(/^By the estimate Bed/)
    const engineer = { name: 'P. Lindqvist', document: 'Calculation 26-118, rev. B', on: '2026-09-01' }
    expect(rules({ ...withBed('80'), engineer })).toEqual([])
  })
})
