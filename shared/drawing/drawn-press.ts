import type { PressDescription } from '../press/model'
import type { PressJoint } from '../press/state'
import { parseDecimal, toSI, type LengthUnit } from '../units'
import type { JointMarkState } from './balloon-items'
import type { DrawnPress } from './frame'

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
export function drawnPress({ kind, dimensions }: Described): DrawnPress {
  return {
    kind,
    dimensions: {
      height: metres(dimensions.height),
      width: metres(dimensions.opening),
      throat: metres(dimensions.throat),
      holePitch: metres(dimensions.holePitch),
      holes: dimensions.holes,
    },
  }
}

/** How a joint's balloon is drawn on the press's own page: rejected stands out, whatever the make-up. */
export function jointState(joint: Pick<PressJoint, 'makeUp' | 'examination'>): JointMarkState {
  if (joint.examination?.result === 'rejected') return 'rejected'
  if (joint.makeUp !== 'finished') return joint.makeUp
  return joint.examination?.result ?? 'finished'
}
