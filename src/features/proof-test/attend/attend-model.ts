import { currentAttempt } from '#shared/proof-test/current-attempt'
import type { Opened } from '#shared/proof-test/entries'
import { witnessReads } from '#shared/proof-test/protocol'
import type { Run } from '../use-run'

/** Until the witness's own reading is in at full load, nothing is shown that it could be copied from. */
export function keptFromWitness(run: Run): boolean {
  const current = currentAttempt(run.state)
  if (run.me.part !== 'witness' || !run.state.loaded || run.state.stopped || !current) return false
  return witnessReads(current.stage.percent, current.place.climb) && current.attempt.independent === null
}

/** Where the run is, in one line: "Stage 4 of 4, in hold". */
export function whereItIs(run: Run, opened: Opened): string {
  const { step, state } = run
  if (state.stopped) return state.loaded ? 'Stopped, still loaded' : 'Stopped, load off'
  if (state.loaded && state.paused) return 'Paused under load'
  const words: Partial<Record<typeof step.name, string>> = {
    'walk-down': 'Walk-down',
    'set-up': 'Set-up',
    'begin-leg': 'Leg to begin',
    seating: 'Seating load goes on',
    'seating-release': 'Seating load comes off',
    datum: 'Datum to read',
    'datum-watch': 'Datum watched for drift',
    release: 'Full load held, to release',
    recovery: 'Load off, recovery',
    'after-walk-down': 'Walk-down after load',
    conclude: 'To conclude',
    sign: 'Concluded, to sign',
    countersign: 'Signed, to countersign',
    sealed: 'Sealed',
  }
  const plain = words[step.name]
  if (plain) return plain
  if (!('at' in step)) return ''
  const doing: Partial<Record<typeof step.name, string>> = {
    'begin-stage': 'next',
    'read-row': 'pumping, or being read',
    hold: 'in hold',
    wait: 'wait',
    'stop-now': 'stop',
    independent: 'your reading',
    decide: 'to decide',
  }
  return `Stage ${step.at.stage + 1} of ${opened.protocol.content.stages.length}, ${doing[step.name] ?? ''}`
}

/** What is so and what the witness does, in the words of the step. */
export function whatToDo(run: Run): { title: string; body: string } {
  const { step, state } = run
  if (state.stopped && state.loaded)
    return { title: 'Stop', body: 'The release valve is opened slowly, now. Stay behind the shield until the gauge reads zero.' }
  if (state.stopped && step.name === 'conclude')
    return { title: 'Stopped', body: `${state.stopped.why}. The load is off; the lead concludes the test.` }
  switch (step.name) {
    case 'walk-down':
      return {
        title: 'Walk the load path together.',
        body: 'Follow the force from the ram round the frame to the bed. Every place where two parts hold together must be on the list.',
      }
    case 'after-walk-down':
      return { title: 'Look again, together.', body: 'The load is off. Every joint is examined once more.' }
    case 'wait':
      return { title: 'Wait', body: 'A reading lies outside. The lead reads the row again. Stay behind the shield.' }
    case 'decide':
      return { title: 'The stage is held.', body: 'Every limit that was checked is kept. The lead decides: go on, wait or stop.' }
    case 'hold':
    case 'read-row':
      return {
        title: 'Look and listen.',
        body: 'If anything cracks, moves or leaks: Stop. Stay behind the shield, out of line with pins, ram and tooling.',
      }
    case 'sign':
      return { title: 'The lead signs next.', body: 'Then you countersign the record, or decline with a reason.' }
    case 'countersign':
      return { title: 'The record waits for you.', body: 'Read it, then countersign it with your password, or decline with a reason.' }
    case 'sealed':
      return { title: 'Sealed', body: 'Both have signed. Nothing is added to this record any more.' }
    default:
      return {
        title: 'Stay behind the shield.',
        body: 'Nobody stands in line with pins, ram or tooling. If anything is not as agreed: Stop.',
      }
  }
}
