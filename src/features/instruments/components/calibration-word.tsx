import { calibrationState, type Calibration } from '#shared/instruments/model'
import { classNames } from '../../../lib/class-names'
import { daysBetween, shortDate } from '../../../lib/dates'
import { Mark, type MarkName } from '../../../components/marks'

/** From how many days before its day a calibration is said to fall due. Common practice, no source. */
const SOON = 30

const days = (count: number) => (count === 1 ? '1 day' : `${count} days`)

export type CalibrationWord = {
  mark: MarkName
  /** The state in two or three words. */
  word: string
  /** Blocks a new test. */
  blocks: boolean
  soon: boolean
}

/** How an instrument stands on a day: its shape and its word. */
export function calibrationWord(calibration: Calibration | null, today: string): CalibrationWord {
  const state = calibrationState(calibration, today)
  if (calibration === null || state === 'never') return { mark: 'not-read', word: 'never calibrated', blocks: true, soon: false }
  if (state === 'out-of-tolerance') return { mark: 'beyond', word: 'out of tolerance', blocks: true, soon: false }
  const left = daysBetween(today, calibration.dueOn)
  if (state === 'out-of-date') return { mark: 'clock-late', word: `${days(-left)} late`, blocks: true, soon: false }
  if (left > SOON) return { mark: 'within', word: 'in date', blocks: false, soon: false }
  return { mark: 'clock', word: left === 0 ? 'due today' : `due in ${days(left)}`, blocks: false, soon: true }
}

/** The day it falls due, with the shape and the word of how it stands. */
export function DueCell({ calibration, today }: { calibration: Calibration | null; today: string }) {
  const { mark, word, blocks, soon } = calibrationWord(calibration, today)
  const late = blocks && calibration !== null
  const strong = soon || calibration === null
  return (
    <span className="flex items-center gap-2.5">
      <Mark name={mark} size={20} />
      <span className="min-w-0 whitespace-nowrap">
        {calibration && <>{shortDate(calibration.dueOn)}, </>}
        <span className={classNames(late && 'font-semibold text-stop-ink', strong && 'font-semibold', !late && !strong && 'text-graphite')}>
          {word}
        </span>
      </span>
    </span>
  )
}
