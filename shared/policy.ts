/**
 * Who may do what. This file is the only place that knows roles: the server enforces it on state that it read in the same
 * transaction, the client asks it for what to show.
 *
 * A role in a shop is a ceiling. Lead, pump hand and witness of a test are assignments, passed in with the test.
 */

export const roles = ['owner', 'lead', 'witness', 'crew'] as const
export type Role = (typeof roles)[number]

export interface Actor {
  userId: string
  shopId: string
  /** null: no member of this shop, or no longer one. */
  role: Role | null
  /** The tests that this person was invited to witness from outside: there, and nowhere else in the shop, they are somebody. */
  guestOf?: readonly string[]
}

/** The people named when the test was opened. */
export interface Assignment {
  leadId: string
  /** null when the pump hand has no account. */
  pumpHandId: string | null
  witnessId: string
}

export interface Subject {
  shopId: string
  /** For what is done on or to a test. */
  assignment?: Assignment
  /** The test that it is done on or to, or that is read. */
  testId?: string
}

export const actions = [
  'shop:read',
  'shop:settings',
  'people:list',
  'people:see-email',
  'people:add',
  'people:change-role',
  'people:end',
  'people:invite',
  'mail:read',
  'press:read',
  'press:register',
  'press:describe',
  'press:record',
  'press:change-report',
  'press:withdraw',
  'press:tag-off',
  'press:repair-note',
  'tooling:read',
  'tooling:write',
  'calendar:read',
  'instrument:read',
  'instrument:write',
  'calibration:write',
  'protocol:read',
  'protocol:write',
  'proof-test:read',
  'proof-test:open',
  'proof-test:invite-witness',
  'proof-test:be-lead',
  'proof-test:be-pump-hand',
  'proof-test:be-witness',
  'proof-test:append-fact',
  'proof-test:stop',
  'proof-test:conclude',
  'proof-test:sign-as-lead',
  'proof-test:countersign',
  'proof-test:decline',
  'record:export',
] as const
export type Action = (typeof actions)[number]

const everyone: readonly Role[] = roles
const ownerOnly: readonly Role[] = ['owner']
const leads: readonly Role[] = ['owner', 'lead']
const witnesses: readonly Role[] = ['owner', 'lead', 'witness']

type Part = 'lead' | 'pump hand' | 'witness'

interface Permission {
  /** Roles that may; `'former too'` when a person named in the test may go on even if the role has ended. */
  ceiling: readonly Role[] | 'former too'
  /** Parts in the test, one of which the person must have. */
  parts?: readonly Part[]
  /** Parts in the test that rule the person out. */
  never?: readonly Part[]
  /** Whether an outside witness may too, on the test they were invited to. */
  guests?: true
}

const anyPart: readonly Part[] = ['lead', 'pump hand', 'witness']

const permissions: Record<Action, Permission> = {
  'shop:read': { ceiling: everyone },
  'shop:settings': { ceiling: ownerOnly },
  'people:list': { ceiling: everyone },
  'people:see-email': { ceiling: ownerOnly },
  'people:add': { ceiling: ownerOnly },
  'people:change-role': { ceiling: ownerOnly },
  'people:end': { ceiling: ownerOnly },
  'people:invite': { ceiling: ownerOnly },
  // The shop's letters, to whomever they went.
  'mail:read': { ceiling: ownerOnly },
  'press:read': { ceiling: everyone },
  'press:register': { ceiling: leads },
  'press:describe': { ceiling: leads },
  'press:record': { ceiling: leads },
  // Whoever bent it, dropped it or overloaded it must be able to say so; the report suspends the clearance.
  'press:change-report': { ceiling: everyone },
  'press:withdraw': { ceiling: leads },
  // Whoever stands at the press takes the tag off, or did the welding, and says so.
  'press:tag-off': { ceiling: everyone },
  'press:repair-note': { ceiling: everyone },
  'tooling:read': { ceiling: everyone },
  'tooling:write': { ceiling: leads },
  'calendar:read': { ceiling: everyone },
  'instrument:read': { ceiling: everyone },
  'instrument:write': { ceiling: leads },
  'calibration:write': { ceiling: leads },
  'protocol:read': { ceiling: everyone },
  'protocol:write': { ceiling: leads },
  'proof-test:read': { ceiling: everyone, guests: true },
  'proof-test:open': { ceiling: leads },
  'proof-test:invite-witness': { ceiling: leads },
  'proof-test:be-lead': { ceiling: leads },
  'proof-test:be-pump-hand': { ceiling: everyone },
  'proof-test:be-witness': { ceiling: witnesses, guests: true },
  // What has happened has happened: facts of people named in the test land even if their role has ended meanwhile.
  'proof-test:append-fact': { ceiling: 'former too', parts: anyPart },
  'proof-test:stop': { ceiling: 'former too', parts: anyPart },
  'proof-test:conclude': { ceiling: leads, parts: ['lead'] },
  'proof-test:sign-as-lead': { ceiling: leads, parts: ['lead'] },
  'proof-test:countersign': { ceiling: witnesses, parts: ['witness'], never: ['lead', 'pump hand'], guests: true },
  'proof-test:decline': { ceiling: witnesses, parts: ['witness'], never: ['lead', 'pump hand'], guests: true },
  'record:export': { ceiling: witnesses, guests: true },
}

function partsOf(userId: string, assignment: Assignment | undefined): Part[] {
  if (assignment === undefined) return []
  const parts: Part[] = []
  if (assignment.leadId === userId) parts.push('lead')
  if (assignment.pumpHandId === userId) parts.push('pump hand')
  if (assignment.witnessId === userId) parts.push('witness')
  return parts
}

/** Whether this person was invited from outside to witness this test. */
export function isGuestOf({ guestOf }: Actor, testId: string | undefined): boolean {
  return testId !== undefined && guestOf?.includes(testId) === true
}

/**
 * Whether the actor may do this to the subject. Never across shops. Says nothing about the state of a press or a test:
 * that is what `decide` is for.
 */
export function can(actor: Actor, action: Action, subject: Subject): boolean {
  if (actor.shopId !== subject.shopId) return false
  const { ceiling, parts, never, guests } = permissions[action]
  const asGuest = guests === true && isGuestOf(actor, subject.testId)
  if (ceiling !== 'former too' && !asGuest && (actor.role === null || !ceiling.includes(actor.role))) return false
  const held = partsOf(actor.userId, subject.assignment)
  if (parts !== undefined && !parts.some((part) => held.includes(part))) return false
  return never === undefined || !never.some((part) => held.includes(part))
}
