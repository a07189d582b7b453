import { useState, type ReactElement } from 'react'
import type { Opened, Reading } from '#shared/proof-test/entries'
import type { ProofTestState, Row } from '#shared/proof-test/state'
import { parseDecimal, unitLabel } from '#shared/units'
import { Button } from '../../../components/button'
import { CheckRow } from '../../../components/check-row'
import { DecimalField } from '../../../components/decimal-field'
import { EntryPlace } from '../../../components/entry-place'
import { TextField } from '../../../components/field'
import { ActionPlate } from '../../../components/run/plates'
import { setPercent } from '../../../components/typeset'
import { clockTime } from '../../../lib/dates'
import { capital } from '../../../lib/words'
import { RowCorrections, Struck } from '../row-corrections'
import { rowSources } from '../row-model'
import { rowsSoFar, type NamedRow } from '../rows-so-far'
import type { Run } from '../use-run'
import { BenchScroll, HeadBand } from './head-band'
import { Into } from './slots'

interface Chosen {
  row: Row
  name: string
  reading: Reading
}

const labelOf = (opened: Opened, sourceId: string): string => rowSources(opened).find((source) => source.id === sourceId)?.label ?? ''

interface ValueProps {
  state: ProofTestState
  row: Row
  reading: Reading
  opened: Opened
  onChoose: () => void
}

/** One reading, struck through where a correction replaced it: both stay. */
function Value({ state, row, reading, opened, onChoose }: ValueProps): ReactElement {
  return (
    <button type="button" onClick={onChoose} className="min-h-14 touch-manipulation px-2 py-1 text-left hover:bg-field">
      <span className="block font-condensed text-16 text-graphite">
        {labelOf(opened, reading.sourceId)}, {unitLabel(reading.unit)}
      </span>
      <span className="text-18 font-semibold">
        <Struck state={state} row={row} reading={reading} />
        {reading.text}
      </span>
    </button>
  )
}

interface RowsProps {
  rows: readonly NamedRow[]
  state: ProofTestState
  opened: Opened
  placeOf: Run['placeOf']
  onChoose: (chosen: Chosen) => void
}

function Rows({ rows, state, opened, placeOf, onChoose }: RowsProps): ReactElement {
  return (
    <ul className="border-t border-hairline">
      {rows.map(({ row, name }) => (
        <li key={row.entryId} className="border-b border-hairline py-1">
          <p className="flex flex-wrap items-center gap-x-4 text-16">
            <span className="min-w-0 flex-1 font-medium">{setPercent(capital(name))}</span>
            <EntryPlace place={placeOf(row.entryId)} />
            <span className="text-graphite">{clockTime(row.mark.at, { seconds: true })}</span>
          </p>
          <div className="-mx-2 grid grid-cols-2 tablet:grid-cols-4">
            {row.readings.map((reading) => (
              <Value
                key={reading.sourceId}
                state={state}
                row={row}
                reading={reading}
                opened={opened}
                onChoose={() => onChoose({ row, name, reading })}
              />
            ))}
          </div>
          <RowCorrections state={state} row={row} opened={opened} />
        </li>
      ))}
    </ul>
  )
}

function Correction({ run, opened, chosen, onLeave }: { run: Run; opened: Opened; chosen: Chosen; onLeave: () => void }): ReactElement {
  const { reading, row, name } = chosen
  const [text, setText] = useState('')
  const [why, setWhy] = useState('')
  const [both, setBoth] = useState(false)
  const [asked, setAsked] = useState(false)
  const parsed = parseDecimal(text, { signed: true })
  const underLoad = run.state.loaded !== null
  const write = (): void => {
    setAsked(true)
    if (!parsed.ok || why.trim().length < 3) return
    const payload = {
      entryId: row.entryId,
      sourceId: reading.sourceId,
      text: text.trim(),
      unit: reading.unit,
      why: why.trim(),
      readAgainByBoth: both,
    }
    run.record({ kind: 'corrected', payload })
    onLeave()
  }
  return (
    <>
      <BenchScroll>
        <h2 className="text-22">
          {labelOf(opened, reading.sourceId)} at {setPercent(name)}: {reading.text} {unitLabel(reading.unit)}
        </h2>
        <p className="text-graphite">What was typed stays in the record, struck through, beside the correction and its reason.</p>
        <DecimalField
          className="mt-3"
          label="It should say"
          signed
          unit={unitLabel(reading.unit)}
          value={text}
          message={asked && !parsed.ok ? parsed.message : undefined}
          onChange={setText}
        />
        <TextField
          label="Why"
          maxLength={500}
          value={why}
          message={asked && why.trim().length < 3 ? 'Say why in a few words.' : undefined}
          onChange={(event) => setWhy(event.target.value)}
        />
        {underLoad && (
          <div className="mt-3">
            <CheckRow
              label="Lead and witness read it again together, at this load"
              checked={both}
              onChange={(event) => setBoth(event.target.checked)}
            />
          </div>
        )}
        <Button className="mt-3 min-h-14" onClick={onLeave}>
          Leave it as it is
        </Button>
      </BenchScroll>
      <Into slot="action">
        <ActionPlate
          title="Corrected"
          note={parsed.ok ? `${reading.text} becomes ${text.trim()} ${unitLabel(reading.unit)}` : 'type what it should say'}
          onPress={write}
        />
      </Into>
    </>
  )
}

/** Readings so far: as they stand, with a way to correct one by a new entry. After a stop none is offered. */
export function ReadingsPanel({ run, opened, onLeave }: { run: Run; opened: Opened; onLeave: () => void }): ReactElement {
  const [chosen, setChosen] = useState<Chosen | null>(null)
  const rows = rowsSoFar(run.state)
  const shut = run.state.stopped !== null || run.state.conclusion !== null
  return (
    <>
      <HeadBand step={run.step} title="Readings so far" focusKey="readings">
        {shut ? 'They stand as they are.' : 'Tap one to correct it. A reading is never edited.'}
      </HeadBand>
      {chosen && !shut ? (
        <Correction
          key={chosen.row.entryId + chosen.reading.sourceId}
          run={run}
          opened={opened}
          chosen={chosen}
          onLeave={() => setChosen(null)}
        />
      ) : (
        <>
          <BenchScroll>
            {rows.length === 0 ? (
              <p className="text-18">No row has been entered yet.</p>
            ) : (
              <Rows rows={rows} state={run.state} opened={opened} placeOf={run.placeOf} onChoose={shut ? () => undefined : setChosen} />
            )}
          </BenchScroll>
          <Into slot="action">
            <ActionPlate title="Back to the test" onPress={onLeave} />
          </Into>
        </>
      )}
    </>
  )
}
