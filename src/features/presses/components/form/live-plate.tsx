import { useWatch } from 'react-hook-form'
import { FRAME_KINDS } from '#shared/press/model'
import { drawnPress } from '../../../../components/instruments/drawn-press'
import { PressPlate } from '../../../../components/instruments/press-plate'
import { Mark } from '../../../../components/marks'
import { loadPathSoFar } from './checks'
import type { PressFormDraft } from './draft'
import type { PressForm } from './use-press-form'

function LoadPathLine({ draft }: { draft: PressFormDraft }) {
  const path = loadPathSoFar(draft)
  return (
    <p role="status" className="flex items-start gap-3">
      <span className="mt-0.5">
        <Mark name={path.closed ? 'within' : 'undecided'} tone="dye" size={20} />
      </span>
      <span>{path.closed ? 'Entered without a gap: from the ram round the frame to the bed.' : path.gap}</span>
    </p>
  )
}

/** The press as it is typed: every joint in its balloon, and whether the load path closes. */
export function LivePlate({ form }: { form: PressForm }) {
  const draft = useWatch({ control: form.control }) as PressFormDraft
  const { kind, dimensions } = draft.description
  const frame = FRAME_KINDS.find((one) => one === kind)
  const holes = Number(dimensions.holes)
  const press = frame ? drawnPress({ kind: frame, dimensions: { ...dimensions, holes: Number.isInteger(holes) && holes < 41 ? holes : 0 } }) : null
  return (
    <PressPlate
      press={press}
      joints={draft.joints.map(({ id, number, name, makeUp, place }) => ({ id, number, name, state: makeUp, place: place || null }))}
      states={['open', 'tacked', 'finished']}
      nothing="The press is drawn here, as soon as its kind of frame is chosen."
    >
      {press !== null && <LoadPathLine draft={draft} />}
    </PressPlate>
  )
}
