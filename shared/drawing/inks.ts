import type { InkName } from '../chart/drawing'

/** Inked on white, for the printer: lines in ink, nothing that needs a coloured ground. */
export const PAPER_INKS: Record<InkName, string> = {
  dye: '#ffffff',
  scribe: '#0b1733',
  'faint-scribe': '#364459',
  ghost: '#8a97a6',
  chalk: '#f6de5a',
  stop: '#a00d17',
  'stop-line': '#960b15',
  'stop-text': '#960b15',
  'sound-line': '#085039',
  'on-stop': '#ffffff',
  'on-chalk': '#0b1733',
  'sound-fill': '#0f5c46',
  'tack-line': '#0b1733',
  'reject-line': '#960b15',
}
