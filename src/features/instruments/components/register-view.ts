import { useSearchParams } from 'react-router-dom'
import { INSTRUMENT_SORTS, type InstrumentListQuery } from '#shared/api/instruments'
import type { Sort } from '../../../components/data-table'
import { paths } from '../../../paths'

type Kind = NonNullable<InstrumentListQuery['kind']>
const kinds: readonly Kind[] = ['gauge', 'load-cell', 'indicator']

/** What of the register the address asks for, so that a link or the way back shows the same. */
export function useRegisterView(shopId: string) {
  const [params, setParams] = useSearchParams()
  const sort = INSTRUMENT_SORTS.find((one) => one === params.get('sort')) ?? 'code'
  const asked = {
    shop: shopId,
    search: params.get('search') ?? undefined,
    kind: kinds.find((one) => one === params.get('kind')),
    retired: params.get('retired') === 'yes' ? ('yes' as const) : undefined,
    sort,
    cursor: params.get('cursor') ?? undefined,
  }
  const column = sort.replace('-', '')
  return {
    asked,
    sort: { column, direction: sort.startsWith('-') ? 'descending' : 'ascending' } satisfies Sort,
    /** Another order or another narrowing begins at the first page. */
    change(changed: Record<string, string | undefined>): void {
      setParams(
        (before) => {
          const next = new URLSearchParams(before)
          next.delete('cursor')
          for (const [name, value] of Object.entries(changed)) {
            if (value) next.set(name, value)
            else next.delete(name)
          }
          return next
        },
        { replace: true },
      )
    },
    /** A column that didn't decide yet begins with the smallest: the first code, the first day due. */
    sortBy(next: Sort): Record<'sort', string> {
      const ascending = next.column !== column || next.direction === 'ascending'
      return { sort: ascending ? next.column : `-${next.column}` }
    },
    pageAt(cursor: string | null): string | undefined {
      return cursor === null ? undefined : paths.instruments.href({ ...asked, cursor })
    },
    narrowed: asked.search !== undefined || asked.kind !== undefined || asked.retired !== undefined,
  }
}
