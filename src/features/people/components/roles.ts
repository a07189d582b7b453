import { roles, type Role } from '#shared/policy'
import { capital } from '../../../lib/words'

/** What each role is there for, in the words of the trade. */
export const roleNotes: Record<Role, string> = {
  owner: 'Runs the shop’s account, adds people, and may do all that a lead does',
  lead: 'Enters presses and instruments, plans and runs proof tests, signs',
  witness: 'Attends, reads the gauge independently and countersigns',
  crew: 'Sees which press may be used, to what load, and reports changes',
}

export const roleChoices = roles.map((role) => ({ value: role, label: capital(role) }))
