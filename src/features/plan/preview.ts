import { gaugeCanTell, gaugeSuitability } from '#shared/hydraulics/gauge'
import { typedWords } from '#shared/instruments/words'
import type { FrozenInstrument } from '#shared/instruments/model'
import { decideByRules, findingsOf, type Finding } from '#shared/ledger/rules'
import { decidePress } from '#shared/press/decide'
import { missingOf } from '#shared/press/may-it-be-used'
import { loadPathOf } from '#shared/press/load-path'
import type { PressState } from '#shared/press/state'
import { emptyProofTest } from '#shared/proof-test/apply'
import { engineerSchema, type Mark, type Opened } from '#shared/proof-test/entries'
import { forceOf, leadInstrument, stageTarget, type StageTarget } from '#shared/proof-test/force'
import { OPENING_RULES } from '#shared/proof-test/rules-before-load'
import { openTestRequestSchema } from '#shared/api/proof-tests'
import { withAboveRating } from '#shared/proof-test/protocol'
import { decimalsOfStep, formatQuantity, toSI } from '#shared/units'
import type { PlanRegisters } from './api/get-plan-registers'
import { typedNumber } from '../../lib/draft-resolver'
import { netOf, SOMEBODY_ELSE, type PlanDraft } from './draft'
import { withTooling } from './tooling'

export interface Chosen {
  draft: PlanDraft
  registers: PlanRegisters
  press: PressState
  shop: {
    id: string
    name: string
    forceUnit: Opened['forceUnit']
    pressureUnit: Opened['pressureUnit']
    lengthUnit: Opened['lengthUnit']
    walkDownHours: number
  }
  lead: { id: string; name: string }
}

const UNNUMBERED = 'PT-0000'

const percentAbove = openTestRequestSchema.shape.aboveRating.unwrap().unwrap().shape.percent

/** The load above rating as far as it is typed: its rule isn't needed to say what it would come to. */
function aboveOf({ aboveRating }: PlanDraft): { percent: number; rule: string } | null {
  const percent = percentAbove.safeParse(typedNumber(aboveRating.percent))
  return percent.success ? { percent: percent.data, rule: aboveRating.rule.trim() } : null
}

/** What opening this plan would freeze, as far as it is chosen; null while press, protocol or what reads the force is missing. */
export function previewOpened({ draft, registers, press, shop, lead }: Chosen): Opened | null {
  const protocol = registers.protocols.find((one) => one.id === draft.protocolId)
  const forceInstrumentIds = draft.forceInstrumentIds.filter((id) => id !== '')
  if (!press.description || !protocol || forceInstrumentIds.length === 0) return null
  const points = draft.points.filter((point) => point.instrumentId !== '')
  const ids = [...new Set([...forceInstrumentIds, ...points.map((point) => point.instrumentId)])]
  const instruments = ids.flatMap((id): FrozenInstrument[] => {
    const row = registers.instruments.find((one) => one.id === id)
    return row ? [{ id, details: row.details, calibration: row.calibration }] : []
  })
  const nameOf = (id: string) => registers.people.find((person) => person.userId === id)?.name ?? ''
  const stranger = draft.pumpHand.id === SOMEBODY_ELSE
  return {
    number: UNNUMBERED,
    shop: { id: shop.id, name: shop.name },
    pressId: press.id,
    pressHeadSeq: Math.max(1, press.headSeq),
    press: withTooling(press.description, draft.toolingIds, registers),
    joints: press.joints.filter((joint) => !joint.retired),
    stoodStillDays: null,
    instruments,
    forceInstrumentIds,
    points: points.map(({ reads, memberId, ...point }) => ({ ...point, risesWithLoad: reads === 'rises', memberId: memberId || null })),
    net: netOf(draft),
    protocol: {
      id: protocol.id,
      name: protocol.name,
      version: protocol.version,
      content: withAboveRating(protocol.content, aboveOf(draft)),
    },
    legs: draft.legs,
    people: {
      lead: { ...lead, relation: '' },
      // Nobody chosen yet is nobody: two empty choices are not the same person.
      pumpHand: {
        id: stranger ? null : draft.pumpHand.id || null,
        name: stranger ? draft.pumpHand.name : nameOf(draft.pumpHand.id),
        relation: '',
      },
      witness: { id: draft.witness.id, name: nameOf(draft.witness.id), relation: draft.witness.relation },
    },
    forceUnit: shop.forceUnit,
    pressureUnit: shop.pressureUnit,
    lengthUnit: shop.lengthUnit,
    notMeasured: [],
    repeats: null,
    walkDownHours: shop.walkDownHours,
    instrumentOverride: draft.instrumentOverride.trim() || null,
    engineer: engineerSchema.safeParse(draft.engineer).data ?? null,
  }
}

/** The numbered rules that the server would refuse this plan by, asked here before it is sent. */
export function wouldRefuse(testId: string, opened: Opened, mark: Mark): Finding[] {
  const question = {
    state: emptyProofTest(testId),
    kind: 'opened',
    payload: opened,
    overrides: [],
    authorId: opened.people.lead.id ?? '',
    mark,
  }
  return findingsOf(decideByRules(OPENING_RULES, question, []))
}

/**
 * What the press's own ledger would refuse this plan by: a repair that is open (P21), and a test that went wrong and is
 * not named as the one that is repeated (P22). A test under way is said elsewhere.
 */
export function pressRefuses(press: PressState, { id, repeatsId }: Pick<PlanDraft, 'id' | 'repeatsId'>) {
  const payload = { proofTestId: id, number: UNNUMBERED, repeatsId: repeatsId || null }
  const decision = decidePress(press, { kind: 'test-opened', payload, overrides: [], at: new Date(0).toISOString(), consequence: true })
  const says = (rule: string): string | null => findingsOf(decision).find((finding) => finding.rule === rule)?.says ?? null
  return { repair: says('P21'), repeats: says('P22') }
}

/** What stands between this press and its first load, though a test may be opened with it: the walk-down asks for each. */
export function beforeLoad(press: PressState): string[] {
  const joints = press.joints.filter((joint) => !joint.retired)
  const path = loadPathOf(press.description?.members ?? [], joints)
  // Opening is refused by a gap already.
  return missingOf(press).filter((sentence) => path.closed || sentence !== path.gap)
}

export interface PlannedStage {
  target: StageTarget
  holdSeconds: number
  U: number | null
  warnings: string[]
}

function warningsOf(opened: Opened, target: StageTarget, U: number | null): string[] {
  const lead = leadInstrument(opened)
  const sentences = target.sentence === null ? [] : [`${target.percent} %: ${target.sentence}`]
  if (lead?.details.kind === 'gauge') {
    const { verdict, sentence } = gaugeSuitability({ fullScale: toSI(lead.details.fullScale), target: target.readable })
    if (verdict === 'high-on-scale' || verdict === 'low-on-scale') sentences.push(`${target.percent} %: ${sentence}`)
  }
  const { stageLowerPercent, stageUpperPercent } = opened.protocol.content.limits
  const distance = (target.force * (stageLowerPercent + stageUpperPercent)) / 100
  if (U !== null && !gaugeCanTell({ U, distance })) {
    sentences.push(
      `${target.percent} %: this gauge cannot tell whether the stage is reached. Its uncertainty is over half of the tolerance. Fit a finer one.`,
    )
  }
  return sentences
}

/** Every stage with what to pump to, how surely it is known, and what to know about it. */
export function plannedStages(opened: Opened): PlannedStage[] {
  return opened.protocol.content.stages.flatMap(({ percent, holdSeconds }) => {
    const target = stageTarget(opened, percent)
    const lead = leadInstrument(opened)
    if (!target || !lead || lead.details.kind === 'indicator') return []
    const readings = opened.forceInstrumentIds.map((sourceId) => ({ sourceId, text: target.text, unit: lead.details.increment.unit }))
    const U = forceOf(opened, readings)?.U ?? null
    return [{ target, holdSeconds, U, warnings: warningsOf(opened, target, U) }]
  })
}

/**
 * From which movement at full load on an indicator can tell the protocol's permanent set: two of its increments are the
 * share that may stay. Null where no protocol, indicator or share is chosen.
 * Common practice, no source.
 */
export function tellsSetFrom(opened: Opened | null, instrumentId: string): string | null {
  const details = opened?.instruments.find((one) => one.id === instrumentId)?.details
  const share = (opened?.protocol.content.limits.setPercent ?? 0) / 100
  if (details?.kind !== 'indicator' || share === 0) return null
  const { unit } = details.increment
  const least = formatQuantity((2 * toSI(details.increment)) / share, unit, decimalsOfStep(toSI(details.increment), unit))
  return `Two of its increments are ${share * 100} % of ${least}. Where the point moves less than that at full load, it cannot tell the permanent set: fit a finer one.`
}

/** "G-02, glycerine gauge, 15 000 psi". */
export function instrumentLabel({ details }: FrozenInstrument): string {
  const end = details.kind === 'indicator' ? details.range : details.fullScale
  return [details.code, details.description, `${typedWords(end)} by ${typedWords(details.increment)}`].filter(Boolean).join(', ')
}
