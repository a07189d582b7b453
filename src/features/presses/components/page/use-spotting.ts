import { useMemo, useState } from 'react'
import type { Placing } from '../../../../components/instruments/joint-drawing'
import type { Spotting } from './joint-shape-forms'

/** Which spot of the drawing a form means: the form and the drawing beside it both choose. */
export function useSpotting(): { spotting: Spotting; placing: Placing | null } {
  const [spot, setSpot] = useState<{ at: string | null } | null>(null)
  const acts = useMemo(
    () => ({ choose: (at: string | null) => setSpot({ at }), begin: (at: string | null) => setSpot({ at }), end: () => setSpot(null) }),
    [],
  )
  return {
    spotting: { at: spot?.at ?? null, ...acts },
    placing: spot && { place: spot.at, onPlace: acts.choose },
  }
}
