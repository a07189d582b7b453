import type { ReactElement } from 'react'
import type { Attachment } from '#shared/ledger/envelope'
import type { JointState } from '#shared/proof-test/state'
import { JointBalloon, Mark } from '../../../components/marks'
import { ActionPlate } from '../../../components/run/plates'
import { useDraft } from '../drafts'
import {
  jointAtHand,
  jointMark,
  jointSays,
  madeUpWord,
  needsWork,
  orderWalked,
  toExamineAfter,
  walkedWords,
  workSentence,
  type Occasion,
} from '../joint-words'
import type { Run } from '../use-run'
import { ConfirmLoadPath } from './confirm-load-path'
import { EntryPhotos, JointPhotos, photosToEnter } from './entry-photos'
import { BenchScroll, HeadBand } from './head-band'
import { RejectedJoint, StoodStill } from './walk-down-notes'
import { JointPanel } from './joint-panel'
import { Into } from './slots'
import type { StepProps } from './step-props'

/** Which joint is looked at; the drawing and the list share it. */
export const useChosenJoint = (testId: string) => useDraft<{ jointId: string | null }>(`${testId}.joint`, { jointId: null })

interface JointListProps {
  joints: readonly JointState[]
  occasion: Occasion
  chosen: JointState | null
  onChoose: (id: string) => void
}

function JointList({ joints, occasion, chosen, onChoose }: JointListProps): ReactElement {
  const walked = new Map(orderWalked(joints, occasion).map((one) => [one.joint, walkedWords(one, joints.length)]))
  return (
    <ul
      aria-label="Joints of the load path"
      className="mt-3 grid auto-rows-fr gap-x-6 tablet:grid-flow-col tablet:grid-cols-2"
      style={{ gridTemplateRows: `repeat(${Math.ceil(joints.length / 2)}, auto)` }}
    >
      {joints.map((joint) => {
        const here = joint === chosen
        return (
          <li key={joint.joint.id} className="border-t border-hairline">
            <button
              type="button"
              aria-pressed={here}
              onClick={() => onChoose(joint.joint.id)}
              className={`flex min-h-14 w-full touch-manipulation items-center gap-3 py-1 pr-2 pl-2 text-left ${here ? 'bg-field shadow-[inset_4px_0_0_var(--ink)]' : ''}`}
            >
              <JointBalloon number={joint.joint.number} state={jointMark(joint, occasion)} size={36} decorative />
              <span className="min-w-0">
                <span className="block text-16 leading-[21px] font-semibold">
                  <span className="sr-only">Joint {joint.joint.number}, </span>
                  {joint.joint.name}
                </span>
                <span className={`block font-condensed text-16 leading-[20px] ${here ? 'font-semibold' : 'text-graphite'}`}>
                  {[jointSays(joint, occasion), walked.get(joint)].filter(Boolean).join('. ')}
                </span>
              </span>
            </button>
          </li>
        )
      })}
    </ul>
  )
}

function Work({ run, joint, occasion, pressId }: { run: Run; joint: JointState; occasion: Occasion; pressId: string }): ReactElement {
  const { title, body } = workSentence(joint, run.state.joints)
  const { id, number } = joint.joint
  const [{ photos }, change] = useDraft<{ photos: Attachment[] }>(`${run.testId}.worked.${id}`, { photos: [] })
  const finish = (): void =>
    run.record({
      kind: 'joint-worked',
      payload: { jointId: id, makeUp: 'finished', how: '', workedAt: new Date().toISOString() },
      attachments: photosToEnter(run, photos),
    })
  return (
    <>
      <div className="flex gap-4">
        <JointBalloon number={joint.joint.number} state={jointMark(joint, occasion)} size={56} decorative />
        <div className="min-w-0">
          <h2 className="text-22 tablet:text-26">{title}</h2>
          <p className="mt-1 text-18">{body}</p>
          <RejectedJoint joint={joint} occasion={occasion} pressId={pressId} />
          {joint.joint.kind === 'weld' && (
            <p className="mt-2 flex items-center gap-3 text-18">
              <Mark name="not-read" size={22} />
              <span className="font-semibold">Cooled, and 12 hours since welding</span>
              <span className="text-graphite">to come</span>
            </p>
          )}
        </div>
      </div>
      <EntryPhotos
        className="mt-3"
        run={run}
        label={`Photos of the work on joint ${number}`}
        chosen={photos}
        onChange={(chosen) => change({ photos: chosen })}
      />
      <JointPhotos run={run} jointId={id} number={number} />
      <Into slot="action">
        <ActionPlate
          title={`Joint ${joint.joint.number} is ${madeUpWord(joint)}`}
          note={`then examine ${toExamineAfter(run.state.joints, joint)}`}
          onPress={finish}
          focusHint
        />
      </Into>
    </>
  )
}

function counted(joints: readonly JointState[], occasion: Occasion): string {
  const accepted = joints.filter((joint) => jointMark(joint, occasion) === 'accepted').length
  return `${accepted} of ${joints.length} joints accepted ${occasion === 'before load' ? 'in this walk-down' : 'after load'}`
}

/** Every joint of the load path, one by one: examined, or said to need work. Before the load, and again after it. */
export function WalkDownStep({ run, opened, step }: StepProps<'walk-down'> | StepProps<'after-walk-down'>): ReactElement {
  const occasion: Occasion = step.name === 'walk-down' ? 'before load' : 'after load'
  const [{ jointId }, choose] = useChosenJoint(run.testId)
  const { joints } = run.state
  const chosen = jointAtHand(opened.press.kind, joints, occasion, jointId)
  const done = (): void => choose({ jointId: null })
  return (
    <>
      <HeadBand step={step} title={occasion === 'before load' ? 'Walk-down' : 'Walk-down after load'}>
        {counted(joints, occasion)}
      </HeadBand>
      <BenchScroll>
        {occasion === 'before load' && <StoodStill days={opened.stoodStillDays} />}
        {chosen && needsWork(chosen, occasion) && occasion === 'before load' && (
          <Work run={run} joint={chosen} occasion={occasion} pressId={opened.pressId} />
        )}
        {chosen && !(needsWork(chosen, occasion) && occasion === 'before load') && (
          <JointPanel key={chosen.joint.id} run={run} joint={chosen} occasion={occasion} pressId={opened.pressId} onDone={done} />
        )}
        {!chosen && occasion === 'before load' && <ConfirmLoadPath run={run} opened={opened} />}
        <JointList joints={joints} occasion={occasion} chosen={chosen} onChoose={(id) => choose({ jointId: id })} />
      </BenchScroll>
    </>
  )
}
