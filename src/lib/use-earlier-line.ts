import { useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import { earlierLine } from '#shared/chart/earlier-line'
import type { LineChartSpec } from '#shared/chart/line-spec'
import type { Opened } from '#shared/proof-test/entries'
import { shortDate } from './dates'
import { pressHistoryQuery } from './press-history'

/**
 * The line of the test that this one repeats, once it is here. Asked for only while `ask` says so, and once: a test goes
 * on without it.
 */
export function useEarlierLine(opened: Opened, leg: number, ask = true): LineChartSpec['earlier'] {
  const { data } = useQuery({
    ...pressHistoryQuery(opened.pressId),
    enabled: ask && opened.repeats !== null,
    staleTime: 5 * 60_000,
    retry: false,
  })
  return useMemo(
    () => data && earlierLine(opened, leg, data.climbs, ({ number, on }) => `${number}, ${shortDate(on)}`),
    [data, leg, opened],
  )
}
