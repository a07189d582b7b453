import { describe, expect, it } from 'vitest'
import { looseMembers } from '../press/load-path'
import { FRAME_KINDS, type FrameKind } from '../press/model'
import { walkingOrder } from '../press/places'
import { startingFrame } from '../press/starting-joints'
import { elevationDrawing, layOut, type DrawnJoint } from './elevation'
import type { FramePart } from './frame'
import { PAPER_INKS } from './inks'
import { partsOf, partsOfMembers } from './member-parts'

const size = { width: 432, height: 560 }
const measured = { height: 1.6, width: 0.71, throat: 0.28, holes: 7, holePitch: 0.15 }

function frameOf(kind: FrameKind) {
  let id = 0
  return startingFrame(kind, () => `id-${(id += 1)}`)
}

const drawn = (kind: FrameKind): DrawnJoint[] =>
  frameOf(kind).joints.map(({ id, number, name, place }) => ({ id, number, name, place, state: 'finished' }))

describe.each(FRAME_KINDS)('the elevation of a %s', (kind) => {
  it('writes what was measured, and nothing where nobody measured', () => {
    const words = (dimensions: Parameters<typeof layOut>[0]['press']['dimensions']): string[] =>
      layOut({ press: { kind, dimensions }, joints: [], size }).frame.flatMap((item) => (item.kind === 'text' ? [item.text] : []))
    expect(words(measured)).toEqual(['1\u202f600', kind === 'c-frame' ? '280' : '710'])
    expect(words({ height: null, width: null })).toEqual([])
  })

  it('gives every member of its starting list a part of its own, except back posts', () => {
    const { members } = frameOf(kind)
    const parts = partsOfMembers(kind, members)
    expect(new Set(parts.values()).size).toBe(parts.size)
    expect(members.filter(({ id }) => !parts.has(id)).map(({ name }) => name)).toEqual(
      kind === 'four-post' ? ['Back left post', 'Back right post'] : [],
    )
  })

  it('dashes the member whose joints are missing, with the word beside it, and no other', () => {
    const { members, joints } = frameOf(kind)
    const seat = members.find((member) => member.kind === 'tooling-adaptor')
    const left = joints.filter(({ between }) => !between.includes(seat?.id ?? ''))
    const loose = partsOf(
      kind,
      members,
      looseMembers(members, left).map(({ id }) => id),
    )
    expect([...loose]).toEqual<FramePart[]>(['adaptor'])
    const dashed = (parts?: ReadonlySet<FramePart>): number =>
      layOut({ press: { kind, dimensions: measured }, joints: [], loose: parts, size }).frame.filter(
        (item) => item.kind === 'path' && item.dash === '7 5',
      ).length
    expect(dashed()).toBe(0)
    expect(dashed(loose)).toBe(1)
    const { items } = elevationDrawing({ press: { kind, dimensions: measured }, joints: [], loose, size })
    expect(items.some((item) => item.kind === 'text' && item.text === 'loose')).toBe(true)
  })

  it('is one list of items for screen and paper, each in an ink that paper has', () => {
    const spec = { press: { kind, dimensions: measured }, joints: drawn(kind), size }
    const { items } = elevationDrawing(spec)
    const laid = layOut(spec)
    expect(items.slice(0, laid.frame.length)).toEqual(laid.frame)
    const inks = items.flatMap((item) => (item.kind === 'path' ? [item.stroke, item.fill] : [item.ink, item.halo]))
    for (const ink of inks) if (ink !== null) expect(PAPER_INKS[ink]).toMatch(/^#[0-9a-f]{6}$/)
    for (const { number } of spec.joints)
      expect(items.filter((item) => item.kind === 'text' && item.text === String(number))).toHaveLength(1)
  })

  it('is walked round the frame, whatever the numbers are', () => {
    const { joints } = frameOf(kind)
    const shuffled = joints.map((joint, index) => ({ ...joint, number: joints.length - index }))
    const ways = walkingOrder(kind, shuffled).map(({ place }) => place)
    expect(ways).toEqual(walkingOrder(kind, [...shuffled].reverse()).map(({ place }) => place))
    const unplaced = walkingOrder(kind, [{ number: 1, place: null }, ...shuffled])
    expect(unplaced.at(-1)?.place).toBeNull()
  })
})
