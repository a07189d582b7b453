import { describe, expect, it } from 'vitest'
import { actions, can, roles } from '#shared/policy'
import type { Action, Actor, Assignment, Role } from '#shared/policy'

/**
 * Who may do what, written out: one letter for each role that may, `-` for each that may not, in the order
 * Owner, Lead, Witness, Crew, Former member. One column for each part a person can have in a test; `none` is
 * everybody else, and the only column for what has nothing to do with a test.
 */
type Row = string | { none: string; lead: string; pumpHand: string; witness: string; leadAndPumpHand: string; witnessAndPumpHand: string }

const sameForLead = (lead: string): Row => ({
  none: '-----',
  lead,
  pumpHand: '-----',
  witness: '-----',
  leadAndPumpHand: lead,
  witnessAndPumpHand: '-----',
})
const anyPart: Row = {
  none: '-----',
  lead: 'OLWCF',
  pumpHand: 'OLWCF',
  witness: 'OLWCF',
  leadAndPumpHand: 'OLWCF',
  witnessAndPumpHand: 'OLWCF',
}
const witnessAlone: Row = {
  none: '-----',
  lead: '-----',
  pumpHand: '-----',
  witness: 'OLW--',
  leadAndPumpHand: '-----',
  witnessAndPumpHand: '-----',
}

const table: Record<Action, Row> = {
  'shop:read': 'OLWC-',
  'shop:settings': 'O----',
  'people:list': 'OLWC-',
  'people:see-email': 'O----',
  'people:add': 'O----',
  'people:change-role': 'O----',
  'people:end': 'O----',
  'people:invite': 'O----',
  'mail:read': 'O----',
  'press:read': 'OLWC-',
  'press:register': 'OL---',
  'press:describe': 'OL---',
  'press:record': 'OL---',
  'press:change-report': 'OLWC-',
  'press:withdraw': 'OL---',
  'press:tag-off': 'OLWC-',
  'press:repair-note': 'OLWC-',
  'tooling:read': 'OLWC-',
  'tooling:write': 'OL---',
  'calendar:read': 'OLWC-',
  'instrument:read': 'OLWC-',
  'instrument:write': 'OL---',
  'calibration:write': 'OL---',
  'protocol:read': 'OLWC-',
  'protocol:write': 'OL---',
  'proof-test:read': 'OLWC-',
  'proof-test:open': 'OL---',
  'proof-test:invite-witness': 'OL---',
  'proof-test:be-lead': 'OL---',
  'proof-test:be-pump-hand': 'OLWC-',
  'proof-test:be-witness': 'OLW--',
  'proof-test:append-fact': anyPart,
  'proof-test:stop': anyPart,
  'proof-test:conclude': sameForLead('OL---'),
  'proof-test:sign-as-lead': sameForLead('OL---'),
  'proof-test:countersign': witnessAlone,
  'proof-test:decline': witnessAlone,
  'record:export': 'OLW--',
}

const shopId = 'shop'
const me = 'me'
const other = 'other'
const parts = {
  none: { leadId: other, pumpHandId: other, witnessId: other },
  lead: { leadId: me, pumpHandId: other, witnessId: other },
  pumpHand: { leadId: other, pumpHandId: me, witnessId: other },
  witness: { leadId: other, pumpHandId: other, witnessId: me },
  leadAndPumpHand: { leadId: me, pumpHandId: me, witnessId: other },
  witnessAndPumpHand: { leadId: other, pumpHandId: me, witnessId: me },
} satisfies Record<string, Assignment>

const columns: { role: Role | null; letter: string }[] = [
  ...roles.map((role) => ({ role, letter: role.charAt(0).toUpperCase() })),
  { role: null, letter: 'F' },
]

function row(action: Action, assignment: Assignment | undefined): string {
  return columns
    .map(({ role, letter }) => {
      const actor: Actor = { userId: me, shopId, role }
      return can(actor, action, assignment === undefined ? { shopId } : { shopId, assignment }) ? letter : '-'
    })
    .join('')
}

describe('every role and every action', () => {
  it.each(actions)('%s', (action) => {
    const expected = table[action]
    for (const [part, assignment] of Object.entries(parts)) {
      const wanted = typeof expected === 'string' ? expected : expected[part as keyof typeof parts]
      expect(row(action, assignment), `as ${part}`).toBe(wanted)
    }
    expect(row(action, undefined), 'with no test named').toBe(typeof expected === 'string' ? expected : expected.none)
  })

  it('allows nothing across shops, whatever the role and the part', () => {
    for (const action of actions) {
      for (const { role } of columns) {
        for (const assignment of Object.values(parts)) {
          expect(can({ userId: me, shopId: 'elsewhere', role }, action, { shopId, assignment })).toBe(false)
        }
      }
    }
  })

  it('lets an outside witness read, attend and sign the one test of theirs, and nothing else of the shop', () => {
    const always: Action[] = ['proof-test:read', 'proof-test:be-witness', 'record:export']
    const asWitness: Action[] = [...always, 'proof-test:append-fact', 'proof-test:stop', 'proof-test:countersign', 'proof-test:decline']
    const guest: Actor = { userId: me, shopId, role: null, guestOf: ['my test'] }
    const may = (testId: string | undefined, assignment?: Assignment) =>
      actions.filter((action) => can(guest, action, { shopId, testId, assignment }))
    const sorted = (some: readonly Action[]) => actions.filter((action) => some.includes(action))
    expect(may('my test', parts.witness)).toEqual(sorted(asWitness))
    expect(may('my test', parts.none)).toEqual(sorted(always))
    expect(may('my test')).toEqual(sorted(always))
    // Named there, as anybody whose role has ended: what has happened still lands, and nothing more.
    expect(may('another test', parts.witness)).toEqual(sorted(['proof-test:append-fact', 'proof-test:stop']))
    expect(may('another test', parts.none)).toEqual([])
    expect(may(undefined)).toEqual([])
    // The pump hand or lead who was also invited from outside is no independent witness.
    for (const assignment of [parts.witnessAndPumpHand, { leadId: me, pumpHandId: null, witnessId: me }]) {
      expect(can(guest, 'proof-test:countersign', { shopId, testId: 'my test', assignment })).toBe(false)
    }
    expect(actions.some((action) => can({ ...guest, shopId: 'elsewhere' }, action, { shopId, testId: 'my test' }))).toBe(false)
  })

  it('never lets the lead or the pump hand countersign, also not one who is named as witness too', () => {
    for (const { role } of columns) {
      for (const assignment of [
        { leadId: me, pumpHandId: other, witnessId: me },
        { leadId: other, pumpHandId: me, witnessId: me },
      ]) {
        expect(can({ userId: me, shopId, role }, 'proof-test:countersign', { shopId, assignment })).toBe(false)
      }
    }
  })
})
