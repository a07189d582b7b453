import type { ToolingDetails, ToolingKind } from '#shared/tooling'
import type { ForceUnit, LengthUnit, TypedForce, TypedLength } from '#shared/units'
import { optionalTyped } from '../../../lib/draft-resolver'

/** What stands in the form: a height left empty is none. */
export type ToolingDraft = Omit<ToolingDetails, 'kind' | 'ratedLoad' | 'height'> & {
  kind: ToolingKind | ''
  ratedLoad: TypedForce | { text: string; unit: '' }
  height: TypedLength
}

export type ShopUnits = { forceUnit: ForceUnit; lengthUnit: LengthUnit }

/** Which ton is stamped on a piece is never taken for granted: the unit has to be said. */
export function emptyDraft({ lengthUnit }: ShopUnits): ToolingDraft {
  return {
    code: '',
    name: '',
    kind: '',
    ratedLoad: { text: '', unit: '' },
    ratingFrom: '',
    fit: '',
    height: { text: '', unit: lengthUnit },
    remark: '',
  }
}

/** A piece as it stands, to be changed. */
export const draftOf = (details: ToolingDetails, units: ShopUnits): ToolingDraft => ({
  ...details,
  height: details.height ?? emptyDraft(units).height,
})

/** The draft as the schema wants it. */
export const toToolingRequest = (draft: ToolingDraft) => ({ ...draft, height: optionalTyped(draft.height) })
