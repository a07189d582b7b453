import type { InstrumentList, InstrumentResponse, InstrumentRow } from '#shared/api/instruments'
import type { InstrumentInShop, InstrumentWithHistory } from '../services/instruments'
import type { KeysetPage } from '../services/keyset'

function presentInstrument({ id, details, calibration, retired }: InstrumentInShop): InstrumentRow {
  return { id, details, calibration, retired }
}

export function presentInstrumentList({ rows, older, newer }: KeysetPage<InstrumentInShop>): InstrumentList {
  return { instruments: rows.map(presentInstrument), older, newer }
}

export function presentInstrumentWithHistory({ shopId, instrument, calibrations }: InstrumentWithHistory): InstrumentResponse {
  return {
    shopId,
    instrument: presentInstrument(instrument),
    calibrations: calibrations.map(({ id, calibration, certificateFile, createdAt, createdBy }) => ({
      id,
      calibration,
      certificateFile,
      createdAt: createdAt.toISOString(),
      createdBy,
    })),
  }
}
