import { describe, expect, it } from 'vitest'
import { foldPress } from '#shared/press/apply'
import type { PressDraft } from '#shared/press/entries'
import type { MemberStrength } from '#shared/structure/member-data'
import { openedPayload } from '../../../../../tests/factories/test-press'
import { pressFormSchema, toPayload } from './draft'
import { draftOfPress, editsOf, effectOf } from './edits'

const { press: description, joints } = openedPayload()
const ID = '01990000-0000-7000-8000-000000000001'
const units = { length: 'mm', pressure: 'psi' } as const

const registered = {
  id: ID,
  ledgerId: ID,
  kind: 'registered',
  v: 1,
  payload: { description, joints, lastWorkedOn: null },
  authorId: ID,
  deviceId: ID,
  deviceSeq: 1,
  basedOnSeq: 0,
  observedAt: '2026-09-01T08:00:00.000Z',
  bootId: ID,
  monotonicMs: 0,
  attachments: [],
  overrides: [],
  seq: 1,
  receivedAt: '2026-09-01T08:00:00.000Z',
  irregular: [],
  prevHash: '0'.repeat(64),
  hash: '1'.repeat(64),
}
const state = foldPress(ID, [registered])

/** What the form, filled with the press and then changed, would have written down. */
function edit(change: (draft: ReturnType<typeof draftOfPress>) => void): PressDraft[] {
  const draft = draftOfPress(state, description, units)
  change(draft)
  const now = pressFormSchema.parse(toPayload(draft))
  return editsOf(state, now, 'It was measured again.')
}

describe('changing what is written down about a press', () => {
  it('writes nothing when nothing was changed', () => {
    expect(edit(() => undefined)).toEqual([])
  })

  it('writes the description when a measure, a rating or a member is another', () => {
    const edits = edit((draft) => {
      draft.description.rams = draft.description.rams.map((ram) => ({ ...ram, bore: { text: '50.8', unit: 'mm' } }))
    })
    expect(edits).toMatchObject([
      { kind: 'described', payload: { description: { rams: [{ bore: { text: '50.8' } }] }, why: 'It was measured again.' } },
    ])
  })

  it('writes one entry for each joint that was added, changed or taken out, in an order that never leaves a member unknown', () => {
    const edits = edit((draft) => {
      draft.description.members.push({ id: '01990000-0000-7000-8000-0000000000aa', kind: 'stiffener', name: 'Gusset' })
      const [first, second] = draft.joints
      if (!first || !second) throw new Error('The press has joints.')
      draft.joints = draft.joints.slice(1)
      second.detail = 'fillet 10 mm'
      draft.joints.push({
        ...second,
        id: '01990000-0000-7000-8000-0000000000bb',
        number: 9,
        between: [second.between[0], '01990000-0000-7000-8000-0000000000aa'],
      })
    })
    expect(edits.map((one) => one.kind)).toEqual(['joint-retired', 'described', 'joint-described', 'joint-added'])
    expect(edits[0]).toMatchObject({ payload: { jointId: joints[0]?.id } })
    expect(edits[2]).toMatchObject({ payload: { joint: { id: joints[1]?.id, detail: 'fillet 10 mm' } } })
  })

  it('writes the strength of a joint down, and writes out that it was taken away again', () => {
    const stored = {
      kind: 'bearing',
      area: { text: '900', unit: 'mm2' },
      part: { material: { grade: 'A36' }, thickness: { text: '20', unit: 'mm' } },
      loadShare: null,
    } as const
    const [first, ...rest] = state.joints
    if (!first) throw new Error('The press has joints.')
    const known = { ...state, joints: [{ ...first, kind: 'bearing' as const, strength: stored }, ...rest] }
    const draft = draftOfPress(known, description, units)
    const asIs = pressFormSchema.parse(toPayload(draft))
    expect(asIs.joints[0]?.strength).toEqual(stored)
    expect(editsOf(known, asIs, 'Nothing.')).toEqual([])
    draft.joints = draft.joints.map((joint) => ({ ...joint, strength: null }))
    const taken = editsOf(known, pressFormSchema.parse(toPayload(draft)), 'It was wrong.')
    expect(taken).toMatchObject([{ kind: 'strength-described', payload: { members: [], joints: [{ jointId: first.id, strength: null }] } }])
  })

  it('refuses a rated load above the lowest rating, at its field', () => {
    const draft = draftOfPress(state, description, units)
    draft.description.ratedLoad = { text: '16', unit: 'short-ton' }
    const parsed = pressFormSchema.safeParse(toPayload(draft))
    expect(parsed.error?.issues).toMatchObject([
      { path: ['description', 'ratedLoad', 'text'], message: expect.stringContaining('Rate the press no higher') },
    ])
  })

  it('refuses two joints of one number', () => {
    const draft = draftOfPress(state, description, units)
    const [first, second] = draft.joints
    if (!first || !second) throw new Error('The press has joints.')
    second.number = first.number
    expect(pressFormSchema.safeParse(toPayload(draft)).error?.issues).toMatchObject([{ path: ['joints', 1, 'number'] }])
  })
})

describe('what changing it does, said before it is saved', () => {
  const clearance = {
    load: { text: '11.7', unit: 'short-ton' as const },
    loadNewton: 104_088,
    gaugePressure: null,
    gaugeCode: 'G-02',
    instrumentIds: [],
    bedHoles: ['4'],
    ramPositions: ['central'],
    tooling: [],
    until: '2999-01-01',
    clearedOn: '2026-09-15',
    clearedBy: 'Marit Sandoval',
    proofTestId: ID,
    number: 'PT-0043',
    staticLoads: 1,
    notMeasured: [],
  }
  const accepted = {
    result: 'accepted' as const,
    method: 'visual' as const,
    by: ID,
    at: '2026-09-15T08:00:00.000Z',
    remark: '',
    proofTestNumber: null,
  }
  const cleared = {
    ...state,
    joints: state.joints.map((joint) => ({ ...joint, examination: accepted })),
    clearance: { is: 'cleared' as const, clearance },
  }
  const effect = (change: (draft: ReturnType<typeof draftOfPress>) => void) => {
    const draft = draftOfPress(cleared, description, units)
    change(draft)
    const edits = editsOf(cleared, pressFormSchema.parse(toPayload(draft)), 'It was measured again.')
    return { kinds: edits.map((one) => one.kind), ...effectOf(cleared, edits) }
  }
  const firstJoint = (draft: ReturnType<typeof draftOfPress>) => {
    const [joint] = draft.joints
    if (!joint) throw new Error('The press has joints.')
    return joint
  }

  it('another name or purpose leaves clearance and joints as they are', () => {
    const renamed = effect((draft) => {
      draft.description.name = 'Old Hundred'
      draft.description.whatFor = 'bending'
    })
    expect(renamed).toEqual({ kinds: ['described'], clearance: 'stands', toExamine: [] })
  })

  it('sizes and materials of members are written down by themselves and leave the clearance', () => {
    const known = {
      ...cleared,
      description: {
        ...description,
        members: description.members.map((member) => (member.kind === 'bed-beam' ? { ...member, strength: undefined } : member)),
      },
    }
    const bed: MemberStrength = {
      role: 'beam',
      section: {
        shape: 'flat',
        height: { text: '80', unit: 'mm' },
        width: { text: '20', unit: 'mm' },
        sideBySide: 2,
        plates: [],
      },
      material: { grade: 'S355JR' },
      support: 'both ends',
      span: { text: '640', unit: 'mm' },
      ramOffset: null,
      hole: null,
      loadShare: null,
    }
    const now = {
      description: {
        ...description,
        members: description.members.map((member) => (member.kind === 'bed-beam' ? { ...member, strength: bed } : member)),
      },
      joints: pressFormSchema.parse(toPayload(draftOfPress(cleared, description, units))).joints,
    }
    const edits = editsOf(known, now, 'Measured.')
    const bedId = description.members.find((member) => member.kind === 'bed-beam')?.id
    expect(edits).toEqual([
      { kind: 'strength-described', payload: { members: [{ memberId: bedId, strength: bed }], joints: [], why: 'Measured.' } },
    ])
    expect(effectOf(known, edits)).toEqual({ clearance: 'stands', toExamine: [] })
  })

  it('another measure of the frame ends it', () => {
    const widened = effect((draft) => {
      draft.description.dimensions.opening = { text: '900', unit: 'mm' }
    })
    expect(widened).toEqual({ kinds: ['described'], clearance: 'ends', toExamine: [] })
  })

  it('a joint that is described anew or added ends it, and is to be examined', () => {
    const other = effect((draft) => {
      firstJoint(draft).detail = 'fillet 10 mm'
      draft.joints.push({ ...firstJoint(draft), id: '01990000-0000-7000-8000-0000000000bb', number: 9 })
    })
    expect(other).toEqual({ kinds: ['joint-described', 'joint-added'], clearance: 'ends', toExamine: [1, 9] })
  })

  it('where nothing was cleared, nothing ends', () => {
    const edits = editsOf(state, { ...pressFormSchema.parse(toPayload(draftOfPress(state, description, units))), joints: [] }, 'Torn down.')
    expect(effectOf(state, edits).clearance).toBe('none in force')
  })
})
