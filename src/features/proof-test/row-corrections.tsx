import type { ReactElement } from 'react'
import type { Opened, Reading } from '#shared/proof-test/entries'
import type { ProofTestState, Row } from '#shared/proof-test/state'
import { unitLabel } from '#shared/units'
import { clockTime } from '../../lib/dates'
import { rowSources } from './row-model'

/** Whatever stood in place of a reading before it was corrected, oldest first: it stays, struck through. */
export function Struck({ state, row, reading }: { state: ProofTestState; row: Row; reading: Reading }): ReactElement[] {
  return state.corrections
    .filter((one) => one.correctsEntryId === row.entryId && one.sourceId === reading.sourceId)
    .map(({ entryId, from }) => (
      <s key={entryId} className="mr-2 font-normal text-graphite">
        {from.text}
        {from.unit !== reading.unit && ` ${unitLabel(from.unit)}`}
      </s>
    ))
}

/** Only people named in a test write in it. */
function nameOf(opened: Opened, personId: string): string {
  return Object.values(opened.people).find(({ id }) => id === personId)?.name ?? 'somebody not named here'
}

/** Under a row: each correction of it with both readings, why, by whom and when. */
export function RowCorrections({ state, row, opened }: { state: ProofTestState; row: Row; opened: Opened }): ReactElement[] {
  return state.corrections
    .filter((one) => one.correctsEntryId === row.entryId)
    .map((one) => (
      <p key={one.entryId} className="text-16 text-graphite">
        {rowSources(opened).find(({ id }) => id === one.sourceId)?.label ?? 'A reading'}: {one.from.text} corrected to {one.to.text}{' '}
        {unitLabel(one.to.unit)}. {one.why} {nameOf(opened, one.by)}, {clockTime(one.at)}
        {one.readAgainByBoth && '; read again by both'}.
      </p>
    ))
}
