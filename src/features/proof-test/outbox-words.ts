import type { Run } from './use-run'

/** What somebody holds in the hand: the run is led on a tablet, and attended on a phone. */
export type Device = 'tablet' | 'phone'

const isStop = ({ kind, payload }: Run['box']['pending'][number]): boolean =>
  kind === 'stopped' || (kind === 'decided' && payload['decision'] === 'stop')

/** What becomes of entries that are not on the server, said alike on the run and to the witness. */
export function outboxWords({ box, counts }: Pick<Run, 'box' | 'counts'>, device: Device): string {
  const waiting = counts.tablet
  if (box.fault !== null && waiting > 0) {
    return 'The stop is not on the server yet. It stands on this page only: leave it open. Say it aloud.'
  }
  if (waiting === 0) return `What is entered now waits on this ${device} and is sent when there is a link.`
  const aloud = box.pending.some(isStop) ? 'The stop has reached no other device: say it aloud. ' : ''
  return `${aloud}${waiting === 1 ? 'One entry waits' : `${waiting} entries wait`} on this ${device}, sent when there is a link.`
}
