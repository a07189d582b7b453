import { TodayView } from '../features/today/components/today-view'
import { calendarDate } from '../lib/dates'
import { useCan, useShop } from '../lib/here'
import { paths } from '../paths'

export function Component() {
  const shop = useShop()
  const can = useCan()
  return (
    <TodayView
      underWay={[]}
      plan={can('proof-test:open') ? { label: 'Plan a test', to: paths.planProofTest.href({ shop: shop.id }) } : undefined}
      needs={[]}
      presses={[]}
      enterPress={can('press:register') ? { label: 'Enter a press', to: paths.newPress.href({ shop: shop.id }) } : undefined}
      calendar={{ today: calendarDate(new Date()), events: [] }}
    />
  )
}
