import { useEffect, useRef, type ReactElement, type ReactNode } from 'react'
import { forceOf, stageTarget } from '#shared/proof-test/force'
import { forceTexts } from '#shared/proof-test/evaluate-climb'
import type { Opened, Reading } from '#shared/proof-test/entries'
import { formatForce, groupDigits, unitLabel } from '#shared/units'
import { Dial } from '../../../components/instruments/dial'
import { Bench } from '../../../components/run/bench'
import { Keypad } from '../../../components/run/keypad'
import { LiveFigure } from '../../../components/run/live-figure'
import { ReadingRow } from '../../../components/run/reading-row'
import { useRunShape } from '../../../components/run/run-frame'
import { clockTime } from '../../../lib/dates'
import { valueOf, type RowSource } from '../row-model'
import type { RowInHand } from '../use-row'
import type { Run } from '../use-run'
import { dialOf } from './dial-model'
import { Into } from './slots'
import { TemperatureField } from './temperature-field'

interface RowBenchProps {
  run: Run
  opened: Opened
  row: RowInHand
  sources: readonly RowSource[]
  /** The stage that is pumped to; null where the load is off. */
  percent: number | null
  /** Said before the moment is marked: what to do first. */
  before: { title: string; hint: string }
  /** Why marking has to wait. */
  shut?: string
  /** Asks for a temperature beside the row. */
  temperature?: boolean
  /** The load is not shown: a row read with the load off. */
  bare?: boolean
  /** The target is a guide only: no window is kept. */
  anywhere?: boolean
  /** The row that the load stands at: shown until the next one is marked. */
  standing?: readonly Reading[]
  /** Takes the keys' place while marking has to wait. */
  waiting?: ReactNode
}

function loadOf(opened: Opened, readings: readonly Reading[]) {
  const figure = forceOf(opened, readings)
  if (!figure) return null
  const { own, ownU, kN, kNU } = forceTexts(opened, figure)
  const unit = unitLabel(opened.forceUnit, { plural: true })
  const also = opened.forceUnit === 'kN' ? formatForce(figure.force, 'metric-ton-force') : `${kN} kN ± ${kNU}`
  return { figure: groupDigits(own), unit, uncertainty: ownU, also }
}

function foundOf(opened: Opened, percent: number | null, readings: readonly Reading[], sources: readonly RowSource[]) {
  const target = percent === null ? null : stageTarget(opened, percent)
  const force = sources.find((source) => source.kind === 'force')
  const value = force ? valueOf(readings, force.id) : null
  if (!target || !force || value === null) return undefined
  const { window } = target
  const span = `${groupDigits(window.fromText)} to ${groupDigits(window.toText)}`
  const inside = value >= window.from - 1e-6 && value <= window.to + 1e-6
  return inside
    ? ({ mark: 'within', text: `${force.label} inside ${span}` } as const)
    : ({ mark: 'wait', text: `${force.label} outside ${span}` } as const)
}

function question(row: RowInHand, props: RowBenchProps): { title: string; hint: string } {
  if (row.draft.mark === null) return { title: props.before.title, hint: props.shut ?? props.before.hint }
  const source = row.focusedSource
  if (!source) return { title: 'What was read?', hint: 'Tap a value to type it.' }
  return { title: `What does the ${source.label.charAt(0).toLowerCase()}${source.label.slice(1)} read?`, hint: 'Tap a value to change it.' }
}

/** Mark, one row of values, the gauge's face, the load they stand for, and keys for gloved fingers. */
export function RowBench(props: RowBenchProps): ReactElement {
  const { run, opened, row, sources, percent, temperature = false, bare = false, anywhere = false } = props
  const shape = useRunShape()
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => heading.current?.focus(), [])
  const { draft } = row
  const shown = draft.mark === null && props.standing ? props.standing : row.readings
  const dial = dialOf(run.state, opened, percent, shown)
  const asked = question(row, props)
  const enterShut = draft.mark === null || run.box.fault !== null
  const mark = (): void => {
    if (props.shut === undefined) row.mark()
  }
  return (
    <Into slot="bench">
      <h1 ref={heading} tabIndex={-1} className="sr-only">
        {asked.title}
      </h1>
      <Bench
        row={
          <ReadingRow
            mark={draft.mark ? clockTime(draft.mark.at, { seconds: true }) : null}
            onMark={mark}
            markNote={props.shut === undefined ? 'now' : 'not yet'}
            markShut={props.shut !== undefined}
            fields={sources.map((source) => ({
              id: source.id,
              label: source.label,
              unit: source.unitText,
              text: draft.texts[source.id] ?? '',
              error: draft.errors[source.id],
            }))}
            focusedId={draft.mark === null ? null : draft.focused}
            onFocus={row.focus}
            onChange={row.type}
            onCommit={row.commit}
          />
        }
        dial={dial ? <Dial {...dial} /> : <div className="bg-dye" />}
        figure={
          <div>
            <LiveFigure
              question={asked.title}
              hint={Object.keys(draft.errors).length > 0 ? undefined : asked.hint}
              found={anywhere ? undefined : foundOf(opened, percent, shown, sources)}
              load={loadOf(opened, shown)}
              bare={bare}
            />
            {temperature && <TemperatureField value={draft.temperature} onChange={row.temperature} lengthUnit={opened.lengthUnit} />}
          </div>
        }
        keypad={
          props.shut !== undefined && props.waiting !== undefined ? (
            props.waiting
          ) : (
            <Keypad
              onKey={row.key}
              onBackspace={row.backspace}
              onEnter={row.enter}
              enterShut={enterShut}
              enterLabel={row.last ? 'Enter row' : 'Enter'}
              enterNote={draft.mark === null ? 'after the mark' : row.nextSource ? `then ${row.nextSource.label.toLowerCase()}` : undefined}
              enterLast={row.last || draft.mark === null ? undefined : 'last key: Enter row'}
              signed={row.focusedSource?.kind === 'point'}
              size={shape === 'phone' ? 'phone' : 'tablet'}
            />
          )
        }
      />
    </Into>
  )
}
