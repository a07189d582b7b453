import { Page } from '../components/page'
import { SkeletonRows } from '../components/skeleton'
import { useCalendar } from '../features/calendar/api/get-calendar'
import { monthAfter, monthsOf } from '../features/calendar/calendar-words'
import { CalendarView } from '../features/calendar/components/calendar-view'
import { Feed } from '../features/calendar/components/feed'
import { calendarDate } from '../lib/dates'
import { useShop } from '../lib/here'

const MONTHS = 12
/** What is late is shown for as long as it is late, ten years at most. */
const MONTHS_BACK = 120

export function Component() {
  const shop = useShop()
  const today = calendarDate(new Date())
  const month = today.slice(0, 7)
  const calendar = useCalendar(shop.id, `${monthAfter(month, -MONTHS_BACK)}-01`, `${monthAfter(month, MONTHS)}-01`)
  if (calendar.error && calendar.data === undefined) throw calendar.error
  return (
    <Page title="Calendar" note="examinations, retests and calibrations due">
      {calendar.data === undefined ? <SkeletonRows /> : <CalendarView {...monthsOf(calendar.data.items, today, MONTHS)} />}
      <div className="mt-8">
        <Feed key={shop.id} shopId={shop.id} shopName={shop.name} />
      </div>
    </Page>
  )
}
