import { useToday } from '../features/today/api/get-today'
import { TodayView } from '../features/today/components/today-view'
import { needWords } from '../features/today/need-words'
import { eventsOf, pressWords, underWayWords } from '../features/today/today-words'
import { calendarDate } from '../lib/dates'
import { useCan, useShop, useUser } from '../lib/here'
import { paths } from '../paths'

export function Component() {
  const shop = useShop()
  const user = useUser()
  const can = useCan()
  const now = new Date()
  const day = calendarDate(now)
  const today = useToday(shop.id, day)
  const { data } = today
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
