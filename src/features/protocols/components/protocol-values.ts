import type { ProtocolContent } from '#shared/proof-test/protocol'
import { COMMON_PRACTICE, examinationSource, mostSetSource, secondsWords, valueSource } from '#shared/proof-test/protocol-words'
import { typedWords } from '#shared/instruments/words'

/** One value of a protocol: its name, what it is, and where it comes from. */
export type ProtocolValue = readonly [name: string, value: string, source: string]

const percent = (value: number) => `${value}\u202f%`

/** The stage whose percentage is no part of the protocol. */
export function lastStageWords({ holdSeconds }: { holdSeconds: number }): string {
  return `a last stage above rating, held ${secondsWords(holdSeconds)}, percentage asked when a test is planned`
}

export const DECISION_WORDS: Record<ProtocolContent['decisionRule'], string> = {
  simple: 'simple acceptance',
  'guard-band': 'a guard band of U',
}

/** What stops a climb, or makes it wait. */
export function stoppingLimits({ limits }: ProtocolContent): ProtocolValue[] {
  const { stageLowerPercent, stageUpperPercent, pressureLossPercent, creepPercent, softeningPercent, setPercent, mostSet } = limits
  return [
    [
      'Stage reached within',
      `−${percent(stageLowerPercent)} to +${percent(stageUpperPercent)}`,
      both(valueSource('stageLowerPercent', stageLowerPercent), valueSource('stageUpperPercent', stageUpperPercent)),
    ],
    ['Pressure loss in a hold, at most', percent(pressureLossPercent), valueSource('pressureLossPercent', pressureLossPercent)],
    ['Creep in a hold, of the deflection', `${percent(creepPercent)} or two steps`, valueSource('creepPercent', creepPercent)],
    ['Softening, at most', percent(softeningPercent), valueSource('softeningPercent', softeningPercent)],
    ['Permanent set, of full deflection', `${percent(setPercent)} or two steps`, valueSource('setPercent', setPercent)],
    ['Permanent set, never more than', mostSet === null ? 'none' : typedWords(mostSet), mostSetSource(mostSet)],
  ]
}

const both = (a: string, b: string) => (a === b ? a : `${a}; ${b}`)

/** Times and steps beside the stages. */
export function timesAndSteps(content: ProtocolContent): ProtocolValue[] {
  const { seatingPercent, datumWatchSeconds, recoverySeconds, repeatClimb, repeatHoldSeconds } = content
  return [
    ['Seating load', percent(seatingPercent), valueSource('seatingPercent', seatingPercent)],
    ['Datum watched for drift', secondsWords(datumWatchSeconds), valueSource('datumWatchSeconds', datumWatchSeconds)],
    ['Recovery before the set is read', secondsWords(recoverySeconds), valueSource('recoverySeconds', recoverySeconds)],
    ['Repeat climb', repeatClimb, repeatClimb === 'when the set can be seen' ? COMMON_PRACTICE : 'set by this shop'],
    ['Hold of the repeat climb', secondsWords(repeatHoldSeconds), valueSource('repeatHoldSeconds', repeatHoldSeconds)],
  ]
}

/** How the figures are judged and how long a clearance lasts. */
export function judging(content: ProtocolContent): ProtocolValue[] {
  const { decisionRule, predictionAllowancePercent, frictionPercent, marginDivisor, examinationMonths } = content
  return [
    ['Decided by', DECISION_WORDS[decisionRule], 'JCGM 106, ILAC-G8'],
    ['Prediction widened by', percent(predictionAllowancePercent), valueSource('predictionAllowancePercent', predictionAllowancePercent)],
    ['Seal friction allowed for', `0 to ${percent(frictionPercent)}`, valueSource('frictionPercent', frictionPercent)],
    ['Clearance is the proven load divided by', String(marginDivisor), valueSource('marginDivisor', marginDivisor)],
    ['Examined again within', examinationMonths === 1 ? '1 month' : `${examinationMonths} months`, examinationSource(examinationMonths)],
  ]
}
