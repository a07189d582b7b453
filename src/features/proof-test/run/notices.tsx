import { useEffect, useState, type ReactElement, type ReactNode } from 'react'
import { PROOF_TEST_ACTS } from '#shared/proof-test/entries'
import { Button, TextLink } from '../../../components/button'
import { Mark, type MarkName } from '../../../components/marks'
import { setPercent } from '../../../components/typeset'
import { clockTime } from '../../../lib/dates'
import { outbox } from '../../../lib/outbox'
import type { Refused } from '../../../lib/outbox-database'
import { readStorageState } from '../../../lib/storage-persistence'
import { paths } from '../../../paths'
import { outboxWords, type Device } from '../outbox-words'
import type { Run } from '../use-run'

function Notice({ mark, children, aside }: { mark: MarkName; children: ReactNode; aside?: ReactNode }): ReactElement {
  return (
    <div role="status" className="flex items-center gap-3 border-b-2 border-ink bg-field px-4 py-2 text-16 text-ink">
      <Mark name={mark} size={22} />
      <p className="min-w-0 flex-1">{children}</p>
      {aside}
    </div>
  )
}

const signInAgain = (
  <TextLink to={paths.signIn.href()} target="_blank">
    Sign in again
  </TextLink>
)

function sendingNotice(run: Run, device: Device): ReactElement | null {
  const kept = outboxWords(run, device)
  if (run.box.fault !== null && run.counts.tablet > 0) return <Notice mark="not-connected">{kept}</Notice>
  if (run.connection.signedOut) {
    return (
      <Notice mark="not-connected" aside={signInAgain}>
        Your session has ended, so nothing is sent. {kept}
      </Notice>
    )
  }
  const { sender } = run.box
  if (sender.is === 'other-person') {
    return (
      <Notice mark="not-connected" aside={signInAgain}>
        Somebody else is signed in on this browser now, so what you enter is not sent. {kept}
      </Notice>
    )
  }
  if (sender.is === 'refused') return <Notice mark="wait">The server does not take the entries: {sender.says} It is tried again.</Notice>
  if (!run.connection.connected) {
    const heard = run.connection.lastHeard ? ` Last heard ${clockTime(run.connection.lastHeard, { seconds: true })}.` : ''
    return (
      <Notice mark="not-connected">
        Not connected. The test goes on here. {kept}
        {heard}
      </Notice>
    )
  }
  return null
}

/** This device can't keep entries: only a stop and a release are taken in. */
export function FaultNotice({ run }: { run: Run }): ReactElement | null {
  if (run.box.fault === null) return null
  return (
    <div role="alert" className="flex items-center gap-3 bg-stop px-4 py-3 text-18 font-semibold text-on-stop">
      <Mark name="stop" tone="plate" size={32} />
      <p>{run.box.fault} It is tried again by itself.</p>
    </div>
  )
}

/** What stands in the way of keeping or sending, and what was refused: over the bench, never over Stop. */
export function Notices({ run, device }: { run: Run; device: Device }): ReactElement {
  const others = run.box.pending.some((entry) => entry.authorId !== run.me.id)
  return (
    <>
      <FaultNotice run={run} />
      {run.box.backSince !== null && (
        <Notice mark="within">
          Entries are kept again since {clockTime(run.box.backSince, { seconds: true })}. What was not taken in before: enter it now.
        </Notice>
      )}
      <StorageNotice run={run} device={device} />
      {sendingNotice(run, device)}
      {others && (
        <Notice mark="wait">Entries of another person wait on this {device}. They are sent when that person signs in here.</Notice>
      )}
      {run.refused.map((finding) => (
        <Notice
          key={finding.rule}
          mark="wait"
          aside={
            <Button size="line" onClick={run.leave}>
              Read
            </Button>
          }
        >
          {setPercent(finding.says)} Rule {finding.rule}.
        </Notice>
      ))}
      {run.attention.map((refused) => (
        <RefusedNotice key={refused.entry.id} refused={refused} device={device} />
      ))}
    </>
  )
}

/** An act that was refused was not done: it is read, and gone. A fact has happened: it stays until the server takes it. */
function RefusedNotice({ refused, device }: { refused: Refused; device: Device }): ReactElement {
  const { entry, problem } = refused
  const isAct = PROOF_TEST_ACTS.has(entry.kind)
  return (
    <Notice
      mark="wait"
      aside={
        isAct ? (
          <Button size="line" onClick={() => void outbox.dismiss(entry.ledgerId, entry.id)}>
            Read
          </Button>
        ) : (
          <Button size="line" onClick={() => void outbox.sendAgain(entry.id)}>
            Send again
          </Button>
        )
      }
    >
      The server refused what was entered at {clockTime(entry.observedAt)}: {problem.detail}
      {!isAct && ` It is kept on this ${device}, and counts here as entered.`}
    </Notice>
  )
}

/** Only where entries may have to wait long, and never while somebody stands beside a loaded press. */
function StorageNotice({ run, device }: { run: Run; device: Device }): ReactElement | null {
  const [mayClear, setMayClear] = useState(false)
  const stranded = !run.connection.connected && run.state.loaded === null && run.counts.tablet > 0
  useEffect(() => {
    let here = true
    if (stranded) void readStorageState().then(({ keeping }) => here && setMayClear(keeping === 'may-clear'))
    return () => {
      here = false
    }
  }, [stranded])
  if (!stranded || !mayClear) return null
  return (
    <Notice mark="undecided" aside={<TextLink to={paths.thisDevice.href()}>What to do</TextLink>}>
      The browser may clear what is not sent, should this {device} run short of room.
    </Notice>
  )
}
