import { useState, type ReactNode } from 'react'
import { nameJoints } from '#shared/press/joints'
import type { PressJoint, PressState } from '#shared/press/state'
import { Button, ButtonAnchor } from '../../../../components/button'
import { JointBalloon } from '../../../../components/marks'
import { jointState } from '#shared/drawing/drawn-press'
import { Section } from '../../../../components/page'
import { clockTime } from '../../../../lib/dates'
import { useCan } from '../../../../lib/here'
import { capital, ordinal } from '../../../../lib/words'
import { ExamineForm, JointActions, WorkForm } from './joint-actions'
import { AddJointForm, type Spotting } from './joint-shape-forms'
import { Joints } from './joints'
import type { Sending } from './sending'
import type { PressWalk } from './use-press-walk'

type JointsPartProps = Sending & {
  state: PressState
  joints: readonly PressJoint[]
  selectedId: string | null
  onSelect: (id: string | null) => void
  walk: PressWalk
  spotting: Spotting
  /** Under the joint that is chosen, over what can be done to it. */
  children: ReactNode
}

type WalkProps = JointsPartProps & { walked: NonNullable<PressWalk['walked']> }

/** One joint after another: the one that was tapped, else the next one round the frame. */
function WalkDown({ state, joints, selectedId, onSelect, walk, walked, send, busy }: WalkProps) {
  const current = joints.find(({ id }) => id === selectedId) ?? walked.toCome[0]
  const left = walked.toCome.length
  const rejected = joints.filter(({ id, examination }) => examination?.result === 'rejected' && walked.order.some((one) => one.id === id))
  const form = { pressId: state.id, joints, send, busy, onDone: () => onSelect(null) }
  return (
    <div className="mb-4 border-2 border-ink bg-field px-4 py-4">
      <div className="flex flex-wrap items-center justify-between gap-3">
        <p role="status" className="font-semibold">
          {left === 0 ? `All ${joints.length} joints were looked at.` : `${walked.order.length} of ${joints.length} joints looked at.`}
        </p>
        <Button size="line" onClick={walk.end}>
          {left === 0 ? 'The walk-down is over' : 'End the walk-down here'}
        </Button>
      </div>
      {rejected.length > 0 && (
        <div className="mt-3 flex flex-wrap items-center gap-3">
          <p>
            {capital(nameJoints(rejected.map(({ number }) => number)))} {rejected.length === 1 ? 'was' : 'were'} rejected: a repair is open.
          </p>
          <ButtonAnchor size="line" href="#repairs">
            To the open repair
          </ButtonAnchor>
        </div>
      )}
      {current && (
        <div className="mt-4">
          <h3 className="flex items-center gap-3 text-20">
            <JointBalloon number={current.number} state={jointState(current)} size={40} decorative />
            Joint {current.number}: {current.name}
          </h3>
          {current.makeUp === 'finished' ? (
            <ExamineForm key={current.id} joint={current} {...form} />
          ) : (
            <>
              <p className="my-2">
                It is {current.makeUp}: it can't be accepted. Say when it is finished, or go on with another joint and come back.
              </p>
              <WorkForm key={current.id} joint={current} {...form} />
            </>
          )}
        </div>
      )}
    </div>
  )
}

/** The joints of a press and what can be done to them: one by one, as a walk-down, or one more. */
export function JointsPart(props: JointsPartProps) {
  const { state, joints, selectedId, onSelect, walk, spotting, send, busy, children } = props
  const can = useCan()
  const [adding, setAdding] = useState(false)
  const free = state.underTest === null
  const selected = joints.find((joint) => joint.id === selectedId)
  const walked = free && can('press:record') ? walk.walked : null
  const notes = new Map(
    walked?.order.map(({ id, at }, index) => [id, `${ordinal(index + 1)} of ${joints.length}, ${clockTime(at)}`] as const),
  )
  return (
    <Section title="Joints">
      {walked && <WalkDown {...props} walked={walked} />}
      <Joints joints={joints} selectedId={selectedId} onSelect={onSelect} notes={notes}>
        {children}
        {selected && !walked && free && <JointActions key={selected.id} {...{ state, joints, send, busy, spotting }} joint={selected} />}
        {selected && state.underTest && <p>It is walked down in {state.underTest.number}: work and examinations are entered there.</p>}
      </Joints>
      {adding && (
        <div className="mt-4 border-t-2 border-ink pt-4">
          <h3 className="mb-2 text-18">One more joint</h3>
          <AddJointForm state={state} send={send} busy={busy} spotting={spotting} onDone={() => setAdding(false)} />
        </div>
      )}
      {free && !walked && !adding && (
        <div className="mt-4 flex flex-wrap gap-3">
          {can('press:record') && joints.length > 0 && (
            <Button
              size="line"
              onClick={() => {
                onSelect(null)
                walk.begin()
              }}
            >
              Walk down the joints
            </Button>
          )}
          {can('press:describe') && (
            <Button
              size="line"
              onClick={() => {
                onSelect(null)
                setAdding(true)
              }}
            >
              Add a joint
            </Button>
          )}
        </div>
      )}
    </Section>
  )
}
