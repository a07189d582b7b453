import type { ToolingKind } from '#shared/tooling'

/** What a piece is, as it is read in a list and chosen in a form. */
export const TOOLING_WORDS: Readonly<Record<ToolingKind, { name: string; note: string }>> = {
  adaptor: { name: 'Adaptor', note: 'between rod and nose' },
  nose: { name: 'Nose', note: 'on the rod, presses the work' },
  die: { name: 'Die', note: 'shapes or cuts the work' },
  'vee-block': { name: 'Vee-block', note: 'carries round work' },
  plate: { name: 'Plate', note: 'lies on the bed' },
  stack: { name: 'Stack', note: 'a solid dummy for tests' },
}
