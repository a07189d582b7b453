import { useEffect, useRef } from 'react'
import { soundAlarm } from '../../lib/alarm'
import type { Run } from './use-run'

/**
 * A stop or a pause that somebody else called is heard and felt on this device, whatever its screen shows. One that
 * lies behind, under no load, is not heard again. Answers whether somebody else has paused.
 */
export function useOthersAlarm({ state, me }: Pick<Run, 'state' | 'me'>): boolean {
  const { stopped, paused, loaded } = state
  const stop = stopped !== null && stopped.by !== me.id ? stopped.at : null
  const pause = paused !== null && paused.by !== me.id ? paused.at : null
  const heard = useRef(loaded === null ? stop : null)
  useEffect(() => {
    if (stop === null || stop === heard.current) return
    heard.current = stop
    soundAlarm('stop')
  }, [stop])
  useEffect(() => {
    if (pause !== null) soundAlarm('pause')
  }, [pause])
  return pause !== null
}
