import type { PressJoint } from '#shared/press/state'
import { jointState } from '#shared/drawing/drawn-press'
import { JointBalloon } from '../../../../components/marks'
import { CheckRow } from '../../../../components/check-row'

type JointChoiceProps = {
  legend: string
  hint: string
  joints: readonly PressJoint[]
  chosen: readonly string[]
  onToggle: (id: string) => void
}

/** Which joints are meant: by their rows here, or by their balloons on the drawing. */
export function JointChoice({ legend, hint, joints, chosen, onToggle }: JointChoiceProps) {
  return (
    <fieldset>
      <legend className="font-medium">{legend}</legend>
      <p className="text-graphite">{hint}</p>
      <div className="mt-1 grid gap-x-6 tablet:grid-cols-2">
        {joints.map((joint) => (
          <CheckRow
            key={joint.id}
            className="border-b border-hairline"
            label={
              <span className="flex items-center gap-2.5">
                <JointBalloon number={joint.number} state={jointState(joint)} size={26} decorative />
                <span>
                  <span className="sr-only">{joint.number} </span>
                  {joint.name}
                </span>
              </span>
            }
            value={joint.id}
            checked={chosen.includes(joint.id)}
            onChange={() => onToggle(joint.id)}
          />
        ))}
      </div>
    </fieldset>
  )
}
