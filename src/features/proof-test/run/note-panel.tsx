import { useState, type ReactElement } from 'react'
import type { Attachment } from '#shared/ledger/envelope'
import type { Position } from '#shared/proof-test/entries'
import { Button } from '../../../components/button'
import { TextArea } from '../../../components/field'
import { RadioRow } from '../../../components/radio-row'
import { ActionPlate } from '../../../components/run/plates'
import { clockTime } from '../../../lib/dates'
import { capital } from '../../../lib/words'
import { useDraft } from '../drafts'
import type { Run } from '../use-run'
import { EnteredPhotos, EntryPhotos, photosToEnter, shownOf } from './entry-photos'
import { BenchScroll, HeadBand } from './head-band'
import { Into } from './slots'

const KINDS = ['noise', 'leak', 'movement', 'other'] as const
type Kind = (typeof KINDS)[number]

interface NoteDraft {
  what: Kind | ''
  note: string
  photos: Attachment[]
}

const NOTHING: NoteDraft = { what: '', note: '', photos: [] }

export function positionOf(run: Run): Position | null {
  const { position } = run.state
  return position && position.stage !== null && position.attempt !== null
    ? { ...position, stage: position.stage, attempt: position.attempt }
    : null
}

/** What was noted so far, the latest first, with its photos. */
function NotesSoFar({ run }: { run: Run }): ReactElement | null {
  const { observations } = run.state
  if (observations.length === 0) return null
  return (
    <section aria-labelledby="notes-so-far" className="mt-4">
      <h2 id="notes-so-far" className="text-18">
        Noted so far
      </h2>
      <ul className="border-t border-hairline">
        {[...observations].reverse().map(({ seq, at, by, what, note }) => (
          <li key={seq} className="border-b border-hairline py-2">
            <p>
              <span className="font-medium">{capital(what)}:</span> {note}{' '}
              <span className="text-graphite">{[run.people[by], clockTime(at, { seconds: true })].filter(Boolean).join(', ')}</span>
            </p>
            <EnteredPhotos
              run={run}
              className="mt-2"
              shown={shownOf(
                run,
                run.photos.filter((one) => one.seq === seq),
                () => `Note, ${what}: ${note}`,
              )}
            />
          </li>
        ))}
      </ul>
    </section>
  )
}

/** Something heard or seen, written down where the test is. */
export function NotePanel({ run, onLeave, onReadings }: { run: Run; onLeave: () => void; onReadings: () => void }): ReactElement {
  const [draft, change] = useDraft<NoteDraft>(`${run.testId}.note`, NOTHING)
  const [asked, setAsked] = useState(false)
  const write = (): void => {
    setAsked(true)
    if (draft.what === '' || draft.note.trim().length < 3) return
    const payload = { at: positionOf(run), what: draft.what, note: draft.note.trim() }
    run.record({ kind: 'observed', payload, attachments: photosToEnter(run, draft.photos) })
    change(NOTHING)
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
        <EntryPhotos className="mt-3" run={run} chosen={draft.photos} onChange={(photos) => change({ photos })} />
        <NotesSoFar run={run} />
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
