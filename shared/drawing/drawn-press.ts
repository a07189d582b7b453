import { looseMembers } from '../press/load-path'
import type { Joint, PressDescription } from '../press/model'
import type { PressJoint } from '../press/state'
import { parseDecimal, toSI, type LengthUnit } from '../units'
import type { JointMarkState } from './balloon-items'
import type { DrawnPress, FramePart } from './frame'
import { partsOf } from './member-parts'

type Measure = { text: string; unit: LengthUnit | '' } | null

/** A measure in metres; null while there is none that can be read. */
function metres(measure: Measure): number | null {
  if (measure === null || measure.unit === '') return null
  const parsed = parseDecimal(measure.text)
  return parsed.ok && parsed.value > 0 ? toSI({ text: measure.text, unit: measure.unit }) : null
}

type Described = {
  kind: PressDescription['kind']
  dimensions: { height: Measure; opening: Measure; throat: Measure; holePitch: Measure; holes: number }
}

/** A press as its drawing takes it: what nobody measured is drawn in proportion and bears no figure. */
export function drawnPress({ kind, dimensions }: Described, bedHole: number | null = null): DrawnPress {
  return {
    kind,
    dimensions: {
      height: metres(dimensions.height),
      width: metres(dimensions.opening),
      throat: metres(dimensions.throat),
      holePitch: metres(dimensions.holePitch),
      holes: dimensions.holes,
      bedHole,
    },
  }
}

/** The hole the bed is pinned in, where it is named by its number from the top; other names are not drawn. */
export function holeInUse(name: string | undefined): number | null {
  const number = /^(?:hole )?(\d{1,2})$/i.exec(name?.trim() ?? '')?.[1]
  return number === undefined ? null : Number(number)
}

/** How a joint's balloon is drawn on the press's own page: rejected stands out, whatever the make-up. */
export function jointState(joint: Pick<PressJoint, 'makeUp' | 'examination'>): JointMarkState {
  if (joint.examination?.result === 'rejected') return 'rejected'
  if (joint.makeUp !== 'finished') return joint.makeUp
  return joint.examination?.result ?? 'finished'
}

/** The parts of the drawing whose member hangs on no joint that leads to the rest. */
export function looseParts(
  description: Pick<PressDescription, 'kind' | 'members'> | null,
  joints: readonly Pick<Joint, 'between'>[],
): ReadonlySet<FramePart> {
  if (description === null) return new Set()
  const { kind, members } = description
  return partsOf(
    kind,
    members,
    looseMembers(members, joints).map(({ id }) => id),
  )
}
