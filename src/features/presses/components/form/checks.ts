import type { z } from 'zod'
import { crossCheckRam, type FittingReading } from '#shared/hydraulics/ram'
import { typedWords } from '#shared/instruments/words'
import { loadPathOf, type LoadPath } from '#shared/press/load-path'
import { jointSchema, ramSchema, trainPartSchema, type Ram } from '#shared/press/model'
import { lowestLimit, ramInput, ratedLoadRefusal, type ComponentLimit } from '#shared/press/ratings'
import { formatForce, formatQuantity, toSI, typedPositiveForceSchema, unitLabel } from '#shared/units'
import { ramOf, toPayload, type PressFormDraft, type RamDraft } from './draft'

function whole<T>(items: readonly unknown[], schema: z.ZodType<T>): T[] {
  return items.flatMap((item) => {
    const parsed = schema.safeParse(item)
    return parsed.success ? [parsed.data] : []
  })
}

/** What can be said of the rated load so far, from the rams and parts that are whole; null while a ram is not. */
export function ratingSoFar({
  description,
}: Pick<PressFormDraft, 'description'>): { lowest: ComponentLimit; refusal: string | null } | null {
  const payload = toPayload({ pressId: '', description, joints: [], lastWorkedOn: '' }).description
  const rams = whole(payload.rams, ramSchema)
  if (rams.length < payload.rams.length) return null
  const train = whole(payload.train, trainPartSchema)
  const lowest = lowestLimit({ rams, train })
  if (!lowest) return null
  const load = typedPositiveForceSchema.safeParse(payload.ratedLoad)
  return { lowest, refusal: load.success ? ratedLoadRefusal({ rams, train, ratedLoad: load.data }) : null }
}

/** Whether the joints that hold two members lead round the frame without a gap. */
export function loadPathSoFar(draft: PressFormDraft): LoadPath {
  const { joints } = toPayload({ ...draft, joints: draft.joints.map((joint) => ({ ...joint, strength: null })) })
  const holding = joints.map((joint) => ({ ...joint, name: joint.name || `Joint ${joint.number}` }))
  return loadPathOf(
    draft.description.members.map(({ id, kind, name }) => ({ id, kind, name })),
    whole(holding, jointSchema),
  )
}

function fitting(reading: FittingReading, ram: Ram): string {
  switch (reading.kind) {
    case 'bore':
      return ram.bore
        ? `a bore of ${formatQuantity(reading.bore, ram.bore.unit, ram.bore.unit === 'in' ? 3 : 1)}`
        : `an area of ${formatQuantity(reading.area, ram.effectiveArea?.unit ?? 'mm2', ram.effectiveArea?.unit === 'in2' ? 2 : 0)}`
    case 'rated-pressure':
      return `a rated pressure of ${formatQuantity(reading.pressure, ram.ratedPressure.unit, 0)}`
    case 'ton':
      return `${unitLabel(reading.unit, { plural: true })} instead of ${unitLabel(ram.ratedCapacity.unit, { plural: true })}`
  }
}

/**
 * Whether area, rated capacity and rated pressure belong together; where they don't, what would fit. Null
 * while they are not all there.
 */
export function ramCheck(draft: RamDraft): { fits: boolean; sentence: string } | null {
  const parsed = ramSchema.safeParse(ramOf(draft))
  if (!parsed.success) return null
  const ram = parsed.data
  const { area } = ramInput(ram)
  const ratedPressure = toSI(ram.ratedPressure)
  const check = crossCheckRam({ ratedCapacity: toSI(ram.ratedCapacity), ratedPressure, area, markedUnit: ram.ratedCapacity.unit })
  if (check.consistent) return { fits: true, sentence: 'Area, rated capacity and rated pressure belong together.' }
  const makes = `${typedWords(ram.ratedPressure)} on this area makes ${formatForce(ratedPressure * area, ram.ratedCapacity.unit)}, not ${typedWords(ram.ratedCapacity)}.`
  const readings = check.readings.map((reading) => fitting(reading, ram))
  return { fits: false, sentence: `${makes} Read the marks on the ram again. What would fit: ${readings.join(', or ')}.` }
}
