import type { InvitationLook } from '#shared/api/invitations'
import { longDate } from '../../../lib/dates'

/** What accepting makes of whoever accepts. */
export function invitedTo({ kind, role, shopName, pressName }: InvitationLook): string {
  return kind === 'member'
    ? `You would belong to ${shopName} as ${role ?? 'crew'}.`
    : `You would witness the next proof test of ${pressName ?? 'a press'}, and see that test and nothing else of the shop. You attend while it is loaded step by step, can stop it at any time, read the gauge yourself, and countersign or decline the record.`
}

export const invitationHolds = ({ expiresAt }: InvitationLook): string => `The link works once, until ${longDate(expiresAt)}.`
