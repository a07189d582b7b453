import { useState, type ReactElement } from 'react'
import { Button } from '../../components/button'
import { Mark } from '../../components/marks'
import { outbox } from '../../lib/outbox'

interface LeavingProps {
  name: string
  /** Entries of this person that the server has not. */
  waiting: number
  onSave: () => void
  onSignOut: () => void
  /** The server was not reached to end the session. */
  failed: boolean
}

const counted = (count: number): string => (count === 1 ? 'One of your entries is' : `${count} of your entries are`)

/** Somebody signs out while entries wait: says how many, and what can be done with them. */
export function Leaving({ name, waiting, onSave, onSignOut, failed }: LeavingProps): ReactElement {
  const [sending, setSending] = useState(false)
  const send = (): void => {
    setSending(true)
    outbox.sendNow()
  }
  const it = waiting === 1 ? 'it' : 'them'
  return (
    <section className="mb-8 border-2 border-ink bg-field px-4 py-4 tablet:px-6" aria-labelledby="leaving">
      <div className="flex items-start gap-4">
        <Mark name={waiting === 0 ? 'within' : 'wait'} size={28} />
        <div className="min-w-0">
          <h2 id="leaving" className="text-22">
            {waiting === 0 ? 'All of your entries are on the server' : `${counted(waiting)} on this tablet only`}
          </h2>
          <p className="mt-1">
            {waiting === 0
              ? 'Nothing of yours waits here.'
              : `Signing out keeps ${it} here, and only ${name} can have ${it} sent, from this browser or from a file.`}
          </p>
        </div>
      </div>
      <p role="status" className="mt-2 empty:hidden">
        {failed && 'Still signed in: the server was not reached. Try again when the link is back.'}
        {sending && waiting > 0 && !failed && 'Sending. It goes on by itself when the link is back; this says so when all are there.'}
      </p>
      <div className="mt-4 flex flex-wrap gap-3 max-tablet:flex-col">
        {waiting === 0 ? (
          <Button kind="next" onClick={onSignOut}>
            Sign out
          </Button>
        ) : (
          <>
            <Button kind="next" onClick={send}>
              Wait and send
            </Button>
            <Button onClick={onSave}>Save to a file</Button>
            <Button onClick={onSignOut}>Sign out, and keep {it} here</Button>
          </>
        )}
      </div>
    </section>
  )
}
