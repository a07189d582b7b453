import { useMemo, useState, type ReactElement } from 'react'
import { CONCLUSIONS, type Conclusion } from '#shared/proof-test/entries'
import { CORE_VERSION, evaluateTest, freezeEvaluation, type TestEvaluation } from '#shared/proof-test/evaluate'
import { groupDigits, unitLabel } from '#shared/units'
import type { Opened } from '#shared/proof-test/entries'
import { TextArea } from '../../../components/field'
import { Mark } from '../../../components/marks'
import { RadioRow } from '../../../components/radio-row'
import { ActionPlate, ShutPlate } from '../../../components/run/plates'
import { VerdictTable } from '../../../components/run/verdict-table'
import { setPercent } from '../../../components/typeset'
import { capital } from '../../../lib/words'
import { useDraft } from '../drafts'
import type { Draft } from '../use-run'
import { verdictRows } from '../verdict-model'
import { AfterStop } from './after-stop'
import { BenchScroll, HeadBand } from './head-band'
import { Into } from './slots'
import type { StepProps } from './step-props'

function Against({ evaluation }: { evaluation: TestEvaluation }): ReactElement {
  if (evaluation.against.length === 0) {
    return (
      <p className="flex items-center gap-3 text-20 font-semibold">
        <Mark name="within" size={28} />
        Within every limit checked.
      </p>
    )
  }
  return (
    <>
      <h2 className="text-20">What stands against “accepted”</h2>
      <ul className="mt-1 border-t border-hairline">
        {evaluation.against.map((line) => (
          <li key={line} className="flex gap-3 border-b border-hairline py-2 text-18">
            <span className="mt-1">
              <Mark name="beyond" size={20} />
            </span>
            {setPercent(line)}
          </li>
        ))}
      </ul>
    </>
  )
}

function Would({ opened, evaluation }: { opened: Opened; evaluation: TestEvaluation }): ReactElement | null {
  const { clearance } = evaluation
  if (!clearance || evaluation.against.length > 0) return null
  const pressure = clearance.gaugePressure
    ? `, ${groupDigits(clearance.gaugePressure.text)} ${clearance.gaugePressure.unit} on this gauge`
    : ''
  const unmeasured = opened.notMeasured.length > 0 ? ` Not measured: ${opened.notMeasured.join(', ')}.` : ''
  return (
    <p className="mt-2 text-18">
      Countersigned, the press is cleared up to{' '}
      <strong className="font-semibold">
        {clearance.text} {unitLabel(clearance.unit, { plural: clearance.text !== '1' })}
      </strong>
      {pressure}. One static load says nothing of fatigue, cold or other bed holes.{unmeasured}
    </p>
  )
}

/** The lead's conclusion, with all that speaks for and against it. Figures only advise. */
export function ConcludeStep({ run, opened, step }: StepProps<'conclude'>): ReactElement {
  const evaluation = useMemo(() => evaluateTest(run.state), [run.state])
  const [draft, change] = useDraft<{ conclusion: Conclusion | ''; why: string }>(`${run.testId}.conclusion`, { conclusion: '', why: '' })
  const [asked, setAsked] = useState(false)
  const declined = run.state.declined.at(-1)
  const draftOf = (conclusion: Conclusion): Draft => ({
    kind: 'concluded',
    payload: { conclusion, why: draft.why.trim(), evaluation: freezeEvaluation(evaluation), coreVersion: CORE_VERSION },
  })
  const accepting = run.decide(draftOf('accepted'))
  const shut = accepting.outcome === 'refused' ? accepting.findings[0]?.says : undefined
  const whyMissing = draft.conclusion !== '' && draft.conclusion !== 'accepted' && draft.why.trim().length < 3
  const conclude = (): void => {
    setAsked(true)
    if (draft.conclusion === '' || whyMissing) return
    run.record(draftOf(draft.conclusion))
  }
  return (
    <>
      <HeadBand step={step} title="Conclusion">
        {declined ? `${declined.printedName} declined: ${declined.why}` : 'The load is off. What was read, and what it says.'}
      </HeadBand>
      <BenchScroll>
        <Against evaluation={evaluation} />
        <Would opened={opened} evaluation={evaluation} />
        <div className="mt-3">
          <VerdictTable caption="The whole test" rows={verdictRows(evaluation.criteria)} />
        </div>
        <AfterStop run={run} />
        <RadioRow
          className="mt-4"
          name="conclusion"
          label="I conclude"
          value={draft.conclusion}
          message={asked && draft.conclusion === '' ? 'Choose what you conclude.' : undefined}
          choices={CONCLUSIONS.map((one) => ({ value: one, label: capital(one), disabled: one === 'accepted' && shut !== undefined }))}
          onChange={(event) => change({ conclusion: CONCLUSIONS.find((one) => one === event.target.value) ?? '' })}
        />
        {shut && <p className="mt-1 text-16 text-graphite">“Accepted” is shut: {setPercent(shut)}</p>}
        <TextArea
          className="mt-3"
          label="Why"
          optional={draft.conclusion === 'accepted'}
          maxLength={500}
          rows={2}
          value={draft.why}
          message={asked && whyMissing ? 'Write down why, in a few words.' : undefined}
          onChange={(event) => change({ why: event.target.value })}
        />
      </BenchScroll>
      <Into slot="action">
        {run.connection.connected ? (
          <ActionPlate
            title={draft.conclusion === '' ? 'Choose a conclusion' : `Concluded: ${draft.conclusion}`}
            note="then sign the record with your password"
            onPress={conclude}
          />
        ) : (
          <div className="ground-dye">
            <ShutPlate title="Concluded with a link" note="what others entered may not be here yet" />
          </div>
        )}
      </Into>
    </>
  )
}
