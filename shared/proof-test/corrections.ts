import type { Correction, ProofTestState, Row } from './state'

/** "a", "b" … "z", "aa": how corrections are told apart on a record, by their place among all of the test, from 0. */
export function correctionLetter(index: number): string {
  const rest = Math.floor(index / 26)
  return (rest > 0 ? correctionLetter(rest - 1) : '') + String.fromCharCode(97 + (index % 26))
}

/** A correction with the letter it bears on the record. */
export interface LetteredCorrection {
  letter: string
  correction: Correction
}

/** The corrections of the readings of these rows, each row given by its entry's id, in the order they were made. */
export function correctionsOf({ corrections }: Pick<ProofTestState, 'corrections'>, entryIds: readonly string[]): LetteredCorrection[] {
  return corrections.flatMap((correction, index) =>
    entryIds.includes(correction.correctsEntryId) ? [{ letter: correctionLetter(index), correction }] : [],
  )
}

/** Their letters, "a b"; empty where nothing was corrected. */
export function correctionLetters(state: Pick<ProofTestState, 'corrections'>, entryIds: readonly string[]): string {
  return correctionsOf(state, entryIds)
    .map(({ letter }) => letter)
    .join(' ')
}

/** DOMAIN §4: only what lead and witness read again at that load, before release, may lift a "wait" or a "stop". */
const mayLift = ({ readAgainByBoth, atItsLoad }: Correction): boolean => readAgainByBoth && atItsLoad

/**
 * The test without the corrections that may not lift anything, as its readings were before them; null when there are
 * none of these. What is beyond a limit here stays so, whatever they say.
 */
export function withoutLifting(state: ProofTestState): ProofTestState | null {
  if (state.corrections.every(mayLift)) return null
  const counting = state.corrections.filter(mayLift)
  const undo = <R extends Row>(row: R): R => {
    const own = counting.filter(({ correctsEntryId }) => correctsEntryId === row.entryId)
    return { ...row, readings: row.typed.map((typed) => own.findLast(({ sourceId }) => sourceId === typed.sourceId)?.to ?? typed) }
  }
  return {
    ...state,
    corrections: counting,
    legs: state.legs.map((leg) => ({
      ...leg,
      climbs: leg.climbs.map((climb) => ({
        ...climb,
        datum: climb.datum.map(undo),
        set: climb.set.map(undo),
        stages: climb.stages.map((stage) => ({
          ...stage,
          attempts: stage.attempts.map((attempt) => ({ ...attempt, rows: attempt.rows.map(undo) })),
        })),
      })),
    })),
  }
}
