import type { InstrumentRow } from '#shared/api/instruments'
import { Mark } from '../../../components/marks'
import { classNames } from '../../../lib/class-names'
import { longDate } from '../../../lib/dates'
import { capital } from '../../../lib/words'
import { calibrationWord } from './calibration-word'

function sayWhatFollows({ calibration, retired }: InstrumentRow, blocks: boolean, soon: boolean): string {
  if (retired) return 'It can’t be chosen for a test. Its records stay.'
  if (calibration === null) return 'It blocks a new test. Have it compared with a better one and enter the certificate.'
  if (calibration.result === 'out of tolerance') {
    return 'It blocks a new test, and suspended every clearance that rests on it.'
  }
  if (blocks) return 'It blocks a new test. Send it away, or take another one.'
  return soon ? 'It still may read a test. Send it away before the next one.' : 'It may read a test until that day.'
}

/** Whether the instrument may be relied on, in one look: shape, words, day, and what to do. */
export function CalibrationState({ instrument, today }: { instrument: InstrumentRow; today: string }) {
  const { calibration, retired } = instrument
  const { mark, word, blocks, soon } = calibrationWord(calibration, today)
  const words = retired ? 'retired' : word
  return (
    <div className="flex items-center gap-4 border-y-2 border-ink py-4">
      <Mark name={retired ? 'abandoned' : mark} size={52} />
      <div className="min-w-0">
        <p className={classNames('text-26 font-semibold', blocks && !retired && calibration !== null && 'text-stop-ink')}>
          {capital(words)}
          {!retired && calibration && calibration.result === 'in tolerance' && (
            <span className="font-normal text-ink">
              , {blocks ? 'was due' : soon ? '' : 'until '} {longDate(calibration.dueOn)}
            </span>
          )}
        </p>
        <p>{sayWhatFollows(instrument, blocks, soon)}</p>
      </div>
    </div>
  )
}
