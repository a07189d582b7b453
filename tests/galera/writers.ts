import { nextStep, type Step } from '#shared/proof-test/steps'
import type { AppendResponse } from '#shared/api/ledger'
import type { EntryDraft } from '#shared/ledger/envelope'
import { Device, post, type ApiRun } from '../factories/api-run'
import type { Tally } from '../faults/tally'

const note = (text: string) => ({ kind: 'observed', payload: { at: null, what: 'noise', note: text } }) as const

/** Sends one entry until a server answers for it, and counts it as promised. */
async function keep(run: ApiRun, tally: Tally, device: Device, draft: EntryDraft): Promise<AppendResponse['results'][number]> {
  const { results } = await post(device.person, run.path, [draft])
  const [result] = results
  if (result?.outcome !== 'kept') throw new Error(`${draft.kind}: ${result?.outcome === 'refused' ? result.problem.detail : 'no result'}`)
  tally.acknowledged(result.id)
  return result
}

/** The run goes on, a step at a time, until the test asks for `until`; every entry of it must be within the rules. */
export async function driveTo(run: ApiRun, tally: Tally, until: Step['name']): Promise<void> {
  for (;;) {
    const step = nextStep(run.state)
    if (step.name === until) return
    const drafts = run.draftsFor(step)
    if (drafts.length === 0) throw new Error(`The test waits at ${step.name}, not at ${until}.`)
    for (const [device, draft] of drafts) {
      const result = await keep(run, tally, device, device.draft(draft))
      if (result.outcome === 'kept' && result.entry.irregular.length > 0) {
        throw new Error(`${draft.kind} is marked ${result.entry.irregular.join(', ')}.`)
      }
    }
    await run.refresh()
  }
}

/** Two people who write notes from two more devices, one after the other as fast as they are answered. */
export class NoteWriters {
  private going = true
  private readonly writing: Promise<unknown>
  /** How long anybody has waited for an answer (ms). */
  longestWait = 0
  written = 0

  constructor(
    private readonly run: ApiRun,
    private readonly tally: Tally,
  ) {
    const { lead, witness } = run.staff
    this.writing = Promise.all([this.write(new Device(lead, run.id), 'lead'), this.write(new Device(witness, run.id), 'witness')])
    // It is waited for in `end`; until then a failure is not "unhandled".
    this.writing.catch(() => undefined)
  }

  private async write(device: Device, who: string): Promise<void> {
    for (let index = 1; this.going; index += 1) {
      const begun = performance.now()
      await keep(this.run, this.tally, device, device.draft(note(`Note ${index} of the ${who}.`)))
      this.longestWait = Math.max(this.longestWait, performance.now() - begun)
      this.written += 1
    }
  }

  async end(): Promise<void> {
    this.going = false
    await this.writing
  }
}
