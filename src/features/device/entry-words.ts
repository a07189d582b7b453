import type { EntryDraft } from '#shared/ledger/envelope'
import { FORCE_UNITS, LENGTH_UNITS, PRESSURE_UNITS, unitLabel, type Unit } from '#shared/units'

const UNITS: readonly Unit[] = [...FORCE_UNITS, ...PRESSURE_UNITS, ...LENGTH_UNITS]

const WORDS: Record<string, string> = {
  opened: 'Test opened',
  'joint-examined': 'Joint examined',
  'joint-worked': 'Joint finished',
  'load-path-confirmed': 'Load path confirmed',
  'set-up-confirmed': 'Set-up confirmed',
  'leg-begun': 'Leg begun',
  seated: 'Seated',
  'datum-read': 'Datum',
  'stage-begun': 'Stage begun',
  'row-read': 'Row of readings',
  'independent-read': 'Independent reading',
  'topped-up': 'Topped up',
  observed: 'Observation',
  paused: 'Pause',
  resumed: 'Gone on',
  stopped: 'Stop',
  released: 'Release',
  'set-read': 'Set after release',
  decided: 'Decision',
  corrected: 'Correction',
  concluded: 'Conclusion',
  reviewed: 'Review',
  'attachment-lost': 'Photo or document given up',
}

function readingsOf({ readings }: EntryDraft['payload']): string {
  if (!Array.isArray(readings)) return ''
  return readings
    .flatMap((reading: unknown) => {
      if (typeof reading !== 'object' || reading === null || !('text' in reading) || !('unit' in reading)) return []
      const unit = UNITS.find((one) => one === reading.unit)
      return [`${String(reading.text)} ${unit ? unitLabel(unit) : String(reading.unit)}`]
    })
    .join(', ')
}

/** What an entry is, and what it says: "Row of readings" over "5900 psi, 0.41 mm". Readings stand as typed. */
export function entryWords({ kind, payload }: EntryDraft): { what: string; says: string } {
  const text = ['note', 'why', 'text'].map((name) => payload[name]).find((value) => typeof value === 'string')
  return { what: WORDS[kind] ?? `Entry “${kind}”`, says: readingsOf(payload) || (typeof text === 'string' ? text : '') }
}
