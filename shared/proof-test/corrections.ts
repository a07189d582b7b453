import type { Correction, ProofTestState } from './state'

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
