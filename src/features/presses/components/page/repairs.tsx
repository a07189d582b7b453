import { useState, type ReactNode } from 'react'
import { nameJoints } from '#shared/press/joints'
import { isAccepted } from '#shared/press/apply'
import type { PressJoint, PressState, Repair } from '#shared/press/state'
import { AttachmentStrip } from '../../../../components/attachments/attachment-strip'
import { Button, TextLink } from '../../../../components/button'
import { jointState } from '#shared/drawing/drawn-press'
import { JointBalloon, Mark } from '../../../../components/marks'
import { Section } from '../../../../components/page'
import { setPercent } from '../../../../components/typeset'
import type { Files } from '../../../../lib/attachment-held'
import type { Placed } from '../../../../lib/attachment-places'
import { longDate, shortDate } from '../../../../lib/dates'
import { useCan } from '../../../../lib/here'
import { paths } from '../../../../paths'
import { shownOf } from './press-photos'
import { RepairCloseForm, RepairNoteForm } from './repair-forms'
import type { Sending } from './sending'

type People = Readonly<Record<string, string>>

const jointsOf = (state: PressState, repair: Repair): PressJoint[] =>
  state.joints.filter((joint) => !joint.retired && repair.jointIds.includes(joint.id)).sort((a, b) => a.number - b.number)

const membersOf = (state: PressState, repair: Repair): string[] =>
  (state.description?.members ?? []).filter((member) => repair.memberIds.includes(member.id)).map((member) => member.name)

/** The joints that a repair is about, and those on the members it names: where to look on the drawing. */
export function pointedOut(state: PressState, repair: Repair | undefined): string[] {
  if (!repair) return []
  return state.joints
    .filter((joint) => !joint.retired && (repair.jointIds.includes(joint.id) || joint.between.some((id) => repair.memberIds.includes(id))))
    .map((joint) => joint.id)
}

/** "Examine joints 5 and 7 again", after a repair that is closed; null when they are accepted. */
export function toExamine(state: PressState, repair: Repair): string | null {
  if (!repair.closed) return null
  const left = jointsOf(state, repair).filter((joint) => !isAccepted(joint))
  return left.length === 0 ? null : `Examine ${nameJoints(left.map((joint) => joint.number))} again.`
}

function Concerned({ state, repair }: { state: PressState; repair: Repair }) {
  const joints = jointsOf(state, repair)
  const members = membersOf(state, repair)
  const whole = joints.length === state.joints.filter((joint) => !joint.retired).length && joints.length > 2
  return (
    <>
      {members.length > 0 && (
        <p>
          Members concerned: <span className="font-medium">{members.join(', ')}</span>
        </p>
      )}
      {whole && <p>Joints concerned: every one, until somebody knows which gave.</p>}
      {!whole && joints.length > 0 && (
        <ul className="mt-1 flex flex-wrap gap-x-5 gap-y-1.5">
          {joints.map((joint) => (
            <li key={joint.id} className="flex items-center gap-2">
              <JointBalloon number={joint.number} state={jointState(joint)} size={24} />
              {joint.name}
            </li>
          ))}
        </ul>
      )}
    </>
  )
}

type Shown = { state: PressState; people: People; photos: readonly Placed[]; files: Files }

function Photos({ shown: { state, people, photos, files }, at, by }: { shown: Shown; at: string; by: string }) {
  const these = photos.filter((photo) => photo.at === at && photo.by === by)
  return <AttachmentStrip className="mt-2" files={files} shown={shownOf(these, state, people)} />
}

function Notes({ shown, repair }: { shown: Shown; repair: Repair }) {
  if (repair.notes.length === 0) return null
  return (
    <ol aria-label="What was done" className="mt-2 border-t border-hairline">
      {repair.notes.map((note) => (
        <li key={note.seq} className="border-b border-hairline py-2">
          <p>{note.note}</p>
          <p className="text-14 text-graphite max-desktop:text-16">
            {shortDate(note.at)}, done by {note.doneBy}
            {shown.people[note.by] !== undefined && shown.people[note.by] !== note.doneBy && `, written by ${shown.people[note.by]}`}
          </p>
          <Photos shown={shown} at={note.at} by={note.by} />
        </li>
      ))}
    </ol>
  )
}

const FROM: Record<Repair['from'], string> = { test: 'Called for by', joint: 'Called for at an examination', person: 'Reported' }

function Origin({ repair, people }: { repair: Repair; people: People }) {
  const by = people[repair.openedBy]
  return (
    <p className="text-graphite">
      {FROM[repair.from]} {repair.test && <TextLink to={paths.proofTest.href(repair.test.proofTestId)}>{repair.test.number}</TextLink>}
      {repair.test ? ', ' : 'on '}
      {longDate(repair.openedAt)}
      {by !== undefined && ` by ${by}`}
    </p>
  )
}

type OpenRepairProps = Sending & {
  shown: Shown
  repair: Repair
  pointed: boolean
  onPoint: () => void
}

function OpenRepair({ shown, repair, pointed, onPoint, send, busy }: OpenRepairProps) {
  const { state, people } = shown
  const can = useCan()
  const [form, setForm] = useState<'note' | 'close' | null>(null)
  const waits = repair.test && repair.test.proofTestId === state.underTest?.proofTestId ? state.underTest.number : null
  const props = { pressId: state.id, repair, send, busy, onDone: () => setForm(null) }
  return (
    <li className="border-b border-hairline py-4 first:pt-3">
      <div className="flex items-start gap-3">
        <Mark name="stop" size={22} className="mt-1 shrink-0" />
        <div className="min-w-0 grow">
          <h3 className="text-18">{setPercent(repair.why)}</h3>
          <Origin repair={repair} people={people} />
          <div className="mt-2">
            <Concerned state={state} repair={repair} />
          </div>
          <Photos shown={shown} at={repair.openedAt} by={repair.openedBy} />
          <Notes shown={shown} repair={repair} />
          {form === null && (
            <div className="mt-3 flex flex-wrap items-center gap-3">
              {can('press:repair-note') && (
                <Button size="line" onClick={() => setForm('note')}>
                  Say what was done
                </Button>
              )}
              {can('press:record') && waits === null && (
                <Button size="line" onClick={() => setForm('close')}>
                  Close this repair
                </Button>
              )}
              {pointedOut(state, repair).length > 0 && (
                <Button size="line" aria-pressed={pointed} onClick={onPoint}>
                  {pointed ? 'Marked on the drawing' : 'Mark on the drawing'}
                </Button>
              )}
            </div>
          )}
          {waits !== null && <p className="mt-2">{waits} is not concluded yet. Conclude it, then close the repair.</p>}
          {form === 'note' && <RepairNoteForm {...props} />}
          {form === 'close' && <RepairCloseForm {...props} />}
        </div>
      </div>
    </li>
  )
}

function ClosedRepair({ shown, repair }: { shown: Shown; repair: Repair }) {
  const { closed } = repair
  if (!closed) return null
  const left = toExamine(shown.state, repair)
  return (
    <li className="border-b border-hairline py-3">
      <p className="font-semibold">{setPercent(repair.why)}</p>
      <Origin repair={repair} people={shown.people} />
      <p className="mt-1">
        {closed.done}{' '}
        <span className="text-graphite">
          Closed on {longDate(closed.at)}
          {closed.doneBy !== '' && `, done by ${closed.doneBy}`}.
        </span>
      </p>
      {left !== null && <p className="font-medium">{left}</p>}
      <Notes shown={shown} repair={repair} />
      <Photos shown={shown} at={closed.at} by={closed.by} />
    </li>
  )
}

type RepairsProps = Sending & {
  shown: Shown
  pointedId: string | null
  onPoint: (repairId: string | null) => void
  /** Opens the form that asks for a repair; null while another form is open. */
  onOpen: (() => void) | null
  children?: ReactNode
}

/** What has to be put right before the press is loaded again, what was done about it, and what was put right before. */
export function Repairs({ shown, pointedId, onPoint, onOpen, children, ...sending }: RepairsProps) {
  const { repairs } = shown.state
  const open = repairs.filter((repair) => !repair.closed)
  const closed = repairs.filter((repair) => repair.closed).reverse()
  const again = [...new Set(closed.flatMap((repair) => toExamine(shown.state, repair) ?? []))]
  return (
    <div id="repairs" tabIndex={-1} className="scroll-mt-4 outline-none">
      <Section title="Repairs" note={open.length === 0 ? 'none open' : `${open.length} open`}>
        {open.length > 0 && (
          <ul className="border-t border-hairline">
            {open.map((repair) => (
              <OpenRepair
                key={repair.id}
                shown={shown}
                repair={repair}
                pointed={repair.id === pointedId}
                onPoint={() => onPoint(repair.id === pointedId ? null : repair.id)}
                {...sending}
              />
            ))}
          </ul>
        )}
        {open.length === 0 &&
          again.map((sentence) => (
            <p key={sentence} className="flex items-start gap-3 border-t border-hairline py-2 font-medium">
              <Mark name="undecided" size={22} className="mt-0.5 shrink-0" />
              <span>
                A repair is closed. {sentence}{' '}
                <a href="#joints" className="font-normal underline underline-offset-[3px]">
                  To the joints
                </a>
              </span>
            </p>
          ))}
        {children}
        {onOpen && (
          <Button size="line" className="mt-3" onClick={onOpen}>
            Open a repair
          </Button>
        )}
        {closed.length > 0 && (
          <details className="mt-3" open={again.length > 0}>
            <summary className="min-h-12 cursor-pointer content-center font-medium underline underline-offset-[3px] desktop:min-h-10">
              {closed.length === 1 ? 'One repair was closed' : `${closed.length} repairs were closed`}
            </summary>
            <ul className="border-t border-hairline">
              {closed.map((repair) => (
                <ClosedRepair key={repair.id} shown={shown} repair={repair} />
              ))}
            </ul>
          </details>
        )}
      </Section>
    </div>
  )
}
