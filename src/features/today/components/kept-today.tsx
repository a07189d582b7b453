import { useEffect, useState, useSyncExternalStore } from 'react'
import { ButtonLink } from '../../../components/button'
import { Mark } from '../../../components/marks'
import { classNames } from '../../../lib/class-names'
import { clockTime } from '../../../lib/dates'
import { ledgerCache, type KeptLedger } from '../../../lib/ledger-cache'
import { outbox } from '../../../lib/outbox'
import { useTitle } from '../../../lib/use-title'
import { underWayHere } from '../kept-tests'
import { underWayWords } from '../today-words'
import { UnderWayPlate, type UnderWay } from './under-way-plate'

/** The tests kept on this device in which a person has a part, with what waits here; undefined until they have been read. */
function useTestsHere(userId: string) {
  const [kept, setKept] = useState<readonly KeptLedger[]>()
  // What waits is read from the disk a little later, and folded in then.
  useSyncExternalStore(outbox.subscribe, () => kept?.map(({ ledgerId }) => outbox.ledger(ledgerId).pending.length).join() ?? '')
  useEffect(() => {
    let left = false
    void ledgerCache.readAll(new Date()).then((ledgers) => left || setKept(ledgers))
    return () => {
      left = true
    }
  }, [])
  return kept?.flatMap((one) => {
    const here = underWayHere(one, outbox.ledger(one.ledgerId).pending, userId)
    return here ? [{ here, heardAt: one.heardAt }] : []
  })
}

function unsentWords(count: number): string {
  if (count === 0) return 'Everything that was entered on this device is on the server.'
  return `${count === 1 ? 'One entry is' : `${count} entries are`} on this device, sent when there is a link.`
}

/** A test that goes on elsewhere: how far it has come since is not known here, so nothing of it is shown. */
function Elsewhere({ words, heardAt }: { words: UnderWay; heardAt: string }) {
  return (
    <article className="ground-dye flex flex-wrap items-center justify-between gap-x-8 gap-y-3 border-b border-ghost px-4 py-4 tablet:px-6">
      <div className="min-w-0">
        <h2 className="text-22 tablet:text-26">{words.press}</h2>
        <p className="mt-1 text-faint-scribe tablet:text-18">
          {words.test}. Last heard {clockTime(heardAt)}; where it stands now, and whether it is loaded, is not known here.
        </p>
      </div>
      <ButtonLink kind="scribed" to={words.action.to} className="max-tablet:w-full">
        {words.action.label}
      </ButtonLink>
    </article>
  )
}

/** Today without a network: the tests that go on here, and that nothing else is shown because it would be old. */
export function KeptToday({ userId, onAgain }: { userId: string; onAgain: () => void }) {
  useTitle('Today')
  const tests = useTestsHere(userId)
  const { unsent } = useSyncExternalStore(outbox.subscribe, outbox.summary)
  const none = tests?.length === 0
  const now = new Date()
  const runHere = tests?.filter(({ here }) => here.test.witnessId !== userId)
  const elsewhere = tests?.filter(({ here }) => here.test.witnessId === userId) ?? []
  return (
    <div className="flex grow flex-col">
      <h1 className="sr-only">Today</h1>
      {runHere?.length !== 0 && (
        <UnderWayPlate tests={runHere?.map(({ here }) => underWayWords(here, userId, now))} next={undefined} firstPress={false} />
      )}
      {elsewhere.map(({ here, heardAt }) => (
        <Elsewhere key={here.test.id} words={underWayWords(here, userId, now)} heardAt={heardAt} />
      ))}
      <section className={classNames('ground-steel grow px-4 py-4 tablet:px-6', none && 'border-t-2 border-ink')}>
        <div className="flex items-start gap-4">
          <span className="mt-1">
            <Mark name="not-connected" size={28} />
          </span>
          <div className="max-w-2xl min-w-0">
            <h2 className="text-22 tablet:text-26">Not connected to the server</h2>
            <p role="status" className="mt-2 text-18">
              {none
                ? 'No test of yours was opened on this device, so none can go on here.'
                : runHere?.length === 0
                  ? 'If a press is under load near you and anything cracks, moves or leaks: shout “stop”.'
                  : 'A test above goes on here without a network, up to its conclusion.'}{' '}
              {unsentWords(unsent)}
            </p>
            <p className="mt-2 text-18 text-graphite">
              Which press may be used is not shown: it would be old. This page fills by itself when the link is back.
            </p>
            <button type="button" onClick={onAgain} className="mt-4 min-h-14 text-18 font-semibold underline underline-offset-[3px]">
              Try to connect now
            </button>
          </div>
        </div>
      </section>
    </div>
  )
}
