import type { ReactElement } from 'react'
import { ButtonLink } from '../../../components/button'
import { Mark } from '../../../components/marks'
import { dateAndTime } from '../../../lib/dates'
import { capital } from '../../../lib/words'
import { paths } from '../../../paths'
import { BenchScroll, HeadBand } from './head-band'
import { Into } from './slots'
import type { StepProps } from './step-props'

type Props = StepProps<'sign'> | StepProps<'countersign'> | StepProps<'sealed'>

const WORDS = {
  sign: {
    title: 'To sign',
    says: 'The lead signs the record with the password. Signing needs a connection.',
    button: 'Go to the record and sign',
  },
  countersign: {
    title: 'To countersign',
    says: 'The witness reads the record and countersigns it, or declines with a reason.',
    button: 'Go to the record',
  },
  sealed: { title: 'Sealed', says: 'Both have signed. Nothing is added to this record any more.', button: 'Go to the record' },
} as const

/** The run is over: what is left happens on the record. */
export function SignedStep({ run, step }: Props): ReactElement {
  const words = WORDS[step.name]
  const { conclusion, signed, countersigned } = run.state
  return (
    <>
      <HeadBand step={step} title={words.title}>
        {conclusion ? `Concluded: ${conclusion.conclusion}, ${dateAndTime(conclusion.at)}.` : undefined}
      </HeadBand>
      <BenchScroll>
        <div className="flex gap-4">
          <Mark name={step.name === 'sealed' ? 'within' : 'to-countersign'} size={40} />
          <div>
            <h2 className="text-22 tablet:text-26">{conclusion ? capital(conclusion.conclusion) : ''}</h2>
            <p className="mt-1 text-18">{words.says}</p>
            {conclusion?.why && <p className="mt-2 text-18">{conclusion.why}</p>}
            {signed && (
              <p className="mt-2 text-18">
                Signed by {signed.printedName}, {dateAndTime(signed.signedAt)}, with password.
              </p>
            )}
            {countersigned && (
              <p className="text-18">
                Countersigned by {countersigned.printedName}, {dateAndTime(countersigned.signedAt)}, with password.
              </p>
            )}
          </div>
        </div>
      </BenchScroll>
      <Into slot="action">
        <ButtonLink
          kind="next"
          size="run"
          wide
          to={paths.proofTest.href(run.testId)}
          note={run.counts.tablet > 0 ? `${run.counts.tablet} entries are still to be sent` : undefined}
        >
          {words.button}
        </ButtonLink>
      </Into>
    </>
  )
}
