import type { Override } from '../ledger/envelope'
import type { Rule } from '../ledger/rules'
import type { Mark, Opened, ProofTestKind, ProofTestPayload } from './entries'
import type { ProofTestState } from './state'

/** What is asked of the rules: may this entry follow this state, by this person, at this moment? */
export interface ProofTestQuestion {
  state: ProofTestState
  kind: string
  payload: Record<string, unknown>
  overrides: readonly Override[]
  authorId: string
  mark: Mark
  /** How far the device's clock stood from the server's when it sent, in ms; undefined on the device itself. */
  clockOff?: number
  /** Hashes of photos and documents whose bytes the server does not have; undefined on the device, which cannot know. */
  absentFiles?: readonly string[]
}

export type ProofTestRule = Rule<ProofTestQuestion>

type Asked<K extends ProofTestKind> = { [Kind in K]: { kind: Kind; payload: ProofTestPayload<Kind> } }[K]
type Check<K extends ProofTestKind> = (asked: Asked<K>, state: ProofTestState, opened: Opened, question: ProofTestQuestion) => string | null

interface RuleOptions {
  severity?: 'refuse' | 'reason'
  interlock?: boolean
}

/** A rule about entries of some kinds, once the test is open. Refuses unless told to ask for a reason. */
export function rule<K extends ProofTestKind>(
  id: string,
  text: string,
  kinds: readonly K[],
  check: Check<K>,
  options: RuleOptions = {},
): ProofTestRule {
  const about = new Set<string>(kinds)
  return {
    id,
    text,
    severity: options.severity ?? 'refuse',
    interlock: options.interlock ?? false,
    check: (question) => {
      const { state } = question
      if (!about.has(question.kind) || !state.opened) return null
      return check({ kind: question.kind, payload: question.payload } as Asked<K>, state, state.opened, question)
    },
  }
}

/** Kinds that put load on, or go on with it. */
export const LOADING = ['seated', 'stage-begun'] as const
/** Kinds that belong to a press under load or on its way there. */
export const UNDER_LOAD = ['leg-begun', 'seated', 'datum-read', 'stage-begun', 'row-read', 'topped-up', 'resumed'] as const
/** Kinds whose payload is a row of readings. */
export const ROWS = ['seated', 'datum-read', 'row-read', 'topped-up', 'set-read'] as const
