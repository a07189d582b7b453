import { lazy, Suspense } from 'react'
import { SkeletonPage } from '../components/skeleton'
import { useToday } from '../features/today/api/get-today'
import { TodayView } from '../features/today/components/today-view'
import { needWords } from '../features/today/need-words'
import { eventsOf, pressWords, underWayWords } from '../features/today/today-words'
import { calendarDate } from '../lib/dates'
import { useCan, useShop, useUser } from '../lib/here'
import { Disconnected } from '../lib/problem'
import { useKeptOnDevice } from '../lib/use-kept-on-device'
import { paths } from '../paths'

// Only asked for without a network, and then from this device.
const KeptToday = lazy(async () => ({ default: (await import('../features/today/components/kept-today')).KeptToday }))

export function Component() {
  const shop = useShop()
  const user = useUser()
  const can = useCan()
  const now = new Date()
  const day = calendarDate(now)
  const today = useToday(shop.id, day)
  const { data } = today
  const mine = data?.underWay.filter(({ test, pumpHandId }) => [test.leadId, test.witnessId, pumpHandId].includes(user.id)) ?? []
  useKeptOnDevice(mine.map(({ test }) => test.id))
  if (data === undefined && today.failureReason instanceof Disconnected) {
    return (
      <Suspense fallback={<SkeletonPage />}>
        <KeptToday userId={user.id} onAgain={() => void today.refetch()} />
      </Suspense>
    )
  }
  if (today.error && data === undefined) throw today.error
  return (
    <TodayView
      underWay={data?.underWay.map((one) => underWayWords(one, user.id, now))}
      plan={can('proof-test:open') ? { label: 'Plan a test', to: paths.planProofTest.href({ shop: shop.id }) } : undefined}
      needs={data?.needs.map((need) => needWords(need, day))}
      presses={data?.presses.map((one) => pressWords(one, day))}
      enterPress={can('press:register') ? { label: 'Enter a press', to: paths.newPress.href({ shop: shop.id }) } : undefined}
      calendar={data && { today: day, events: eventsOf(data.due, shop.id) }}
    />
  )
}
