import type { InstrumentListQuery } from '#shared/api/instruments'

type Kind = NonNullable<InstrumentListQuery['kind']>
const kinds: readonly Kind[] = ['gauge', 'load-cell', 'indicator']

type View = { value: (name: string) => string; sortName: InstrumentListQuery['sort']; cursor: string | undefined }

/** What the server is asked for, from what the address says; what can't be meant is left out. */
export function instrumentsAsked(shopId: string, view: View) {
  const asked = {
    shop: shopId,
    search: view.value('search') || undefined,
    kind: kinds.find((one) => one === view.value('kind')),
    retired: view.value('retired') === 'yes' ? ('yes' as const) : undefined,
    sort: view.sortName,
    cursor: view.cursor,
  }
  return { asked, narrowed: [asked.search, asked.kind, asked.retired].some((one) => one !== undefined) }
}
