import { useState, type ReactElement } from 'react'
import type { Position } from '#shared/proof-test/entries'
import { Button } from '../../../components/button'
import { TextArea } from '../../../components/field'
import { RadioRow } from '../../../components/radio-row'
import { ActionPlate } from '../../../components/run/plates'
import { capital } from '../../../lib/words'
import { useDraft } from '../drafts'
import type { Run } from '../use-run'
import { BenchScroll, HeadBand } from './head-band'
import { Into } from './slots'

const KINDS = ['noise', 'leak', 'movement', 'other'] as const
type Kind = (typeof KINDS)[number]

export function positionOf(run: Run): Position | null {
  const { position } = run.state
  return position && position.stage !== null && position.attempt !== null
    ? { ...position, stage: position.stage, attempt: position.attempt }
    : null
}

/** Something heard or seen, written down where the test is. */
export function NotePanel({ run, onLeave, onReadings }: { run: Run; onLeave: () => void; onReadings: () => void }): ReactElement {
  const [draft, change] = useDraft<{ what: Kind | ''; note: string }>(`${run.testId}.note`, { what: '', note: '' })
  const [asked, setAsked] = useState(false)
  const write = (): void => {
    setAsked(true)
    if (draft.what === '' || draft.note.trim().length < 3) return
    run.record({ kind: 'observed', payload: { at: positionOf(run), what: draft.what, note: draft.note.trim() } })
    change({ what: '', note: '' })
    onLeave()
  }
  return (
    <>
      <HeadBand step={run.step} title="Note" focusKey="note">
        What was heard or seen. If it cracks, moves or leaks under load: Stop comes first.
      </HeadBand>
      <BenchScroll>
        <RadioRow
          name="what"
          label="What was it?"
          value={draft.what}
          message={asked && draft.what === '' ? 'Say what it was.' : undefined}
          choices={KINDS.map((kind) => ({ value: kind, label: capital(kind) }))}
          onChange={(event) => change({ what: KINDS.find((kind) => kind === event.target.value) ?? '' })}
        />
        <TextArea
          className="mt-3"
          label="In a few words"
          maxLength={500}
          value={draft.note}
          message={asked && draft.note.trim().length < 3 ? 'Say it in a few words.' : undefined}
          onChange={(event) => change({ note: event.target.value })}
        />
        <div className="mt-3 flex flex-wrap gap-3">
          <Button className="min-h-14" onClick={onLeave}>
            Back to the test
          </Button>
          <Button className="min-h-14" onClick={onReadings}>
            Readings so far
          </Button>
        </div>
      </BenchScroll>
      <Into slot="action">
        <ActionPlate title="Written down" note="with the time, where the test is now" onPress={write} />
      </Into>
    </>
  )
}
