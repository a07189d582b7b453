import { describe, expect, it } from 'vitest'
import { loadPathOf } from './load-path'
import { FRAME_KINDS, jointSchema, memberSchema } from './model'
import { jointPlaces } from './places'
import { startingFrame } from './starting-joints'

function counter(): () => string {
  let count = 0
  return () => {
    count += 1
    return `01990000-0000-7000-8000-${String(count).padStart(12, '0')}`
  }
}

describe.each(FRAME_KINDS)('the list a %s starts from', (kind) => {
  const { members, joints } = startingFrame(kind, counter())

  it('closes the load path', () => {
    expect(loadPathOf(members, joints)).toEqual({ closed: true })
  })

  it('leaves a gap without the joint that holds the adaptor', () => {
    const without = joints.filter((joint) => joint.name !== 'Adaptor on ram rod')
    expect(loadPathOf(members, without)).toMatchObject({ closed: false })
  })

  it('has the shape of members and joints, with ids and numbers used once', () => {
    for (const member of members) expect(memberSchema.safeParse(member).success).toBe(true)
    for (const joint of joints) expect(jointSchema.safeParse(joint).success).toBe(true)
    const ids = [...members, ...joints].map((one) => one.id)
    expect(new Set(ids).size).toBe(ids.length)
    expect(joints.map((joint) => joint.number)).toEqual(joints.map((_, index) => index + 1))
  })

  it('takes no joint for made', () => {
    expect(joints.every((joint) => joint.makeUp === 'open')).toBe(true)
  })

  it('places every joint where the drawing has a spot', () => {
    const spots = jointPlaces[kind].map((spot) => spot.place)
    expect(joints.filter((joint) => joint.place === null || !spots.includes(joint.place))).toEqual([])
  })
})

it('an H-frame starts with the joints that people forget', () => {
  const names = startingFrame('h-frame', counter()).joints.map((joint) => joint.name)
  expect(names).toEqual(
    expect.arrayContaining([
      'Ram seat to head beam',
      'Adaptor on ram rod',
      'Left bed pin',
      'Right bed stiffener',
      'Left upright to its foot',
    ]),
  )
})
