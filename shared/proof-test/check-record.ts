import { anyFigures, demandWords, usedWords } from '../structure/check-words'
import type { Opened } from './entries'
import { checkOf } from './expected'

/** What a record says of the load path check that its test was opened by. */

/** The weakest of the check in one line, and how much of the load path had no figures. An estimate, never an approval. */
export function checkText(opened: Pick<Opened, 'press' | 'joints' | 'protocol' | 'forceUnit'>): string {
  const check = checkOf(opened)
  const { weakest, notChecked } = check
  if (!weakest || !anyFigures(check)) return 'Load path NOT CHECKED: no sections were entered'
  const left = notChecked === 0 ? '' : `; NOT CHECKED: ${notChecked}`
  return `Estimate, weakest: ${weakest.name}, ${weakest.check}, ${weakest.verdict} ${usedWords(weakest)}, ${demandWords(weakest, opened.forceUnit)}${left}`
}

/** The document that stands against a check over 100 %: "P. Lindqvist, calculation 26-118, of 2026-09-01". */
export function engineerText({ name, document, on }: NonNullable<Opened['engineer']>): string {
  return `${name}, ${document}, of ${on}`
}
