import { useEffect, useRef, type ReactElement } from 'react'
import { useQueryClient } from '@tanstack/react-query'
import type { Opened } from '#shared/proof-test/entries'
import { Mark } from '../../../components/marks'
import { ActionPlate } from '../../../components/run/plates'
import { clockTime } from '../../../lib/dates'
import { outbox } from '../../../lib/outbox'
import { entriesKey } from '../api/get-entries'
import { outboxWords } from '../outbox-words'
import { Into } from '../run/slots'
import type { Run } from '../use-run'
import { whereItIs } from './attend-model'

const WORDS: Record<string, string> = {
  stopped: 'Your stop',
  paused: 'Your pause',
  'independent-read': 'Your reading',
  'load-path-confirmed': 'Your confirmation',
}

/** Nothing stale is shown: the voice has to do until the phone is back. */
export function Unconnected({ run, opened }: { run: Run; opened: Opened }): ReactElement {
  const client = useQueryClient()
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => heading.current?.focus(), [])
  const mine = run.box.pending.filter((entry) => entry.authorId === run.me.id)
  const tryNow = (): void => {
    outbox.sendNow()
    void client.invalidateQueries({ queryKey: entriesKey(run.testId) })
  }
  return (
    <>
      <Into slot="over">
        <section role="alert" className="bg-stop px-4 pt-5 pb-6 text-on-stop">
          <div className="flex items-center gap-4">
            <Mark name="stop" tone="plate" size={84} />
            <h1 ref={heading} tabIndex={-1} className="text-34 leading-[38px] font-bold">
              Not connected: shout stop
            </h1>
          </div>
          <p className="mt-4 text-18">Nobody is told from this phone now. If anything cracks, moves or leaks, shout “stop” to the press.</p>
        </section>
        <section className="ground-dye px-4 py-5">
          <div className="flex items-center gap-4 border-b border-ghost pb-4">
            <Mark name="not-connected" tone="dye" size={36} />
            <div>
              <p className="text-20 font-semibold">
                {run.connection.lastHeard ? `Last heard ${clockTime(run.connection.lastHeard, { seconds: true })}` : 'Not heard yet'}
              </p>
              <p className="text-16 text-faint-scribe">{whereItIs(run, opened)}, then</p>
            </div>
          </div>
          <p className="pt-3 text-16">Timer and ladder are not shown, since they may be wrong. The tablet keeps the hold.</p>
        </section>
      </Into>
      <Into slot="bench">
        {mine.length > 0 && (
          <>
            <h2 className="text-20">
              {mine.length === 1 ? `${WORDS[mine[0]?.kind ?? ''] ?? 'Your entry'} waits here` : `${mine.length} of your entries wait here`}
            </h2>
            <ul className="mt-2 border-t border-hairline">
              {mine.map((entry) => (
                <li key={entry.id} className="flex items-center gap-3 border-b border-hairline py-3 text-18">
                  <Mark name="not-read" size={20} />
                  <span className="flex-1 font-semibold">{waitingWords(entry.kind, entry.payload)}</span>
                  <span className="text-graphite">not sent</span>
                </li>
              ))}
            </ul>
          </>
        )}
        <p className="mt-2 text-16 text-graphite">
          {outboxWords(run, 'phone')} {mine.length > 0 && 'The lead does not see it before.'}
        </p>
      </Into>
      <Into slot="action">
        <ActionPlate title="Try to connect now" onPress={tryNow} />
      </Into>
    </>
  )
}

function waitingWords(kind: string, payload: Record<string, unknown>): string {
  const { readings } = payload
  if (kind === 'independent-read' && Array.isArray(readings)) {
    return (readings as { text: string; unit: string }[]).map((reading) => `${reading.text} ${reading.unit}`).join(', ')
  }
  return WORDS[kind] ?? 'Your entry'
}
