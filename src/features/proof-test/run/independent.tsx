import { useEffect, useState, type ReactElement } from 'react'
import type { Opened, Position } from '#shared/proof-test/entries'
import type { Step } from '#shared/proof-test/steps'
import { Button } from '../../../components/button'
import { TextArea } from '../../../components/field'
import { Keypad } from '../../../components/run/keypad'
import { ActionPlate } from '../../../components/run/plates'
import { useRunShape } from '../../../components/run/run-frame'
import { useDraft } from '../drafts'
import { rowSources } from '../row-model'
import { useRow } from '../use-row'
import type { Run } from '../use-run'
import { useCover } from './cover'
import { OwnReading } from './own-reading'
import { BenchScroll, HeadBand } from './head-band'
import { Into } from './slots'
import type { StepProps } from './step-props'

interface IndependentProps {
  run: Run
  opened: Opened
  step: Extract<Step, { at: Position; percent: number }>
  onLeave?: () => void
}

function NotTaken({ onWrite, onLeave }: { onWrite: (why: string) => void; onLeave: () => void }): ReactElement {
  const [why, setWhy] = useState('')
  const [asked, setAsked] = useState(false)
  const short = why.trim().length < 3
  return (
    <>
      <BenchScroll>
        <TextArea
          label="Why was no independent reading taken?"
          hint="It prints in the record, and the conclusion asks about it again."
          value={why}
          message={asked && short ? 'Say why in a few words.' : undefined}
          onChange={(event) => setWhy(event.target.value)}
        />
        <Button className="mt-3" onClick={onLeave}>
          The witness reads after all
        </Button>
      </BenchScroll>
      <Into slot="action">
        <ActionPlate
          title="Not taken, for this reason"
          note="load is not kept on for it"
          onPress={() => {
            setAsked(true)
            if (!short) onWrite(why.trim())
          }}
        />
      </Into>
    </>
  )
}

function CoveredKeypad({ run, opened, step, onDone }: IndependentProps & { onDone: () => void }): ReactElement {
  const shape = useRunShape()
  const sources = rowSources(opened, 'force')
  const row = useRow({
    draftKey: `${run.testId}.independent.${step.at.leg}.${step.at.stage}.${step.at.attempt}`,
    sources,
    surprise: () => null,
    onEnter: ({ readings }) => {
      row.drop()
      onDone()
      run.record({ kind: 'independent-read', payload: { at: step.at, readings, notTaken: null, where: 'covered keypad of the lead' } })
    },
  })
  const { mark, draft } = row
  useEffect(() => {
    if (draft.mark === null) mark()
  })
  return (
    <Into slot="bench">
      <div className="flex min-h-0 flex-1 flex-col gap-4 pt-3">
        <OwnReading row={row} sources={sources} name={opened.people.witness.name} />
        <div className="min-h-[348px] flex-1">
          <Keypad
            onKey={row.key}
            onBackspace={row.backspace}
            onEnter={row.enter}
            enterLabel={shape === 'phone' && row.last ? 'Enter my reading' : 'Enter'}
            enterNote={shape === 'phone' ? undefined : row.last ? 'my reading' : `then ${row.nextSource?.label.toLowerCase() ?? ''}`}
            size={shape === 'phone' ? 'phone' : 'tablet'}
          />
        </div>
      </div>
    </Into>
  )
}

/** At full load the witness reads the gauge without seeing target, force or the lead's figure. It never keeps the press loaded. */
export function IndependentParts(props: IndependentProps): ReactElement {
  const { run, opened, step, onLeave } = props
  const [cover, setCover] = useCover(run.testId)
  const [{ refusing }, change] = useDraft(`${run.testId}.not-taken.${step.at.leg}`, { refusing: false })
  const { name } = opened.people.witness
  const done = (): void => {
    setCover(false)
    change({ refusing: false })
    onLeave?.()
  }
  const notTaken = (why: string): void => {
    run.record({ kind: 'independent-read', payload: { at: step.at, readings: [], notTaken: why, where: 'covered keypad of the lead' } })
    done()
  }
  if (cover) {
    return (
      <>
        <HeadBand low step={step} title="Read the gauge yourself" focusKey="covered">
          {name}: the lead’s figure stays covered until yours is in.
        </HeadBand>
        <CoveredKeypad {...props} onDone={done} />
      </>
    )
  }
  return (
    <>
      <HeadBand step={step} title="Independent reading" focusKey="handing over">
        {step.percent} % is held. {name} reads the gauge before it is released.
      </HeadBand>
      {refusing ? (
        <NotTaken onWrite={notTaken} onLeave={() => change({ refusing: false })} />
      ) : (
        <>
          <BenchScroll>
            <h2 className="text-22 tablet:text-26">Hand the tablet to {name}.</h2>
            <p className="mt-1 text-18">
              The screen then covers target, load and your own figure. {name} can also enter it on a phone; this goes on by itself when it
              is in.
            </p>
            <p className="mt-3 text-18">The reading never keeps the press loaded. If it cannot be taken, write down why and release.</p>
            <Button className="mt-4 min-h-14" onClick={() => change({ refusing: true })}>
              It is not taken
            </Button>
          </BenchScroll>
          <Into slot="action">
            <ActionPlate title={`${name} has the tablet`} note="cover the screen" onPress={() => setCover(true)} focusHint />
          </Into>
        </>
      )}
    </>
  )
}

export function IndependentStep(props: StepProps<'independent'>): ReactElement {
  return <IndependentParts {...props} />
}
