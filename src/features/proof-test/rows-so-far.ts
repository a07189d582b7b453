import type { ProofTestState, Row } from '#shared/proof-test/state'

export interface NamedRow {
  row: Row
  name: string
}

/** Every row that was entered, the last one first, each with where it belongs. */
export function rowsSoFar(state: ProofTestState): NamedRow[] {
  const several = state.legs.length > 1
  const rows = state.legs.flatMap((leg, legIndex): NamedRow[] => {
    const where = several ? `leg ${legIndex + 1}, ` : ''
    const seated = leg.seated ? [{ row: leg.seated, name: `${where}seating` }] : []
    const climbs = leg.climbs.flatMap((climb, climbIndex): NamedRow[] => {
      const again = climbIndex > 0 ? `${where}repeat climb, ` : where
      return [
        ...climb.datum.map((row) => ({ row, name: `${again}datum` })),
        ...climb.stages.flatMap((stage) =>
          stage.attempts.flatMap((attempt) =>
            attempt.rows.map((row) => ({ row, name: `${again}${stage.percent} %, ${row.toppedUp ? 'topped up' : row.occasion}` })),
          ),
        ),
        ...climb.set.map((row) => ({ row, name: `${again}set` })),
      ]
    })
    return [...seated, ...climbs]
  })
  return rows.toSorted((a, b) => b.row.seq - a.row.seq)
}
