import { useDeferredValue, useMemo } from 'react'
import { useWatch } from 'react-hook-form'
import { FRAME_KINDS } from '#shared/press/model'
import { drawnPress, looseParts } from '#shared/drawing/drawn-press'
import { PressPlate } from '../../../../components/instruments/press-plate'
import { Mark } from '../../../../components/marks'
import { loadPathSoFar } from './checks'
import type { PressFormDraft } from './draft'
import { useFormPlacing } from './form-placing'
import type { PressForm } from './use-press-form'

const MOST_HOLES = 40

function LoadPathLine({ gap }: { gap: string | null }) {
  return (
    <p role="status" className="flex items-start gap-3">
      <span className="mt-0.5">
        <Mark name={gap === null ? 'within' : 'undecided'} tone="dye" size={20} />
      </span>
      <span>{gap ?? 'Entered without a gap: from the ram round the frame to the bed.'}</span>
    </p>
  )
}

/** What of the form the drawing shows. */
function drawn(draft: PressFormDraft) {
  const { kind, dimensions } = draft.description
  const frame = FRAME_KINDS.find((one) => one === kind)
  const holes = Number(dimensions.holes)
  const path = loadPathSoFar(draft)
  return {
    press: frame
      ? drawnPress({ kind: frame, dimensions: { ...dimensions, holes: Number.isInteger(holes) && holes <= MOST_HOLES ? holes : 0 } })
      : null,
    joints: draft.joints.map(({ id, number, name, makeUp, place }) => ({ id, number, name, state: makeUp, place: place || null })),
    gap: path.closed ? null : path.gap,
    loose: frame
      ? [
          ...looseParts(
            { kind: frame, members: draft.description.members.map(({ id, kind: one, name }) => ({ id, kind: one, name })) },
            draft.joints,
          ),
        ]
      : [],
  }
}

/** The press as it is typed: every joint in its balloon, and whether the load path closes. */
export function LivePlate({ form }: { form: PressForm }) {
  // The form asks first; the drawing follows when there is time.
  const { press, joints, gap, loose } = useDeferredValue(useWatch({ control: form.control, compute: drawn }))
  const looseSet = useMemo(() => new Set(loose), [loose])
  const { jointId, end } = useFormPlacing()
  const index = joints.findIndex(({ id }) => id === jointId)
  const joint = joints[index]
  return (
    <PressPlate
      press={press}
      joints={joints}
      loose={looseSet}
      printed={false}
      placing={
        joint
          ? {
              place: joint.place,
              onPlace: (place) => {
                form.setValue(`joints.${index}.place`, place, { shouldDirty: true })
                end()
              },
            }
          : null
      }
      states={['open', 'tacked', 'finished']}
      nothing="The press is drawn here, as soon as its kind of frame is chosen."
    >
      {joint && <p role="status">Tap the cross where joint {joint.number} stands.</p>}
      {press !== null && <LoadPathLine gap={gap} />}
    </PressPlate>
  )
}
