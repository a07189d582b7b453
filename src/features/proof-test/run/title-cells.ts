import type { Opened } from '#shared/proof-test/entries'
import type { TitleCell } from '../../../components/run/run-title-block'
import { clockTime } from '../../../lib/dates'
import { shortName } from '../../../lib/words'
import type { Run } from '../use-run'

/** When the witness last wrote anything: what this tablet can know of who is here. */
function heardOf(run: Run, opened: Opened): string {
  const last = run.entries.findLast((entry) => entry.authorId === opened.people.witness.id)
  return last ? `heard ${clockTime(last.observedAt)}` : 'not heard yet'
}

/** On a tablet held upright there is room for the names, and for nothing that can be read elsewhere. */
export function titleCells(run: Run, opened: Opened, wide: boolean): TitleCell[] {
  const { lead, witness } = opened.people
  const several = opened.legs.length > 1
  const leg = (run.state.position?.leg ?? 0) + 1
  return [
    { value: opened.press.name, note: wide ? opened.press.whatFor : undefined, strong: true },
    { value: opened.number },
    ...(several ? [{ label: 'Leg', value: `${leg} of ${opened.legs.length}`, from: 'desktop' as const }] : []),
    { label: 'Lead', value: shortName(lead.name), from: 'tablet' },
    { label: 'Witness', value: shortName(witness.name), note: several || !wide ? undefined : heardOf(run, opened), from: 'tablet' },
  ]
}
