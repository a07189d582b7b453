import { useState, type ReactElement } from 'react'
import { SET_UP_ITEMS, type SetUpItem } from '#shared/proof-test/entries'
import { parseDecimal } from '#shared/units'
import { CheckRow } from '../../../components/check-row'
import { DecimalField } from '../../../components/decimal-field'
import { TextField } from '../../../components/field'
import { ActionPlate } from '../../../components/run/plates'
import { useDraft } from '../drafts'
import { setUpSentence } from '../set-up-words'
import { Cautions } from './cautions'
import { BenchScroll, HeadBand } from './head-band'
import { Into } from './slots'
import type { StepProps } from './step-props'

interface SetUpDraft {
  items: SetUpItem[]
  relief: string
  stroke: string
  note: string
}

function faultsOf(draft: SetUpDraft) {
  const missing = SET_UP_ITEMS.filter((item) => !draft.items.includes(item))
  const stroke = parseDecimal(draft.stroke)
  const relief = draft.relief.trim() === '' ? null : parseDecimal(draft.relief)
  return {
    missing,
    stroke: !stroke.ok
      ? stroke.message
      : stroke.value < 10 || stroke.value > 80
        ? 'It must stand between 10 and 80 %. Change the stack.'
        : undefined,
    relief:
      relief && !relief.ok
        ? relief.message
        : relief === null && draft.note.trim().length < 3
          ? 'Write the setting down, or say in the note why there is none.'
          : undefined,
  }
}

/** Every point of the set-up, ticked by hand behind the shield, each a whole sentence. */
export function SetUpStep({ run, opened, step }: StepProps<'set-up'>): ReactElement {
  const [draft, change] = useDraft<SetUpDraft>(`${run.testId}.set-up`, { items: [], relief: '', stroke: '', note: '' })
  const [asked, setAsked] = useState(false)
  const faults = faultsOf(draft)
  const tick = (item: SetUpItem, on: boolean): void =>
    change({ items: SET_UP_ITEMS.filter((one) => (one === item ? on : draft.items.includes(one))) })
  const confirm = (): void => {
    setAsked(true)
    if (faults.missing.length > 0 || faults.stroke || faults.relief) return
    const reliefSet = draft.relief.trim() === '' ? null : { text: draft.relief.trim(), unit: opened.pressureUnit }
    run.record({
      kind: 'set-up-confirmed',
      payload: { items: draft.items, reliefSet, strokePercent: draft.stroke.trim(), note: draft.note.trim() },
    })
  }
  const left = faults.missing.length
  return (
    <>
      <HeadBand step={step} title="Set-up">
        {opened.people.pumpHand.name} works the pump. {opened.people.witness.name} attends.
      </HeadBand>
      <BenchScroll>
        <Cautions />
        <div className="mt-3">
          {SET_UP_ITEMS.map((item) => (
            <CheckRow
              key={item}
              label={setUpSentence(item, opened)}
              checked={draft.items.includes(item)}
              message={asked && !draft.items.includes(item) ? 'Do it, then tick it.' : undefined}
              onChange={(event) => tick(item, event.target.checked)}
            />
          ))}
        </div>
        <div className="mt-4 grid gap-4 tablet:grid-cols-2">
          <DecimalField
            label="Relief valve set to"
            unit={opened.pressureUnit}
            hint={opened.pressureUnit}
            value={draft.relief}
            message={asked ? faults.relief : undefined}
            onChange={(relief) => change({ relief })}
          />
          <DecimalField
            label="Stroke under load"
            unit="% of the stroke"
            hint="% of the whole stroke"
            value={draft.stroke}
            message={asked ? faults.stroke : undefined}
            onChange={(stroke) => change({ stroke })}
          />
          <TextField
            className="tablet:col-span-2"
            label="Note"
            optional
            maxLength={500}
            value={draft.note}
            onChange={(event) => change({ note: event.target.value })}
          />
        </div>
      </BenchScroll>
      <Into slot="action">
        <ActionPlate
          title="The set-up stands as written"
          note={left > 0 ? `${left} of ${SET_UP_ITEMS.length} points to tick` : 'all points are ticked'}
          onPress={confirm}
        />
      </Into>
    </>
  )
}
