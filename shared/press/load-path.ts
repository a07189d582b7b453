import type { Joint, Member } from './model'

export type LoadPath = { closed: true } | { closed: false; gap: string }

/**
 * Whether the members hang together: every member is held by a joint, and joints lead from each to every
 * other, so that the force from the ram's face comes round the frame to the bed's face. A graph only; it
 * says nothing of strength.
 */
export function loadPathOf(members: readonly Member[], joints: readonly Joint[]): LoadPath {
  if (joints.length === 0) return { closed: false, gap: 'No joint is entered. Enter every place where two members are held together.' }
  const first = members[0]
  if (!first) return { closed: false, gap: 'No member is entered. Enter what the force passes through, from the ram round to the bed.' }
  const reached = new Set([first.id])
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
  const loose = members.find((member) => !reached.has(member.id))
  if (loose) return { closed: false, gap: `${loose.name} hangs on no joint that leads to ${first.name}. Enter the joint that is missing.` }
  for (const [kind, what] of [
    ['ram-seat', 'ram seat'],
    ['bed-beam', 'bed'],
  ] as const) {
    if (!members.some((member) => member.kind === kind))
      return { closed: false, gap: `No ${what} is entered, so the force has nowhere to close. Enter it with its joints.` }
  }
  return { closed: true }
}
