import { pressRowSchema } from '#shared/api/presses'
import type { PressList, PressRow } from '#shared/api/presses'
import type { KeysetPage } from '../services/keyset'
import type { PressRecord } from '../services/press-register'

const quantity = (text: string | null, unit: string | null) => (text === null || unit === null ? null : { text, unit })

/** Columns are plain text; parsing gives them back their types and lets nothing else out. */
export function presentPress(press: PressRecord): PressRow {
  const { id, name, whatFor, kind, status, clearedUntil, jointCount, jointsAccepted } = press
  return pressRowSchema.parse({
    id,
    name,
    whatFor,
    kind,
    status,
    ratedLoad: quantity(press.ratedLoadText, press.ratedLoadUnit),
    clearedTo: quantity(press.clearedToText, press.clearedToUnit),
    clearedUntil,
    jointCount,
    jointsAccepted,
    lastChangedAt: press.lastChangedAt.toISOString(),
  })
}

export function presentPressList({ rows, older, newer }: KeysetPage<PressRecord>): PressList {
  return { presses: rows.map(presentPress), older, newer }
}
