import { describe, expect, it } from 'vitest'
import { openedPayload } from '../../tests/factories/test-press'
import { nameJoints, neighboursOf } from './joints'
import { loadPathOf } from './load-path'
import { componentLimits, ratedLoadRefusal } from './ratings'

const { press, joints } = openedPayload()

describe('the load path', () => {
  it('closes when every member hangs on joints that lead round the frame', () => {
    expect(loadPathOf(press.members, joints)).toEqual({ closed: true })
  })

  it('names the member that hangs loose', () => {
    const path = loadPathOf(
      press.members,
      joints.filter((joint) => joint.number !== 2 && joint.number !== 6),
    )
    expect(path).toEqual({ closed: false, gap: expect.stringContaining('Right upright hangs on no joint') })
  })

  it('needs a ram seat and a bed, a member and a joint', () => {
    expect(loadPathOf(press.members, [])).toMatchObject({ closed: false })
    expect(loadPathOf([], joints)).toMatchObject({ closed: false })
    const noBed = press.members.map((member) => (member.kind === 'bed-beam' ? { ...member, kind: 'other' as const } : member))
    expect(loadPathOf(noBed, joints)).toEqual({ closed: false, gap: expect.stringContaining('No bed is entered') })
  })
})

describe('joints', () => {
  it('that share a member with the worked one are its neighbours', () => {
    const worked = joints.find((joint) => joint.number === 7)
    expect(neighboursOf(joints, worked?.id ?? '').map((joint) => joint.number)).toEqual([5, 8])
  })

  it('are named as a person would', () => {
    expect(nameJoints([7])).toBe('joint 7')
    expect(nameJoints([6, 5])).toBe('joints 5 and 6')
    expect(nameJoints([8, 5, 6, 7, 2])).toBe('joints 2 and 5 to 8')
  })
})

describe('ratings', () => {
  it('come as forces, lowest first; a rated pressure becomes the force the ram makes at it', () => {
    const [lowest] = componentLimits(press)
    // 15 short tons = 133.45 kN; 10 000 psi on a 50 mm bore = 135.38 kN (SP 811 factors, by hand).
    expect(lowest?.force).toBeCloseTo(15 * 2000 * 4.4482216152605, 3)
    const byPressure = componentLimits(press).filter((limit) => limit.by === 'pressure')
    expect(byPressure[0]?.force).toBeCloseTo(10_000 * 6894.757293168 * Math.PI * 0.025 ** 2, 0)
  })

  it('keep the rated load at or below the lowest', () => {
    expect(ratedLoadRefusal({ ...press, ratedLoad: { text: '15', unit: 'short-ton' } })).toBeNull()
    expect(ratedLoadRefusal({ ...press, ratedLoad: { text: '15', unit: 'long-ton' } })).toContain('133.4 kN')
    expect(ratedLoadRefusal({ ...press, rams: [] })).toContain('needs a ram')
  })
})
