import type { FrameKind, Member } from '../press/model'
import type { FramePart } from './frame'

const SIDED: Partial<Record<Member['kind'], readonly [FramePart, FramePart]>> = {
  upright: ['upright-left', 'upright-right'],
  stiffener: ['stiffener-left', 'stiffener-right'],
  base: ['foot-left', 'foot-right'],
}
const SINGLE: Partial<Record<Member['kind'], FramePart>> = {
  'head-beam': 'head',
  'bed-beam': 'bed',
  'ram-seat': 'seat',
  'tooling-adaptor': 'adaptor',
}
/** The column of a C-frame and its one foot are drawn where portals have their left ones. */
const ONE_OF: Partial<Record<Member['kind'], FramePart>> = { upright: 'upright-left', base: 'foot-left' }

function sideOf(kind: FrameKind, member: Member, before: number): 0 | 1 | null {
  const name = member.name.toLowerCase()
  if (/\bback\b/.test(name)) return null
  // A C-frame is seen from the side: what its starting list calls the throat's stiffener is the one at the column.
  if (kind === 'c-frame' && member.kind === 'stiffener') return /throat|column/.test(name) ? 1 : 0
  if (/\bleft\b/.test(name)) return 0
  if (/\bright\b/.test(name)) return 1
  return before === 0 ? 0 : before === 1 ? 1 : null
}

/** Which part of the elevation stands for which member: by its kind, its side by its name or else its order. */
export function partsOfMembers(kind: FrameKind, members: readonly Member[]): Map<string, FramePart> {
  const parts = new Map<string, FramePart>()
  const taken = new Set<FramePart>()
  const seen = new Map<Member['kind'], number>()
  for (const member of members) {
    const before = seen.get(member.kind) ?? 0
    seen.set(member.kind, before + 1)
    const one = kind === 'c-frame' ? ONE_OF[member.kind] : undefined
    const sides = one === undefined ? SIDED[member.kind] : undefined
    const side = sides === undefined ? null : sideOf(kind, member, before)
    const ram = member.kind === 'other' && /\bram\b/i.test(member.name) ? 'ram' : undefined
    const part = one ?? (sides === undefined || side === null ? undefined : sides[side]) ?? SINGLE[member.kind] ?? ram
    if (part === undefined || taken.has(part)) continue
    taken.add(part)
    parts.set(member.id, part)
  }
  return parts
}

/** The parts of the elevation that stand for these members; members that aren't drawn have none. */
export function partsOf(kind: FrameKind, members: readonly Member[], ids: readonly string[]): Set<FramePart> {
  const parts = partsOfMembers(kind, members)
  return new Set(ids.flatMap((id) => parts.get(id) ?? []))
}
