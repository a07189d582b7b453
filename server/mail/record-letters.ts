import type { Seal } from '#shared/ledger/seal'
import type { Opened } from '#shared/proof-test/entries'
import type { ProofTestState } from '#shared/proof-test/state'
import type { Block, Letter } from './letter'
import { momentInWords } from './words'

interface Recorded {
  opened: Opened
  state: ProofTestState
  seal: Seal
}

const record = (testId: string): Block => ({ go: 'Read the record', to: `/proof-tests/${testId}` })

function facts({ opened, state, seal }: Recorded): Block {
  return {
    facts: [
      ['Record', opened.number],
      ['Press', opened.press.name],
      ['Result, as the lead concluded', state.conclusion?.conclusion ?? 'not concluded'],
      ['Lead', `${opened.people.lead.name}, ${opened.people.lead.relation}`],
      ['Witness', `${opened.people.witness.name}, ${opened.people.witness.relation}`],
      ['Sealed', momentInWords(seal.sealedAt)],
      ['Last entry under the seal', `number ${seal.seq}`],
      ['Head hash (SHA-256)', seal.headHash],
      ['Key (kid)', seal.kid],
      ['Signature (Ed25519)', seal.signature],
    ],
  }
}

const howToCheck: Block[] = [
  {
    say: 'Keep this letter. The record’s page has a ledger file to download; whoever gets it can check it without an account: the file must show this head hash, and this signature by this key. A file that does not was altered.',
  },
  { go: 'Check a record', to: '/check' },
]

/** To the witness, once the lead has signed. */
export function countersignatureWanted(recorded: Recorded): Letter {
  const { opened, state } = recorded
  return {
    subject: `${opened.number}: your countersignature`,
    blocks: [
      {
        say: `${opened.people.lead.name} of ${opened.shop.name} has signed ${opened.number}, the proof test of ${opened.press.name} that you witnessed. It waits for you to countersign it, or to decline with a reason.`,
      },
      {
        say: 'Read it first. Your name, the time and what your signature means are printed on it; after 24 hours the delay is printed too.',
      },
      record(state.id),
      facts(recorded),
      ...howToCheck,
    ],
    why: `It came to you because ${opened.number} names you as its witness. Nobody can countersign in your place.`,
  }
}

/** To lead, witness and owners, with each signature: what they hold can’t be changed by whoever has the database. */
export function recordSealed(recorded: Recorded, by: 'lead' | 'witness'): Letter {
  const { opened, state } = recorded
  const signature = by === 'lead' ? state.signed : state.countersigned
  const name = signature?.printedName ?? (by === 'lead' ? opened.people.lead.name : opened.people.witness.name)
  const verb = by === 'lead' ? 'signed' : 'countersigned'
  return {
    subject: `${opened.number}: ${verb} and sealed`,
    blocks: [
      {
        say: `${name} ${verb} ${opened.number}, a proof test of ${opened.press.name} at ${opened.shop.name}. The seal below covers every entry of it up to then.`,
      },
      {
        say: 'The seal says that nothing was altered since. It does not say that the press may be used: that stands on the press’s own page.',
      },
      facts(recorded),
      record(state.id),
      ...howToCheck,
    ],
    why: `It came to you because you lead or witness ${opened.number}, or own the shop: each of you holds the seal, so that nobody alone can change the record unnoticed.`,
  }
}

/** To lead, witness and owners: the witness would not countersign. */
export function recordDeclined(recorded: Recorded, name: string, why: string): Letter {
  const { opened, state } = recorded
  return {
    subject: `${opened.number}: countersignature declined`,
    blocks: [
      { say: `${name} declined to countersign ${opened.number}, the proof test of ${opened.press.name}. The reason as given: ${why}` },
      { say: 'The record goes back to the lead. The test gives no clearance until it is countersigned.' },
      record(state.id),
      facts(recorded),
    ],
    why: `It came to you because you lead or witness ${opened.number}, or own the shop.`,
  }
}
