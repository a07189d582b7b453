import type { Joint, Member } from './model'

export type LoadPath = { closed: true } | { closed: false; gap: string }

/** Members in groups that joints hold together, each in the order of the list. */
function groupsOf(members: readonly Member[], joints: readonly Pick<Joint, 'between'>[]): Member[][] {
  const left = new Set(members.map(({ id }) => id))
  const groups: Member[][] = []
  for (const { id } of members) {
    if (!left.delete(id)) continue
    const reached = new Set([id])
    for (let grew = true; grew;) {
      grew = false
      for (const {
        between: [a, b],
      } of joints) {
        if (reached.has(a) === reached.has(b)) continue
        reached.add(a).add(b)
        grew = true
      }
    }
    groups.push(members.filter((member) => reached.has(member.id)))
    for (const one of reached) left.delete(one)
  }
  return groups
}

/** The group that most members are in, and the members outside it: they hang loose. */
function heldTogether(members: readonly Member[], joints: readonly Pick<Joint, 'between'>[]) {
  const [main = []] = groupsOf(members, joints).sort((a, b) => b.length - a.length)
  return { main, loose: members.filter((member) => !main.includes(member)) }
}

/** The members that hang on no joint leading to the rest of the frame; none while no joint is entered at all. */
export function looseMembers(members: readonly Member[], joints: readonly Pick<Joint, 'between'>[]): Member[] {
  return joints.length === 0 ? [] : heldTogether(members, joints).loose
}

/**
 * Whether the members hang together: every member is held by a joint, and joints lead from each to every
 * other, so that the force from the ram's face comes round the frame to the bed's face. A graph only; it
 * says nothing of strength.
 */
export function loadPathOf(members: readonly Member[], joints: readonly Joint[]): LoadPath {
  if (joints.length === 0) return { closed: false, gap: 'No joint is entered. Enter every place where two members are held together.' }
  const { main, loose } = heldTogether(members, joints)
  const first = main[0]
  if (!first) return { closed: false, gap: 'No member is entered. Enter what the force passes through, from the ram round to the bed.' }
  const hangs = loose[0]
  if (hangs) return { closed: false, gap: `${hangs.name} hangs on no joint that leads to ${first.name}. Enter the joint that is missing.` }
  for (const [kind, what] of [
    ['ram-seat', 'ram seat'],
    ['bed-beam', 'bed'],
  ] as const) {
    if (!members.some((member) => member.kind === kind))
      return { closed: false, gap: `No ${what} is entered, so the force has nowhere to close. Enter it with its joints.` }
  }
  return { closed: true }
}
