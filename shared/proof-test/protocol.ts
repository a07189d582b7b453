import { z } from 'zod'
import { RAM_POSITIONS } from '../press/model'
import { typedLengthSchema } from '../units'

const percent = (most: number) => z.number('Enter a percentage.').min(0, 'Not below zero.').max(most, `At most ${most} %.`)
const seconds = z.number('Enter whole seconds.').int('Enter whole seconds.').min(1, 'At least one second.').max(3600, 'At most an hour.')

export const protocolLegSchema = z.object({
  label: z.string().trim().min(1, 'Name this leg.').max(60, 'Keep it to 60 characters.'),
  ramPosition: z.enum(RAM_POSITIONS),
  bed: z.enum(['where it is used most', 'lowest', 'highest']),
})

export const protocolStageSchema = z.object({ percent: percent(150), holdSeconds: seconds })

export const protocolLimitsSchema = z.object({
  stageLowerPercent: percent(10),
  stageUpperPercent: percent(10),
  pressureLossPercent: percent(50),
  creepPercent: percent(50),
  softeningPercent: percent(50),
  setPercent: percent(50),
  mostSet: typedLengthSchema.nullable(),
})

/**
 * The written plan of a proof test. Defaults are common practice, from memory, no source: each is a field.
 * `predictionAllowancePercent` widens the prediction of the next deflection beyond the readings' own
 * uncertainty, while the fit has fewer than three degrees of freedom.
 */
export const protocolContentSchema = z
  .object({
    purpose: z.string().trim().max(400, 'Keep it to 400 characters.'),
    legs: z.array(protocolLegSchema).min(1, 'A protocol has at least one leg.').max(6, 'Six legs at most.'),
    stages: z.array(protocolStageSchema).min(2, 'A protocol has at least two stages.').max(10, 'Ten stages at most.'),
    seatingPercent: percent(20),
    datumWatchSeconds: seconds,
    recoverySeconds: seconds,
    repeatClimb: z.enum(['when the set can be seen', 'always', 'never']),
    repeatHoldSeconds: seconds,
    limits: protocolLimitsSchema,
    predictionAllowancePercent: percent(20),
    frictionPercent: percent(10),
    decisionRule: z.enum(['simple', 'guard-band']),
    marginDivisor: z.number('Enter the margin.').min(1, 'The margin is never below 1.').max(3, 'A margin of 3 at most.'),
    examinationMonths: z
      .number('Enter whole months.')
      .int('Enter whole months.')
      .min(1, 'One month at least.')
      .max(24, '24 months at most.'),
    /** A last stage above the rated load, taken in a second climb. The percentage has no default: the lead enters it with its rule. */
    aboveRating: z.object({ holdSeconds: seconds }).optional(),
    aboveRatingRule: z.string().trim().max(200, 'Keep it to 200 characters.'),
  })
  .superRefine((content, context) => {
    content.stages.forEach((stage, index) => {
      const before = content.stages[index - 1]
      if (before && stage.percent <= before.percent) {
        context.addIssue({ code: 'custom', path: ['stages', index, 'percent'], message: 'Each stage is higher than the one before it.' })
      }
    })
    const highest = content.stages.at(-1)?.percent ?? 0
    if (highest < 100) {
      context.addIssue({
        code: 'custom',
        path: ['stages', content.stages.length - 1, 'percent'],
        message: 'The last stage reaches at least 100 %.',
      })
    }
    if (highest <= 100) return
    if (content.aboveRatingRule === '') {
      context.addIssue({ code: 'custom', path: ['aboveRatingRule'], message: 'Name the rule that asks for a load above rating.' })
    }
    if (content.aboveRating) {
      const message = 'A stage lies above rating already. Take it out, or do not ask for the percentage when a test is planned.'
      context.addIssue({ code: 'custom', path: ['aboveRating', 'holdSeconds'], message })
    }
    // Only a second climb goes above the rated load: without one, that stage would be passed over without a word.
    if (content.repeatClimb !== 'always') {
      const message = 'A load above rating is put on in the second climb. Choose “Always”.'
      context.addIssue({ code: 'custom', path: ['repeatClimb'], message })
    }
  })

/** Whether the witness reads the gauge at this stage: at full load, and again at a load above rating. */
export function witnessReads(percent: number, climb: number): boolean {
  return percent > 100 || (percent >= 100 && climb === 0)
}

/** The protocol with the percentage above rating that the lead entered for one test, and the rule it comes from. */
export function withAboveRating(content: ProtocolContent, above: { percent: number; rule: string } | null): ProtocolContent {
  const { aboveRating, ...rest } = content
  if (!aboveRating || !above) return rest
  const stages = [...content.stages, { percent: above.percent, holdSeconds: aboveRating.holdSeconds }]
  return { ...rest, stages, repeatClimb: 'always', aboveRatingRule: above.rule }
}

export type ProtocolContent = z.infer<typeof protocolContentSchema>
export type ProtocolLeg = z.infer<typeof protocolLegSchema>

const commonLimits = {
  stageLowerPercent: 2,
  stageUpperPercent: 5,
  pressureLossPercent: 5,
  creepPercent: 2,
  softeningPercent: 15,
  setPercent: 5,
  mostSet: null,
} as const

const common = {
  seatingPercent: 5,
  datumWatchSeconds: 120,
  recoverySeconds: 120,
  repeatHoldSeconds: 60,
  limits: commonLimits,
  predictionAllowancePercent: 5,
  frictionPercent: 5,
  decisionRule: 'simple',
  marginDivisor: 1,
  examinationMonths: 6,
  aboveRatingRule: '',
} as const

const quarters = [
  { percent: 25, holdSeconds: 60 },
  { percent: 50, holdSeconds: 60 },
  { percent: 75, holdSeconds: 120 },
  { percent: 100, holdSeconds: 300 },
]

/** The plan that a new one is written on from. */
export const FIRST_LOAD_BY_QUARTERS: ProtocolContent = {
  ...common,
  purpose: 'The first load of a new or repaired frame, bed where it is used most, ram central.',
  legs: [{ label: 'Ram central', ramPosition: 'central', bed: 'where it is used most' }],
  stages: quarters,
  repeatClimb: 'when the set can be seen',
}

/**
 * The protocols every shop starts with. Holds and limits: common practice, from memory, no source.
 * Off-centre follows the description of ASME ASP-2010 3-4.1.1 (100 % at the ram's far left and far right,
 * held one minute, at most 3.18 mm permanent increase of the opening). Proof above rating follows 3-4.1.3
 * (lowest and highest bed position, datum after a load of up to 100 %, held ten minutes): its percentage has
 * no default, the lead enters it for each test with the rule it comes from.
 */
export const SHIPPED_PROTOCOLS: readonly { name: string; content: ProtocolContent }[] = [
  {
    name: 'First load by quarters',
    content: FIRST_LOAD_BY_QUARTERS,
  },
  {
    name: 'Off-centre',
    content: {
      ...common,
      purpose: 'For a frame whose ram is moved sideways: full load with the ram far left, then far right.',
      legs: [
        { label: 'Ram far left', ramPosition: 'far left', bed: 'where it is used most' },
        { label: 'Ram far right', ramPosition: 'far right', bed: 'where it is used most' },
      ],
      stages: [...quarters.slice(0, 3), { percent: 100, holdSeconds: 60 }],
      repeatClimb: 'when the set can be seen',
      limits: { ...commonLimits, mostSet: { text: '3.18', unit: 'mm' } },
    },
  },
  {
    name: 'Proof above rating',
    content: {
      ...common,
      purpose: 'A load above the rating, where a rule asks for it: up to 100 % first, then from a new datum to the proof load.',
      legs: [
        { label: 'Bed lowest', ramPosition: 'central', bed: 'lowest' },
        { label: 'Bed highest', ramPosition: 'central', bed: 'highest' },
      ],
      stages: quarters,
      repeatClimb: 'always',
      limits: { ...commonLimits, mostSet: { text: '3.18', unit: 'mm' } },
      aboveRating: { holdSeconds: 600 },
    },
  },
]
