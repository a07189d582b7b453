import type { Role } from '#shared/policy'
import type { Letter } from './letter'
import { momentInWords } from './words'

const atMost = (until: Date) => `The link works once, until ${momentInWords(until)}.`

const roleWords: Record<Role, string> = {
  owner: 'owner: everything in the shop, its people and its settings',
  lead: 'lead: plans, runs and signs proof tests',
  witness: 'witness: attends proof tests, reads the gauge independently and countersigns',
  crew: 'crew: works the pump, and reports what happens to a press',
}

interface Invited {
  shopName: string
  inviterName: string
  expiresAt: Date
}

export function memberInvited({ shopName, inviterName, expiresAt, role }: Invited & { role: Role }): Letter {
  return {
    subject: `Invitation to ${shopName}`,
    blocks: [
      {
        say: `${inviterName} invites you to ${shopName} on Quarterload, where the shop keeps the records of its presses and their proof tests.`,
      },
      { say: `You would be ${roleWords[role]}.` },
      { go: 'Look at the invitation', to: '/invitation', secret: true },
      { say: atMost(expiresAt) },
    ],
    why: `It came to you because ${inviterName} entered your address. If you don’t know them, do nothing: without the link no account is made.`,
  }
}

export function witnessInvited({ shopName, inviterName, expiresAt, pressName }: Invited & { pressName: string }): Letter {
  return {
    subject: `Witness a proof test at ${shopName}`,
    blocks: [
      {
        say: `${inviterName} of ${shopName} asks you to witness the next proof test of ${pressName}, a press. A witness attends while the press is loaded step by step, can stop it at any time, reads the gauge independently, and signs or declines the record afterwards.`,
      },
      {
        say: 'You would see this one test and nothing else of the shop. You need a telephone with a connection, and to stand where you can see the gauge, behind the shield.',
      },
      { go: 'Look at the invitation', to: '/invitation', secret: true },
      { say: `${atMost(expiresAt)} The test can be opened once you have accepted.` },
    ],
    why: `It came to you because ${inviterName} entered your address. If you don’t know them, do nothing: without the link no account is made.`,
  }
}

export function passwordResetWanted(name: string, expiresAt: Date): Letter {
  return {
    subject: 'A new password for Quarterload',
    blocks: [
      { say: `Somebody asked for a new password for the account of ${name}. Choose one here:` },
      { go: 'Choose a new password', to: '/new-password', secret: true },
      { say: `${atMost(expiresAt)} Afterwards every device has to sign in again.` },
    ],
    why: 'It came to you because this address was entered at “Forgotten password”. If that was not you, do nothing: the password stays as it is.',
  }
}

export function passwordChanged(name: string, at: Date, how: 'changed' | 'reset'): Letter {
  return {
    subject: 'Your Quarterload password was changed',
    blocks: [
      {
        say: `The password of ${name}’s account was ${how === 'changed' ? 'changed on a device that was signed in' : 'set anew through a link sent to this address'}, on ${momentInWords(at)}. Other devices were signed out.`,
      },
      {
        say: 'If that was you, there is nothing to do. If not, choose another one now and tell the owner of your shop: whoever has your password can sign in your name.',
      },
      { go: 'Choose a new password', to: '/forgotten-password' },
    ],
    why: 'It came to you because a changed password is always told to the account’s address.',
  }
}
