import { summariseClimb, type RungSummary } from '#shared/proof-test/climb-summary'
import type { Opened } from '#shared/proof-test/entries'
import type { ClimbEvaluation } from '#shared/proof-test/evaluate-climb'
import { stageForce } from '#shared/proof-test/force'
import type { ProofTestState } from '#shared/proof-test/state'
import type { Step } from '#shared/proof-test/steps'
import { toSI } from '#shared/units'
import type { LadderStage, StageState } from '../../components/instruments/load-ladder'
import { clockTime } from '../../lib/dates'
import { duration, roundLoad } from './names'

function rungNote(rung: RungSummary, state: StageState, shut: boolean): string {
  const hold = duration(rung.holdSeconds)
  switch (state) {
    case 'went-on':
      return `${hold}, went on`
    case 'now':
      return rung.at ? `holding ${hold}` : `hold ${hold}`
    case 'waiting':
      return 'wait'
    case 'stopped':
      return 'stopped'
    default:
      return shut ? 'stays shut' : `hold ${hold}`
  }
}

function rungState(rung: RungSummary, step: Step): StageState {
  const live = 'percent' in step && step.percent === rung.percent
  if (rung.state === 'stopped') return 'stopped'
  if (live && step.name === 'wait') return 'waiting'
  if (live && step.name === 'stop-now') return 'stopped'
  if (live && rung.state !== 'went-on') return 'now'
  return rung.state
}

/** The rungs of load as the ladder shows them, with the datum at its foot. */
export function ladderStages(state: ProofTestState, opened: Opened, step: Step): LadderStage[] {
  const summary = summariseClimb(state)
  const datum: LadderStage = {
    percent: 0,
    label: '0 %',
    load: 'datum',
    note: summary.datumAt ? `zeroed ${clockTime(summary.datumAt)}` : 'not read yet',
    state: summary.datumAt ? 'datum' : 'to-come',
  }
  return [
    datum,
    ...summary.rungs.map((rung): LadderStage => {
      const shown = rungState(rung, step)
      return {
        percent: rung.percent,
        label: `${rung.percent} %`,
        load: roundLoad(stageForce(opened, rung.percent), opened.forceUnit),
        note: rungNote(rung, shown, state.stopped !== null),
        state: shown,
      }
    }),
  ]
}

/** Where the ram stands, in percent of the rated load, by the last row that was read. */
export function levelPercent(state: ProofTestState, opened: Opened, evaluation: ClimbEvaluation | null): number {
  if (!state.loaded) return 0
  if (state.loaded.by === 'seating') return opened.protocol.content.seatingPercent
  const force = evaluation?.stages.flatMap((stage) => stage.rows).at(-1)?.force?.force
  return force === undefined ? 0 : Math.max(0, (force / toSI(opened.press.ratedLoad)) * 100)
}
