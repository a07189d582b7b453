import type { PressWriting } from '../../api/append-to-press'

/** How a form of the press's page enters what it says. */
export type Sending = {
  send: (drafts: PressWriting[], answers: { onSuccess: () => void; onError: (error: unknown) => void }) => void
  busy: boolean
}

/** Joints that are chosen by their rows, or by tapping the drawing beside. */
export type Chosen = { chosen: readonly string[]; onToggle: (jointId: string) => void }
