import type { PressState } from '#shared/press/state'
import type { Letter } from './letter'
import { dayInWords, loadInWords } from './words'

type Cleared = Extract<PressState['clearance'], { is: 'cleared' }>['clearance']

const page = (pressId: string) => ({ go: 'Open the press’s page', to: `/presses/${pressId}` })
const why = 'It came to you because you own the shop or lead tests there.'

/** A clearance given, or one that holds again. */
export function clearanceGiven(pressId: string, pressName: string, clearance: Cleared): Letter {
  const load = loadInWords(clearance.load)
  return {
    subject: `${pressName}: cleared up to ${load}`,
    blocks: [
      {
        say: `${pressName} is cleared up to ${load}, by ${clearance.clearedBy} on ${dayInWords(clearance.clearedOn)}, after ${clearance.number}. It holds until ${dayInWords(clearance.until)} at the latest, and only under these conditions:`,
      },
      ...(clearance.conditions ?? []).map((condition) => ({ say: `• ${condition}` })),
      ...(clearance.notMeasured.length > 0 ? [{ say: `Not measured in that test: ${clearance.notMeasured.join(', ')}.` }] : []),
      page(pressId),
    ],
    why,
  }
}

/** A clearance that was withdrawn or is suspended, or a press that a test showed must not be loaded. */
export function clearanceEnded(pressId: string, pressName: string, state: PressState): Letter | null {
  const { clearance } = state
  if (clearance.is !== 'withdrawn' && clearance.is !== 'suspended') return null
  const had = clearance.is === 'withdrawn' ? clearance.last !== null : clearance.clearance !== null
  const word = clearance.is === 'withdrawn' ? 'withdrawn' : 'suspended'
  return {
    subject: had ? `${pressName}: clearance ${word}` : `${pressName}: do not use`,
    blocks: [
      { say: `Do not use ${pressName}. ${had ? `Its clearance was ${word}: ` : ''}${clearance.why}` },
      { say: 'If a tag hangs on the press, take it off. The press’s page says what has to be done before it is loaded again.' },
      page(pressId),
    ],
    why,
  }
}
