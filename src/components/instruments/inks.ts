import type { InkName } from '#shared/chart/drawing'
import { PAPER_INKS } from '#shared/drawing/inks'

/** What a drawing lies on: dye, a form's steel, a balloon among words, or a printed sheet. */
export type Ground = 'dye' | 'steel' | 'words' | 'paper'

const NAMED: Record<InkName, string> = {
  dye: 'var(--dye)',
  scribe: 'var(--scribe)',
  'faint-scribe': 'var(--faint-scribe)',
  ghost: 'var(--ghost)',
  chalk: 'var(--chalk)',
  stop: 'var(--stop)',
  'stop-line': 'var(--stop-line)',
  'stop-text': 'var(--stop-text)',
  'sound-line': 'var(--sound-line)',
  'on-stop': 'var(--on-stop)',
  'on-chalk': 'var(--on-chalk)',
  'sound-fill': 'var(--sound-fill)',
  'tack-line': 'var(--chalk)',
  'reject-line': 'var(--stop-line)',
}

/** On steel the same drawing is inked: chalk has too little contrast there to be a line. */
const INKED: Record<InkName, string> = {
  ...NAMED,
  dye: 'var(--sheet)',
  scribe: 'var(--ink)',
  'faint-scribe': 'var(--graphite)',
  ghost: 'var(--hairline)',
  'sound-line': 'var(--sound)',
  'tack-line': 'var(--ink)',
  'reject-line': 'var(--stop-ink)',
}

const GROUNDS: Record<Ground, Record<InkName, string>> = {
  dye: NAMED,
  steel: INKED,
  words: { ...INKED, dye: 'none' },
  paper: PAPER_INKS,
}

export const inkOn = (ground: Ground, ink: InkName | null): string => (ink === null ? 'none' : GROUNDS[ground][ink])
