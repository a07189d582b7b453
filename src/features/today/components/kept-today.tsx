import { useEffect, useState, useSyncExternalStore } from 'react'
import { Mark } from '../../../components/marks'
import { classNames } from '../../../lib/class-names'
import { ledgerCache, type KeptLedger } from '../../../lib/ledger-cache'
import { outbox } from '../../../lib/outbox'
import { useTitle } from '../../../lib/use-title'
import { underWayHere } from '../kept-tests'
import { underWayWords } from '../today-words'
import { UnderWayPlate } from './under-way-plate'

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
  return kept?.flatMap((one) => underWayHere(one, outbox.ledger(one.ledgerId).pending, userId) ?? [])
}

function unsentWords(count: number): string {
  if (count === 0) return 'Everything that was entered on this device is on the server.'
  return `${count === 1 ? 'One entry is' : `${count} entries are`} on this device, sent when there is a link.`
}

/** Today without a network: the tests that go on here, and that nothing else is shown because it would be old. */
export function KeptToday({ userId, onAgain }: { userId: string; onAgain: () => void }) {
  useTitle('Today')
  const tests = useTestsHere(userId)
  const { unsent } = useSyncExternalStore(outbox.subscribe, outbox.summary)
  const none = tests?.length === 0
  return (
    <div className="flex grow flex-col">
      <h1 className="sr-only">Today</h1>
      {!none && <UnderWayPlate tests={tests?.map((one) => underWayWords(one, userId, new Date()))} next={undefined} firstPress={false} />}
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
