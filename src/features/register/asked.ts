import type { TEST_SORTS } from '#shared/api/proof-tests'
import { longDate } from '../../lib/dates'
import type { TestsAsked } from './api/get-proof-tests'
import { outcomeAsked } from './components/outcome'

type SortName = (typeof TEST_SORTS)[number]

const orders: Record<SortName, string> = {
  opened: 'oldest first',
  '-opened': 'newest first',
  number: 'by number',
  '-number': 'by number, highest first',
  press: 'by press',
  '-press': 'by press, from the last',
}

const UUID = /^[0-9a-f-]{36}$/i
const DAY = /^\d{4}-\d{2}-\d{2}$/

/** What the server is asked for, from what the address says; what can't be meant is left out. */
export function testsAsked(shopId: string, view: { value: (name: string) => string; sortName: SortName; cursor: string | undefined }) {
  const text = (name: string, shape: RegExp) => (shape.test(view.value(name)) ? view.value(name) : undefined)
  const search = view.value('search') || undefined
  const [from, to] = [text('from', DAY), text('to', DAY)]
  const [press, lead] = [text('press', UUID), text('lead', UUID)]
  const outcome = outcomeAsked(view.value('result'))
  const asked: TestsAsked = {
    shop: shopId,
    search,
    press,
    lead,
    from,
    to,
    ...outcome,
    // Only days need to know where the reader is.
    zone: from || to ? new Date().getTimezoneOffset() : undefined,
    sort: view.sortName,
    cursor: view.cursor,
  }
  const days = [from && `from ${longDate(from)}`, to && `to ${longDate(to)}`].filter(Boolean).join(' ')
  return {
    asked,
    note: [days, orders[view.sortName]].filter(Boolean).join(', '),
    narrowed: [search, press, lead, from, to, outcome.result, outcome.status].some((one) => one !== undefined),
  }
}
