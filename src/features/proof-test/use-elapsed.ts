import { useEffect, useRef, useState } from 'react'
import { elapsedBetween } from '#shared/proof-test/clock'
import type { Mark } from '#shared/proof-test/entries'
import { soundAlarm } from '../../lib/alarm'
import { markNow } from './use-run'

const TICK = 200

/** Seconds since a mark, by the clock that nobody can set; it steps by the second. Null without a mark. */
export function useElapsed(mark: Mark | null): number | null {
  const [now, setNow] = useState(markNow)
  const running = mark !== null
  useEffect(() => {
    if (!running) return undefined
    setNow(markNow())
    const timer = setInterval(
      () => setNow((was) => (Math.floor(was.monotonicMs / TICK) === Math.floor(markNow().monotonicMs / TICK) ? was : markNow())),
      TICK,
    )
    return () => clearInterval(timer)
  }, [running])
  return mark === null ? null : Math.max(0, elapsedBetween(mark, now).seconds)
}

/** How a wait of `total` seconds from a mark stands. Its end is heard and felt, if somebody was there while it ran. */
export function useWaitFrom(mark: Mark | null, total: number): { elapsed: number; left: number; over: boolean } {
  const elapsed = useElapsed(mark) ?? 0
  const over = mark !== null && elapsed >= total
  const ran = useRef(false)
  useEffect(() => {
    if (mark !== null && !over) ran.current = true
    if (over && ran.current) {
      ran.current = false
      soundAlarm('hold over')
    }
  }, [mark, over])
  return { elapsed, left: Math.max(0, total - elapsed), over }
}
