import type { MarkName } from '../marks'
import type { LadderStage, StageState } from './load-ladder'

export const RUNG_MARK: Record<StageState, MarkName> = {
  'to-come': 'to-come',
  now: 'now',
  'went-on': 'go-on',
  waiting: 'wait',
  stopped: 'stop',
  datum: 'datum',
  held: 'within',
}

export interface RungInk {
  line: string
  weight: number
  dash: string | undefined
  label: string
  note: string
  noteWeight: number
}

const LIVE: RungInk = {
  line: 'var(--chalk)',
  weight: 3,
  dash: undefined,
  label: 'var(--chalk)',
  note: 'var(--chalk)',
  noteWeight: 600,
}
const PAST: RungInk = {
  line: 'var(--scribe)',
  weight: 2,
  dash: undefined,
  label: 'var(--scribe)',
  note: 'var(--faint-scribe)',
  noteWeight: 400,
}

/** How a rung is drawn. Once a stage was stopped, those above it stay shut and step back. */
export function rungInk(stage: LadderStage, shut: boolean): RungInk {
  switch (stage.state) {
    case 'now':
    case 'waiting':
      return LIVE
    case 'stopped':
      return { ...PAST, line: 'var(--stop-line)', weight: 3, note: 'var(--scribe)', noteWeight: 600 }
    case 'to-come':
      return {
        ...PAST,
        line: 'var(--faint-scribe)',
        weight: 1.6,
        dash: '7 5',
        label: shut ? 'var(--faint-scribe)' : 'var(--scribe)',
      }
    case 'went-on':
    case 'datum':
    case 'held':
      return PAST
  }
}

export function topPercentOf(stages: readonly LadderStage[], given: number | undefined): number {
  return given ?? Math.max(100, ...stages.map((stage) => stage.percent))
}
