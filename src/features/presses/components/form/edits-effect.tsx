import { useDeferredValue, useMemo } from 'react'
import { useWatch } from 'react-hook-form'
import { nameJoints } from '#shared/press/joints'
import type { PressState } from '#shared/press/state'
import { Mark, type MarkName } from '../../../../components/marks'
import { pressFormSchema, toPayload, type PressFormDraft } from './draft'
import { editsOf, effectOf, type EditsEffect } from './edits'
import type { PressForm } from './use-press-form'

const CLEARANCE: Record<EditsEffect['clearance'], { mark: MarkName; says: string }> = {
  ends: { mark: 'stop', says: 'The clearance ends with this. The press needs a proof test before it is used again.' },
  stands: { mark: 'within', says: 'The clearance stands: the press itself is what it was.' },
  'none in force': { mark: 'not-read', says: 'No clearance is in force, so none ends with this.' },
}

/** What the form comes to; null while it can't be read. */
function effectNow(state: PressState, draft: PressFormDraft): EditsEffect | 'nothing' | null {
  const parsed = pressFormSchema.safeParse(toPayload(draft))
  if (!parsed.success) return null
  const edits = editsOf(state, parsed.data, '')
  return edits.length === 0 ? 'nothing' : effectOf(state, edits)
}

/** What saving does to clearance and joints, by the rules of the press's ledger, before it is saved. */
export function EditsEffectNote({ form, state }: { form: PressForm; state: PressState }) {
  // The fields answer first; what it comes to follows when there is time.
  const draft = useDeferredValue(useWatch({ control: form.control }) as PressFormDraft)
  const effect = useMemo(() => effectNow(state, draft), [draft, state])
  if (effect === null) return <p className="text-graphite">Some fields above can’t be read yet. What saving does stands here then.</p>
  if (effect === 'nothing') return <p className="text-graphite">Nothing is different from what is written down.</p>
  const { mark, says } = CLEARANCE[effect.clearance]
  return (
    <div role="status" className="border-2 border-ink bg-sheet px-4 py-3">
      <p className="flex items-start gap-3 font-medium">
        <Mark name={mark} size={22} className="mt-0.5 shrink-0" />
        <span>{says}</span>
      </p>
      {effect.toExamine.length > 0 && (
        <p className="mt-1 flex items-start gap-3 font-medium">
          <Mark name="undecided" size={22} className="mt-0.5 shrink-0" />
          <span>To be examined: {nameJoints(effect.toExamine)}.</span>
        </p>
      )}
    </div>
  )
}
