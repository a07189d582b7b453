import type { ReactNode } from 'react'
import type { PressJoint } from '#shared/press/state'
import { jointState } from '#shared/drawing/drawn-press'
import { JointBalloon } from '../../../../components/marks'
import { classNames } from '../../../../lib/class-names'
import { shortDate } from '../../../../lib/dates'
import { capital } from '../../../../lib/words'

/** What was last found out about a joint, in a few words. */
function found(joint: PressJoint): string {
  const { examination, makeUp, fellBackBecause } = joint
  if (examination?.result === 'rejected') return `rejected, ${examination.method}`
  if (makeUp !== 'finished') return makeUp
  if (examination) return examination.method
  return fellBackBecause === null ? 'not examined' : `examine again: ${fellBackBecause}`
}

/** Who made it, with what, and when, as far as anybody has said. */
function Made({ joint }: { joint: PressJoint }) {
  const { kind, madeBy, filler, madeOn } = joint
  const said = [
    madeBy && `made by ${madeBy}`,
    filler && `${kind === 'weld' ? 'filler' : 'fastener'} ${filler}`,
    madeOn && shortDate(madeOn),
  ].filter(Boolean)
  return said.length > 0 ? <p className="text-graphite">{capital(said.join(', '))}.</p> : null
}

type JointsProps = {
  joints: readonly PressJoint[]
  selectedId: string | null
  onSelect: (id: string | null) => void
  /** What stands beside a joint for now, as its place in the order walked. */
  notes?: ReadonlyMap<string, string>
  /** Under the joint that is chosen: what can be done to it. */
  children: ReactNode
}

/** The joints in their order, each with its balloon; choosing one shows what was found and what can be done. */
export function Joints({ joints, selectedId, onSelect, notes, children }: JointsProps) {
  return (
    <ul className="border-t border-hairline">
      {joints.map((joint) => {
        const selected = joint.id === selectedId
        const { examination } = joint
        return (
          <li key={joint.id} className={classNames('border-b border-hairline', selected && 'border-l-4 border-l-ink bg-field')}>
            <button
              type="button"
              aria-expanded={selected}
              onClick={() => onSelect(selected ? null : joint.id)}
              className="grid min-h-14 w-full max-tablet:py-1.5 grid-cols-[2.25rem_minmax(0,1fr)] items-center gap-x-3 px-1 text-left -outline-offset-3! hover:bg-sheet tablet:grid-cols-[2.25rem_minmax(0,1.7fr)_minmax(0,1fr)_minmax(0,1fr)] desktop:min-h-[34px] desktop:grid-cols-[1.75rem_minmax(0,1.08fr)_minmax(0,0.92fr)_6rem] desktop:gap-x-2"
            >
              <span className="flex justify-center">
                <JointBalloon number={joint.number} state={jointState(joint)} size={24} />
              </span>
              <span className="font-medium">
                {joint.name}
                {notes?.has(joint.id) && (
                  <span className="block font-condensed text-16 font-normal text-graphite">{notes.get(joint.id)}</span>
                )}
              </span>
              <span className="text-graphite max-tablet:col-start-2 desktop:font-condensed">{joint.detail || joint.kind}</span>
              <span
                className={classNames(
                  'text-graphite max-tablet:col-start-2 desktop:font-condensed',
                  // A reason takes a line of its own: the column is as wide as the name of a method.
                  joint.fellBackBecause !== null && 'tablet:col-span-3 tablet:col-start-2',
                )}
              >
                {found(joint)}
              </span>
            </button>
            {selected && (
              <div className="px-4 pt-1 pb-4 tablet:pl-12">
                <Made joint={joint} />
                {examination && (
                  <p className="text-graphite">
                    {examination.result === 'accepted' ? 'Accepted' : 'Rejected'} on {shortDate(examination.at)}, {examination.method}
                    {examination.proofTestNumber !== null && `, in ${examination.proofTestNumber}`}
                    {examination.remark !== '' && `. ${examination.remark}`}
                  </p>
                )}
                {children}
              </div>
            )}
          </li>
        )
      })}
    </ul>
  )
}
