import { foldPress } from '#shared/press/apply'
import { foldProofTest } from '#shared/proof-test/apply'
import { evaluateTest } from '#shared/proof-test/evaluate'
import { capital, headlineOf, inPrint, placesTested } from '#shared/proof-test/record'
import type { LedgerEntry } from '#shared/ledger/envelope'
import type { LedgerFile } from '#shared/ledger/ledger-file'
import { longDate } from '../../lib/dates'

/** What a ledger tells of itself, worked out here from its entries. */
export interface Told {
  title: string
  headline: string
  facts: { what: string; is: string }[]
}

function entriesOf(file: LedgerFile): LedgerEntry[] {
  return file.entries.map(({ canonical, hash }) => ({ ...(JSON.parse(canonical) as Omit<LedgerEntry, 'hash'>), hash }))
}

function toldByTest(file: LedgerFile): Told | null {
  const state = foldProofTest(file.ledgerId, entriesOf(file))
  const { opened } = state
  if (opened === null) return null
  const { lead, witness } = opened.people
  return {
    title: `${opened.number}, ${opened.press.name}`,
    headline: headlineOf(state, evaluateTest(state)),
    facts: [
      { what: 'Shop', is: opened.shop.name },
      { what: 'Press', is: [opened.press.name, opened.press.whatFor].filter(Boolean).join(', ') },
      { what: 'Rated load', is: inPrint(opened.press.ratedLoad) },
      { what: 'Where it was loaded', is: placesTested(opened) },
      { what: 'Opened', is: state.openedAt === null ? '' : longDate(state.openedAt) },
      {
        what: 'Concluded',
        is: state.conclusion === null ? 'Not yet' : `${capital(state.conclusion.conclusion)}, ${longDate(state.conclusion.at)}`,
      },
      { what: 'Lead', is: lead.name },
      { what: 'Witness', is: [witness.name, witness.relation].filter(Boolean).join(', ') },
      ...(state.corrections.length > 0 ? [{ what: 'Readings corrected', is: `${state.corrections.length}, both readings kept` }] : []),
    ],
  }
}

function toldByPress(file: LedgerFile): Told | null {
  const { description, joints, history } = foldPress(file.ledgerId, entriesOf(file))
  if (description === null) return null
  return {
    title: description.name,
    headline: `The life of a press, in ${file.entries.length} entries`,
    facts: [
      { what: 'Shop', is: file.shop },
      { what: 'Press', is: [description.name, description.whatFor].filter(Boolean).join(', ') },
      { what: 'Rated load', is: inPrint(description.ratedLoad) },
      { what: 'Joints', is: String(joints.filter(({ retired }) => !retired).length) },
      { what: 'Last', is: history.at(-1)?.text ?? '' },
    ],
  }
}

/** What the file was a record of; null when this version can't tell it. */
export function toldBy(file: LedgerFile): Told | null {
  try {
    return file.subject === 'press' ? toldByPress(file) : toldByTest(file)
  } catch {
    // A whole file of a later version may hold entries that today's fold can't read.
    return null
  }
}
