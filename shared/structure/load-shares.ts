import type { Joint, Member, PressDescription } from '../press/model'
import { parseDecimal } from '../units'
import { offsetShare } from './beams'

/** What part of the press's force goes through a member or joint, 0 to 1, with how that is known; null when it isn't. */
export type LoadShare = { share: number; how: string } | { share: null; how: string }

/** What the shares are worked out from. */
export type Frame = Pick<PressDescription, 'kind' | 'members'>

function entered(loadShare: string | null | undefined): LoadShare | null {
  if (loadShare === null || loadShare === undefined) return null
  const parsed = parseDecimal(loadShare)
  if (!parsed.ok) return { share: null, how: `Its share of the force can’t be read. ${parsed.message}` }
  return { share: parsed.value / 100, how: `${parsed.canonical} % of the force, as entered` }
}

/** The farthest off the middle that the ram can stand on any beam, as a share of its span. */
export function worstOffset(members: readonly Member[]): number {
  return members.reduce((worst, { strength }) => {
    if (strength?.role !== 'beam') return worst
    try {
      return Math.max(worst, offsetShare(strength))
    } catch (error) {
      // The beam's own check says that its offset can't be; for the rest the ram is then taken as far out as it goes.
      if (error instanceof RangeError) return 0.5
      throw error
    }
  }, 0)
}

/**
 * Share of one of `count` members that stand on two sides, at the ram's worst place. Only the posts of a four-post
 * frame are known to share a side; of others each is taken to carry its whole side, until somebody enters less.
 */
function oneSide({ kind, members }: Frame, what: 'upright' | 'pin'): LoadShare {
  const count = members.filter((member) => member.kind === what).length
  if (count === 0) return { share: null, how: `No ${what} is entered, so its share of the force isn’t known.` }
  if (count === 1) return { share: 1, how: `the only ${what}, so all of the force` }
  const offset = worstOffset(members)
  const onThatSide = what === 'upright' && kind === 'four-post' && count === 4 ? 2 : 1
  const share = (0.5 + offset) / onThatSide
  const ram = offset > 0 ? 'with the ram at its farthest' : 'with the ram in the middle'
  return { share, how: `${(share * 100).toFixed(0)} % of the force, ${ram}` }
}

/**
 * The share of the force that a member carries: all of it for beams, ram seat and tooling; for uprights and pins
 * that of the side nearer to the ram at its worst place. A share entered with the member goes before that.
 * Source: statics of a beam on two supports.
 */
export function shareOfMember(frame: Frame, member: Member): LoadShare {
  const own = entered(member.strength?.loadShare)
  if (own) return own
  switch (member.kind) {
    case 'head-beam':
    case 'bed-beam':
    case 'ram-seat':
    case 'tooling-adaptor':
      return { share: 1, how: 'all of the force' }
    case 'upright':
    case 'pin':
      return oneSide(frame, member.kind)
    case 'stiffener':
    case 'base':
    case 'other':
      return { share: null, how: 'How much of the force it carries was not entered.' }
  }
}

/**
 * The share of the force that a joint carries: that of the pin or upright it holds, else all of it. A share entered
 * with the joint goes before that; joints that hold one member together are each taken to carry its whole share.
 */
export function shareOfJoint(frame: Frame, joint: Joint): LoadShare {
  const own = entered(joint.strength?.loadShare)
  if (own) return own
  const held = joint.between.map((id) => frame.members.find((member) => member.id === id))
  const aside = held.find((member) => member && ['stiffener', 'base', 'other'].includes(member.kind))
  if (aside) return { share: null, how: `It holds ${aside.name}: how much of the force it carries was not entered.` }
  const narrow = held.find((member) => member?.kind === 'pin') ?? held.find((member) => member?.kind === 'upright')
  return narrow ? shareOfMember(frame, narrow) : { share: 1, how: 'all of the force' }
}
