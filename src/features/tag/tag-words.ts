import type { PublicTag } from '#shared/api/tags'
import { SHORT_CAUTIONS } from '#shared/cautions'
import { typedWords } from '#shared/instruments/words'
import { clearedKilonewtons, HELD_BY, VOIDED_BY } from '#shared/press/clearance-words'
import { groupDigits, parseDecimal, unitLabel, type ForceUnit } from '#shared/units'
import { dateAndTime, longDate, shortDate } from '../../lib/dates'
import { asSentence } from '../../lib/words'

export type TagClearance = Extract<PublicTag['answer'], { is: 'cleared' }>['clearance']

const either = (words: readonly string[]): string =>
  words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} or ${words.at(-1)}`
const all = (words: readonly string[]): string =>
  words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`

/** What a ton is, where the load is told in one: the three are up to 12 % apart. */
const TON: Partial<Record<ForceUnit, string>> = {
  'short-ton': 'of 2\u202f000 lbf each',
  'long-ton': 'of 2\u202f240 lbf each',
  'metric-ton-force': 'of 1\u202f000 kgf each',
}

/** A paragraph of small print: what stands out first, then the rest of the sentence. */
export interface SmallPrint {
  lead: string
  rest: string
}

export interface TagWords {
  load: string
  unit: string
  /** What each unit is, and the same load in kN, never rounded up. */
  loadNote: string
  gaugeLabel: string
  gaugeLimit: string
  until: string
  smallPrint: SmallPrint[]
  clearedBy: string
  /** The number of the test behind it. */
  test: string
  changes: string
}

export const pressWords = ({ press }: PublicTag): string => [press.name, press.whatFor].filter(Boolean).join(', ')

const staticLoads = (count: number): string => (count === 1 ? 'one static load' : `${count} static loads`)

const where = ({ bedHoles, ramPositions }: TagClearance): string =>
  `Bed ${bedHoles.length === 1 ? 'hole' : 'holes'} ${all(bedHoles)}, ram ${all(ramPositions)}.`

/** How many members without an indicator are named on a small tag, on a large one, and on the page behind the code. */
const NAMED = { short: 3, ample: 14, all: Number.POSITIVE_INFINITY } as const
export type Room = keyof typeof NAMED

function notMeasured(names: readonly string[], room: Room): string {
  if (names.length === 0) return 'no member without an indicator was named.'
  const most = NAMED[room]
  if (names.length <= most + 1) return `${all(names)}.`
  return `${names.slice(0, most).join(', ')} and ${names.length - most} more: scan the code.`
}

/** What a clearance says on its tag, part by part. */
export function tagWords(clearance: TagClearance, noChangeSince: string | null, room: Room): TagWords {
  const { load, gaugePressure, gaugeCode, tooling, until } = clearance
  const parsed = parseDecimal(load.text)
  return {
    load: parsed.ok ? groupDigits(parsed.canonical) : load.text,
    // "tons-force" is one word: on the tag it never breaks at its hyphen.
    unit: unitLabel(load.unit, { plural: !(parsed.ok && parsed.value === 1) }).replace('-', '\u2011'),
    loadNote: [TON[load.unit], load.unit === 'kN' ? undefined : `${clearedKilonewtons(load)} in all`].filter(Boolean).join(', '),
    gaugeLabel: `${gaugePressure ? 'Gauge' : 'Load cell'} ${gaugeCode} not past`,
    gaugeLimit: typedWords(gaugePressure ?? load),
    until: longDate(until),
    smallPrint: [
      {
        lead: where(clearance),
        rest: clearance.bedHoles.length === 1 ? 'No other bed hole was tested.' : 'No other bed holes were tested.',
      },
      {
        lead: 'Tooling:',
        rest: tooling.length > 0 ? `${tooling.join(', ')}, or others rated for the load.` : 'any that is rated for the load.',
      },
      { lead: 'Not measured:', rest: notMeasured(clearance.notMeasured, room) },
      { lead: 'Void at once after', rest: `${either(VOIDED_BY)}.` },
      { lead: 'Not before its joints are examined again', rest: `after ${either(HELD_BY)}.` },
      { lead: '', rest: SHORT_CAUTIONS.join(' ') },
    ],
    clearedBy: `Cleared by ${clearance.clearedBy} on ${shortDate(clearance.clearedOn)} after ${staticLoads(clearance.staticLoads)}.`,
    test: clearance.number,
    changes:
      noChangeSince === null
        ? 'A change was reported since, and it is still cleared: ask the shop.'
        : `No change reported since ${shortDate(noChangeSince)}.`,
  }
}

/** Why a press may not be used, and since when, as far as it is known. */
export function shutWords(answer: Exclude<PublicTag['answer'], { is: 'cleared' }>): { why: string; since: string | null } {
  const since = answer.is === 'do not use' && answer.since !== null ? dateAndTime(answer.since) : null
  return { why: asSentence(answer.why), since }
}

/** The code as it is read out: four groups of four. */
export const spelled = (code: string): string => code.replace(/(.{4})(?=.)/g, '$1-')
