import type { ProtocolRequest } from '#shared/api/protocols'
import type { ProtocolContent, ProtocolLeg } from '#shared/proof-test/protocol'
import type { LengthUnit, Typed } from '#shared/units'
import { optionalTyped, typedNumber } from '../../../lib/draft-resolver'

/** The same shape with every number as text. */
type AsTyped<T> = T extends number
  ? string
  : T extends (infer One)[]
    ? AsTyped<One>[]
    : T extends string | null
      ? T
      : { [K in keyof T]: AsTyped<T[K]> }

type Limits = Omit<ProtocolContent['limits'], 'mostSet'>

/** What stands in the form. */
export type ProtocolDraft = {
  name: string
  content: AsTyped<Omit<ProtocolContent, 'limits' | 'legs' | 'aboveRating'>> & {
    legs: ProtocolLeg[]
    /** The hold stays while the stage is switched off, to be there when it is switched on again. */
    aboveRating: { asked: boolean; holdSeconds: string }
    limits: AsTyped<Limits> & { mostSet: Typed<LengthUnit> }
  }
}

const asText = <T extends object>(values: T) =>
  Object.fromEntries(Object.entries(values).map(([name, value]) => [name, typeof value === 'number' ? String(value) : value])) as AsTyped<T>

/** A protocol as it stands, to be written on from. */
export function draftOf(name: string, content: ProtocolContent, lengthUnit: LengthUnit): ProtocolDraft {
  const { limits, legs, stages, aboveRating, ...rest } = content
  const { mostSet, ...percents } = limits
  return {
    name,
    content: {
      ...asText(rest),
      legs: legs.map((leg) => ({ ...leg })),
      stages: stages.map((stage) => asText(stage)),
      aboveRating: { asked: aboveRating !== undefined, holdSeconds: aboveRating ? String(aboveRating.holdSeconds) : '' },
      limits: { ...asText(percents), mostSet: mostSet ?? { text: '', unit: lengthUnit } },
    },
  }
}

/** Whether a stage, as typed so far, lies above rated load. */
export const isAboveRating = (stages: readonly { percent: string }[]) => stages.some((stage) => (typedNumber(stage.percent) ?? 0) > 100)

/** The draft as the schema wants it: numbers where it holds numbers. */
export function toProtocolRequest({ name, content }: ProtocolDraft): Record<keyof ProtocolRequest, unknown> {
  const { aboveRating, ...kept } = content
  const { limits, stages } = kept
  const { mostSet, ...percents } = limits
  return {
    name,
    content: {
      ...kept,
      ...(aboveRating.asked && { aboveRating: numbersOf({ holdSeconds: aboveRating.holdSeconds }) }),
      stages: stages.map((stage) => numbersOf(stage)),
      ...numbersOf({
        seatingPercent: content.seatingPercent,
        datumWatchSeconds: content.datumWatchSeconds,
        recoverySeconds: content.recoverySeconds,
        repeatHoldSeconds: content.repeatHoldSeconds,
        predictionAllowancePercent: content.predictionAllowancePercent,
        frictionPercent: content.frictionPercent,
        marginDivisor: content.marginDivisor,
        examinationMonths: content.examinationMonths,
      }),
      // Asked for only while a stage lies above rating; a rule that no stage rests on isn't kept.
      aboveRatingRule: isAboveRating(stages) ? content.aboveRatingRule : '',
      limits: { ...numbersOf(percents), mostSet: optionalTyped(mostSet) },
    },
  }
}

const numbersOf = (texts: Record<string, string>) =>
  Object.fromEntries(Object.entries(texts).map(([name, text]) => [name, typedNumber(text)]))
