import type { ReactElement } from 'react'
import { setPercent } from '../typeset'
import { LadderStrip } from './ladder-strip'
import { LadderUpright } from './ladder-upright'

export type StageState = 'to-come' | 'now' | 'went-on' | 'waiting' | 'stopped' | 'datum' | 'held'

export interface LadderStage {
  percent: number
  label: string
  /** Load with its unit in words, for example "9 short tons". */
  load: string
  note: string
  state: StageState
}

/** What a rung of the ladder says to someone who can't see its shape. */
export const stageStateWord: Record<StageState, string> = {
  'to-come': 'to come',
  now: 'now',
  'went-on': 'went on',
  waiting: 'wait',
  stopped: 'stopped',
  datum: 'datum',
  held: 'held',
}

export interface LadderProps {
  stages: LadderStage[]
  /** Where the ram stands, in percent of rated load; null where it must not be shown. */
  levelPercent: number | null
  /** Percent at the top of the scale; the highest stage, and 100 at the least, unless given. */
  topPercent?: number
  width: number
  height: number
}

interface LoadLadderProps extends Omit<LadderProps, 'height'> {
  scale: 'vertical' | 'strip'
  height?: number
  /** A strip with words under its rungs, or with their marks only. */
  words?: boolean
}

/** The rungs of load with a ram that stands where the load stands. */
export function LoadLadder({ scale, words = true, height, ...ladder }: LoadLadderProps): ReactElement {
  const stages = [...ladder.stages].sort((a, b) => a.percent - b.percent).map((stage) => ({ ...stage, label: setPercent(stage.label) }))
  return (
    <div className="relative">
      {scale === 'vertical' ? (
        <LadderUpright {...ladder} stages={stages} height={height ?? 644} />
      ) : (
        <LadderStrip {...ladder} stages={stages} height={height ?? (words ? 146 : 96)} words={words} />
      )}
      <ol aria-label="Stages of load" className="sr-only">
        {stages.map((stage) => (
          <li key={stage.percent} aria-current={stage.state === 'now' || stage.state === 'waiting' ? 'step' : undefined}>
            {[stage.label, stage.load, stage.note, stageStateWord[stage.state]].filter((part) => part !== '').join(', ')}
          </li>
        ))}
      </ol>
    </div>
  )
}
