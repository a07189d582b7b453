import { useSearchParams } from 'react-router-dom'
import type { Sort } from './sort'

type Changes = Record<string, string | undefined>

interface Register<Name extends string> {
  /** Orders that the list knows, "-" before what runs from the largest. */
  sorts: readonly Name[]
  fallback: Name
  href: (query: Record<string, string | undefined>) => string
}

/** What of a register the address asks for, so that a link or the way back shows the same. */
export function useRegister<Name extends string>({ sorts, fallback, href }: Register<Name>) {
  const [params, setParams] = useSearchParams()
  const sortName = sorts.find((one) => one === params.get('sort')) ?? fallback
  const column = sortName.replace('-', '')
  const sort: Sort = { column, direction: sortName.startsWith('-') ? 'descending' : 'ascending' }
  return {
    sortName,
    sort,
    cursor: params.get('cursor') ?? undefined,
    value: (name: string): string => params.get(name) ?? '',
    /** Another order or another narrowing begins at the first page. */
    change(changed: Changes): void {
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
    sortBy(next: Sort, begin: 'ascending' | 'descending' = 'ascending'): Changes {
      const ascending = next.column === column ? next.direction === 'ascending' : begin === 'ascending'
      return { sort: ascending ? next.column : `-${next.column}` }
    },
    pageAt(cursor: string | null): string | undefined {
      return cursor === null ? undefined : href({ ...Object.fromEntries(params), cursor })
    },
  }
}
