/** The pages of help, in the order of the list; each is the last part of its address. */
export const HELP_TOPICS = [
  'ram-force',
  'gauge',
  'uncertainty',
  'deflection',
  'line',
  'softening',
  'hold',
  'permanent-set',
  'decision-rule',
  'load-path',
  'stored-energy',
  'clearance',
  'units',
] as const

export type HelpTopic = (typeof HELP_TOPICS)[number]
