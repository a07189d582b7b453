import type { ProtocolContent } from './protocol'
import { toSI } from '../units'

const NO_BREAK = '\u00a0'

/** A number of seconds as it is said: "45 s", "1 min", "2 min 30 s". */
export function secondsWords(seconds: number): string {
  const [minutes, rest] = [Math.floor(seconds / 60), seconds % 60]
  const parts = [minutes > 0 ? `${minutes}${NO_BREAK}min` : '', rest > 0 || minutes === 0 ? `${rest}${NO_BREAK}s` : '']
  return parts.filter((part) => part !== '').join(' ')
}

export const COMMON_PRACTICE = 'common practice, no source'
const OWN = 'set by this shop'
const SHOP_PRESS_STANDARD = 'ASME ASP-2010 3-4.1.1, as described'
const JACK_RULE = '29 CFR 1910.244(a)(2)(vi) asks it of jacks used at one place'

/** What the shipped protocols hold for the limits, in percent, and for times in seconds. */
const COMMON = {
  seatingPercent: 5,
  datumWatchSeconds: 120,
  recoverySeconds: 120,
  repeatHoldSeconds: 60,
  predictionAllowancePercent: 5,
  frictionPercent: 5,
  marginDivisor: 1,
  stageLowerPercent: 2,
  stageUpperPercent: 5,
  pressureLossPercent: 5,
  creepPercent: 2,
  softeningPercent: 15,
  setPercent: 5,
} as const
type CommonKey = keyof typeof COMMON

/** Where a value of a protocol comes from: the trade, a standard, or the shop itself. */
export function valueSource(key: CommonKey, value: number): string {
  return value === COMMON[key] ? COMMON_PRACTICE : OWN
}

/** The same for the longest set that is allowed: ASP-2010 as described gives 3.18 mm (an eighth of an inch is 3.175). */
export function mostSetSource(mostSet: ProtocolContent['limits']['mostSet']): string {
  if (mostSet === null) return 'the percentage alone holds'
  return Math.abs(toSI(mostSet) - 0.00318) < 1e-9 ? SHOP_PRESS_STANDARD : OWN
}

/** The same for how long a clearance lasts until the next examination. */
export function examinationSource(months: number): string {
  return months === 6 ? JACK_RULE : OWN
}
