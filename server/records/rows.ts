import type { MeasuringPoint, Opened, Reading } from '#shared/proof-test/entries'
import { figuresOf, type RowFigures } from '#shared/proof-test/evaluate-climb'
import { instrumentOf } from '#shared/proof-test/force'
import type { FrozenInstrument } from '#shared/instruments/model'
import type { Row } from '#shared/proof-test/state'
import { toSI } from '#shared/units'
import type { RecordOfTest } from './record'

/** A row of readings with what it is, where it stands and which datum it is measured from. */
export interface RecordRow {
  /** The entry's id; for the witness's own reading a name that no entry has. */
  key: string
  seq: number | null
  leg: string
  climb: number | null
  what: string
  attempt: number | null
  at: string
  by: string
  typed: readonly Reading[]
  readings: readonly Reading[]
  /** Key of the datum row its deflections are measured from. */
  datum: string | null
  figures: RowFigures | null
}

/** What reads force: gauges and load cells of the test, in order. */
export function forceInstruments(opened: Opened): FrozenInstrument[] {
  return opened.forceInstrumentIds.flatMap((id) => instrumentOf(opened, id) ?? [])
}

/** The rams a gauge's pressure acts on, counted from 1: all of them when one gauge reads the manifold. */
export function ramsOfGauge(opened: Opened, gaugeIndex: number): 'all' | number {
  const gauges = forceInstruments(opened).filter((instrument) => instrument.details.kind === 'gauge')
  return gauges.length <= 1 ? 'all' : gaugeIndex + 1
}

export function loadCellOf(opened: Opened): FrozenInstrument | null {
  return forceInstruments(opened).find((instrument) => instrument.details.kind === 'load-cell') ?? null
}

/** The points that enter the figure that leads: the net's, else the first point alone. */
export function leadPoints(opened: Opened): { plus: MeasuringPoint; minus: MeasuringPoint[] } | null {
  const { net, points } = opened
  const plus = net ? points.find((point) => point.id === net.plus) : points[0]
  if (!plus) return null
  const minus = net ? points.filter((point) => net.minus.includes(point.id)) : []
  return { plus, minus: net && minus.length < net.minus.length ? [] : minus }
}

function plain(row: Row): Pick<RecordRow, 'key' | 'seq' | 'at' | 'by' | 'typed' | 'readings'> {
  return { key: row.entryId, seq: row.seq, at: row.mark.at, by: row.by, typed: row.typed, readings: row.readings }
}

/** The coarsest increment (m) among the indicators of the figure that leads; 0 without one. */
export function leadFigureIncrement(opened: Opened): number {
  const points = leadPoints(opened)
  const increments = (points ? [points.plus, ...points.minus] : []).flatMap((point) => {
    const details = instrumentOf(opened, point.instrumentId)?.details
    return details?.kind === 'indicator' ? [toSI(details.increment)] : []
  })
  return Math.max(0, ...increments)
}

/** Every row of a test in the order of its course, the witness's own readings among them. */
export function recordRows(record: RecordOfTest): RecordRow[] {
  const { opened, state } = record
  return state.legs.flatMap((leg, legIndex): RecordRow[] => {
    const label = opened.legs[legIndex]?.label ?? `Leg ${legIndex + 1}`
    const seated = leg.seated
      ? [
          {
            ...plain(leg.seated),
            leg: label,
            climb: null,
            what: 'Seating',
            attempt: null,
            datum: null,
            figures: figuresOf(opened, leg.seated, null),
          },
        ]
      : []
    const climbs = leg.climbs.flatMap((climb, climbIndex): RecordRow[] => {
      const zero = climb.datum.at(-1) ?? null
      const common = { leg: label, climb: climbIndex + 1, datum: zero?.entryId ?? null }
      const entry = (row: Row, what: string, attempt: number | null): RecordRow => ({
        ...plain(row),
        ...common,
        what,
        attempt,
        figures: figuresOf(opened, row, zero),
      })
      return [
        ...climb.datum.map((row) => entry(row, row === zero ? 'Datum' : 'Datum, watched', null)),
        ...climb.stages.flatMap((stage) =>
          stage.attempts.flatMap((attempt, attemptIndex): RecordRow[] => [
            ...attempt.rows.map((row) => entry(row, `${stage.percent} %, ${row.toppedUp ? 'topped up' : row.occasion}`, attemptIndex + 1)),
            ...(attempt.independent && attempt.independent.readings.length > 0
              ? [
                  {
                    ...common,
                    key: `independent ${legIndex} ${climbIndex} ${stage.percent} ${attemptIndex}`,
                    seq: null,
                    what: `${stage.percent} %, witness alone`,
                    attempt: attemptIndex + 1,
                    at: attempt.independent.at,
                    by: attempt.independent.by,
                    typed: attempt.independent.readings,
                    readings: attempt.independent.readings,
                    figures: null,
                  },
                ]
              : []),
          ]),
        ),
        ...climb.set.map((row) => entry(row, 'Set', null)),
      ]
    })
    return [...seated, ...climbs]
  })
}
