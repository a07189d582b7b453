import type { Joint } from './model'

/**
 * The joints that share a member with the given one. Heat and strain from work on a joint reach what hangs
 * on the same member, so these are examined again (DOMAIN 4).
 */
export function neighboursOf<J extends Pick<Joint, 'id' | 'between'>>(joints: readonly J[], jointId: string): J[] {
  const worked = joints.find((joint) => joint.id === jointId)
  if (!worked) return []
  return joints.filter((joint) => joint.id !== jointId && joint.between.some((member) => worked.between.includes(member)))
}

/** "joint 7", "joints 5 and 6", "joints 5, 6 and 8": runs of three and more are written "5 to 8". */
export function nameJoints(numbers: readonly number[]): string {
  const sorted = [...new Set(numbers)].sort((a, b) => a - b)
  if (sorted.length === 0) return 'no joint'
  const runs: string[] = []
  for (let start = 0; start < sorted.length;) {
    let end = start
    while (sorted[end + 1] === (sorted[end] ?? 0) + 1) end += 1
    if (end - start >= 2) runs.push(`${sorted[start]} to ${sorted[end]}`)
    else for (let index = start; index <= end; index += 1) runs.push(String(sorted[index]))
    start = end + 1
  }
  const last = runs.pop() ?? ''
  const list = runs.length > 0 ? `${runs.join(', ')} and ${last}` : last
  return `${sorted.length === 1 ? 'joint' : 'joints'} ${list}`
}
