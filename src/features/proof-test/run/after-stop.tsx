import { useState, type ReactElement } from 'react'
import type { Attachment } from '#shared/ledger/envelope'
import { Button } from '../../../components/button'
import { TextField } from '../../../components/field'
import { useDraft } from '../drafts'
import type { Run } from '../use-run'
import { EnteredPhotos, EntryPhotos, photosToEnter, shownOf } from './entry-photos'
import { positionOf } from './note-panel'

interface Found {
  note: string
  photos: Attachment[]
}

const NOTHING: Found = { note: '', photos: [] }

/** The load is off after a stop: what was found, with photos. It waits for nobody and holds nothing up. */
export function AfterStop({ run }: { run: Run }): ReactElement | null {
  const [draft, change] = useDraft<Found>(`${run.testId}.after-stop`, NOTHING)
  const [asked, setAsked] = useState(false)
  const { stopped } = run.state
  if (!stopped) return null
  const photos = photosToEnter(run, draft.photos)
  const nothing = asked && draft.note.trim().length < 3
  const write = (): void => {
    setAsked(true)
    if (draft.note.trim().length < 3) return
    run.record({ kind: 'observed', payload: { at: positionOf(run), what: 'other', note: draft.note.trim() }, attachments: photos })
    change(NOTHING)
    setAsked(false)
  }
  const since = run.photos.filter((one) => one.kind === 'observed' && one.seq > stopped.seq)
  return (
    <section aria-labelledby="after-stop" className="mt-4 border-t-2 border-ink pt-3">
      <h2 id="after-stop" className="text-20">
        What was found after the stop
      </h2>
      <EntryPhotos
        className="mt-2"
        run={run}
        label="Photos of it"
        chosen={draft.photos}
        onChange={(chosen) => change({ photos: chosen })}
      />
      <EnteredPhotos run={run} className="mt-3" shown={shownOf(run, since, () => 'Found after the stop')} />
      <div className="mt-3 grid items-start gap-3 tablet:grid-cols-[minmax(0,1fr)_auto]">
        <TextField
          label="In a few words"
          maxLength={500}
          value={draft.note}
          message={nothing ? 'Say what was found.' : undefined}
          onChange={(event) => change({ note: event.target.value })}
        />
        <Button className="tablet:mt-7 desktop:min-h-14" onClick={write}>
          Written down
        </Button>
      </div>
    </section>
  )
}
