import { useEffect, useId, useRef, useState, type ReactElement } from 'react'
import { Button } from '../../components/button'
import { Mark, type MarkName } from '../../components/marks'
import { Page, Section } from '../../components/page'
import { dateAndTime } from '../../lib/dates'
import { useUser } from '../../lib/here'
import { outbox, type OutboxSummary } from '../../lib/outbox'
import type { Waiting } from '../../lib/outbox-database'
import { useOutboxSummary } from '../../lib/use-unsent'
import { AttentionList } from './attention-list'
import { SentList, WaitingList } from './device-list'
import { Leaving } from './leaving'
import { StoragePart } from './storage-part'
import { saveToFile, useContents, useTakeIn } from './use-device'

interface Line {
  mark: MarkName
  says: string
}

function senderLine({ sender, unsent }: OutboxSummary): Line {
  if (sender.is === 'signed-out')
    return { mark: 'not-connected', says: 'The session has ended, so nothing is sent. Sign in again as the same person.' }
  if (sender.is === 'other-person')
    return { mark: 'wait', says: 'Somebody else is signed in, so the entries of the person before wait for that person.' }
  if (sender.is === 'refused') return { mark: 'wait', says: `The server does not take the entries: ${sender.says} It is tried again.` }
  if (sender.is === 'waiting' && unsent > 0)
    return { mark: 'not-connected', says: 'The server does not answer. They are sent by themselves when it does.' }
  if (sender.is === 'sending') return { mark: 'go-on', says: 'Sending.' }
  if (unsent === 0) return { mark: 'within', says: 'Everything entered here is on the server.' }
  return { mark: 'wait', says: 'They wait for the person who made them to sign in here.' }
}

const entriesWait = (count: number): string =>
  count === 1 ? 'One entry is on this tablet only' : `${count} entries are on this tablet only`

function State({ summary }: { summary: OutboxSummary }): ReactElement {
  const line = senderLine(summary)
  return (
    <div role="status" className="mb-6 flex items-start gap-4 border-2 border-ink bg-field px-4 py-3">
      <Mark name={line.mark} size={28} />
      <div className="min-w-0">
        {summary.unsent > 0 && <p className="text-18 font-semibold">{entriesWait(summary.unsent)}</p>}
        <p className={summary.unsent > 0 ? '' : 'text-18 font-semibold'}>{line.says}</p>
        {summary.backSince !== null && <p>The storage failed, and works again since {dateAndTime(summary.backSince)}.</p>}
      </div>
    </div>
  )
}

function Saved({ name }: { name: string | null }): ReactElement {
  return (
    <p aria-live="polite" className="mt-2 empty:hidden">
      {name !== null && `Saved as ${name}. The entries stay on this tablet as well: taken in twice, they are entered once.`}
    </p>
  )
}

/** What this browser holds: what waits, what was refused, what the server has, and the ways out when it is stranded. */
export function DevicePage({
  leaving,
  onSignOut,
  signOutFailed,
}: {
  leaving: boolean
  onSignOut: () => void
  signOutFailed: boolean
}): ReactElement {
  const me = useUser()
  const summary = useOutboxSummary()
  const contents = useContents()
  const [saved, setSaved] = useState<string | null>(null)
  const { taken, busy, take } = useTakeIn(me)
  const chooser = useRef<HTMLInputElement>(null)
  const chooserId = useId()
  useEffect(() => outbox.lookAgain(), [])
  const waiting = contents?.waiting ?? []
  const attention = contents?.attention ?? []
  const mine = waiting.filter(({ entry }) => entry.authorId === me.id)
  const others = new Map<string, Waiting[]>()
  for (const one of waiting) {
    if (one.entry.authorId !== me.id) others.set(one.entry.authorId, [...(others.get(one.entry.authorId) ?? []), one])
  }
  const stranded: readonly Waiting[] = [...mine, ...attention.filter(({ entry }) => entry.authorId === me.id)]
  const save = (author: { id: string; name: string | null }, entries: readonly Waiting[]): void => setSaved(saveToFile(author, entries))
  return (
    <Page
      title="On this device"
      actions={
        summary.unsent > 0 &&
        !leaving && (
          <Button kind="next" onClick={() => outbox.sendNow()}>
            Send now
          </Button>
        )
      }
    >
      {leaving && (
        <Leaving name={me.name} waiting={mine.length} onSave={() => save(me, stranded)} onSignOut={onSignOut} failed={signOutFailed} />
      )}
      {summary.fault !== null && (
        <div role="alert" className="mb-6 flex items-center gap-4 bg-stop px-4 py-3 text-18 font-semibold text-on-stop">
          <Mark name="stop" tone="plate" size={32} />
          <p>{summary.fault} It is tried again by itself.</p>
        </div>
      )}
      {summary.loaded && <State summary={summary} />}
      <div className="grid gap-x-12 gap-y-8 desktop:grid-cols-[minmax(0,1fr)_22rem]">
        <div className="grid min-w-0 content-start gap-8">
          {attention.length > 0 && (
            <Section title="Needs attention" note="the server said no">
              <AttentionList attention={attention} me={me.id} />
            </Section>
          )}
          {mine.length > 0 && (
            <Section title="Yours, not sent yet" note="in the order they are sent">
              <WaitingList waiting={mine} />
            </Section>
          )}
          {[...others].map(([authorId, entries]) => (
            <Section key={authorId} title="Of another person, not sent yet" note="sent when that person signs in here">
              <WaitingList waiting={entries} />
              <Button size="line" className="mt-3" onClick={() => save({ id: authorId, name: null }, entries)}>
                Save {entries.length === 1 ? 'it' : `these ${entries.length}`} to a file
              </Button>
            </Section>
          ))}
          <Section title="On the server" note="kept here for 90 days, to fill a gap">
            {contents && contents.sent.length === 0 && <p className="border-t border-hairline pt-2">Nothing was sent from here yet.</p>}
            <SentList sent={contents?.sent ?? []} />
          </Section>
        </div>
        <div className="grid content-start gap-8">
          <Section title="Carry them by file">
            <div className="border-t border-hairline pt-3">
              <p>
                Where no link comes back, save your entries to a file and take it in on any device where you sign in, also after the record
                is sealed.
              </p>
              <div className="mt-3 grid gap-3">
                <Button
                  disabled={stranded.length === 0}
                  note={stranded.length === 0 ? 'nothing of yours waits' : undefined}
                  onClick={() => save(me, stranded)}
                >
                  {stranded.length > 0
                    ? `Save ${stranded.length === 1 ? 'the one entry' : `the ${stranded.length} entries`} to a file`
                    : 'Save to a file'}
                </Button>
                <Button busy={busy && 'Reading the file'} onClick={() => chooser.current?.click()}>
                  Take in a file
                </Button>
                <label htmlFor={chooserId} className="sr-only">
                  File of entries
                </label>
                <input
                  id={chooserId}
                  ref={chooser}
                  type="file"
                  accept="application/json,.json"
                  className="sr-only"
                  tabIndex={-1}
                  onChange={(event) => {
                    const [file] = event.target.files ?? []
                    if (file) take(file)
                    event.target.value = ''
                  }}
                />
              </div>
              <Saved name={saved} />
              {taken && (
                <p role={taken.ok ? 'status' : 'alert'} className="mt-3 flex items-start gap-3 border-2 border-ink bg-field px-3 py-2">
                  <Mark name={taken.ok ? 'within' : 'wait'} size={22} />
                  <span className="min-w-0">{taken.says}</span>
                </p>
              )}
            </div>
          </Section>
          <StoragePart />
        </div>
      </div>
    </Page>
  )
}
