import type { ReactElement, ReactNode } from 'react'
import type { Opened, Position, Reading } from '#shared/proof-test/entries'
import { evaluateClimb } from '#shared/proof-test/evaluate-climb'
import { rowSources, type Surprise } from '../row-model'
import { atHoldEnd, atTarget } from '../surprises'
import { useRow, type RowInHand } from '../use-row'
import type { Run } from '../use-run'
import { RowBench } from './row-bench'

export type StageOccasion = 'hold start' | 'hold end' | 'again' | 'top-up'

interface StageRowOptions {
  run: Run
  opened: Opened
  step: { at: Position; percent: number }
  occasion: StageOccasion
}

function surpriseOf({ run, opened, step, occasion }: StageRowOptions): Surprise {
  const { at, percent } = step
  const stage = evaluateClimb(run.state, at.leg, at.climb)?.stages.find((one) => one.at.stage === at.stage)
  const datum = run.state.legs[at.leg]?.climbs[at.climb]?.datum.at(-1)?.readings ?? []
  return occasion === 'hold end' && stage ? atHoldEnd(run.state, opened, stage, datum) : atTarget(run.state, opened, at, percent)
}

/** A row under load, at a place of the test: its draft, what surprises, and the entry that it becomes. */
export function useStageRow(options: StageRowOptions): RowInHand {
  const { run, opened, step, occasion } = options
  const { at } = step
  const taken = run.state.legs[at.leg]?.climbs[at.climb]?.stages[at.stage]?.attempts[at.attempt]?.rows.length ?? 0
  return useRow({
    draftKey: `${run.testId}.row.${at.leg}.${at.climb}.${at.stage}.${at.attempt}.${taken}.${occasion}`,
    sources: rowSources(opened),
    surprise: surpriseOf(options),
    onEnter: (row) =>
      run.record(
        occasion === 'top-up' ? { kind: 'topped-up', payload: { at, ...row } } : { kind: 'row-read', payload: { at, occasion, ...row } },
      ),
  })
}

interface StageRowBenchProps {
  run: Run
  opened: Opened
  step: { at: Position; percent: number }
  row: RowInHand
  before: { title: string; hint: string }
  shut?: string
  waiting?: ReactNode
  standing?: readonly Reading[]
}

export function StageRowBench({ run, opened, step, ...rest }: StageRowBenchProps): ReactElement {
  return <RowBench run={run} opened={opened} sources={rowSources(opened)} percent={step.percent} {...rest} />
}
