import type { Opened, Reading } from '#shared/proof-test/entries'
import { instrumentOf } from '#shared/proof-test/force'
import { parseDecimal, toSI, unitLabel, type Unit } from '#shared/units'

/** One field of a row: a gauge, a load cell, or a measuring point. */
export interface RowSource {
  id: string
  label: string
  unit: Reading['unit']
  unitText: string
  kind: 'force' | 'point'
}

/** What has been typed of a row. `first` holds what a field said before it was asked for again. */
export interface RowDraft {
  mark: { at: string; bootId: string; monotonicMs: number } | null
  texts: Record<string, string>
  first: Record<string, string>
  typedAgain: string[]
  errors: Record<string, string>
  focused: string | null
  temperature: string
}

export const EMPTY_ROW: RowDraft = { mark: null, texts: {}, first: {}, typedAgain: [], errors: {}, focused: null, temperature: '' }

function unitOf(opened: Opened, instrumentId: string): Reading['unit'] | null {
  const details = instrumentOf(opened, instrumentId)?.details
  return details ? (details.increment.unit as Reading['unit']) : null
}

/** The fields of a whole row, in the order they are read: what reads the force, then every point. */
export function rowSources(opened: Opened, only: 'force' | 'all' = 'all'): RowSource[] {
  const several = opened.forceInstrumentIds.length > 1
  const forces = opened.forceInstrumentIds.flatMap((id): RowSource[] => {
    const instrument = instrumentOf(opened, id)
    const unit = unitOf(opened, id)
    if (!instrument || !unit) return []
    const name = instrument.details.kind === 'load-cell' ? 'Load cell' : 'Gauge'
    return [{ id, label: several ? `${name} ${instrument.details.code}` : name, unit, unitText: unitLabel(unit as Unit), kind: 'force' }]
  })
  if (only === 'force') return forces
  const points = opened.points.flatMap((point): RowSource[] => {
    const unit = unitOf(opened, point.instrumentId)
    return unit ? [{ id: point.id, label: point.label, unit, unitText: unitLabel(unit as Unit), kind: 'point' }] : []
  })
  return [...forces, ...points]
}

/** The readings that can be read so far. */
export function readingsOf(sources: readonly RowSource[], draft: RowDraft): Reading[] {
  return sources.flatMap(({ id, unit }) => {
    const text = (draft.texts[id] ?? '').trim()
    return parseDecimal(text, { signed: true }).ok ? [{ sourceId: id, text, unit }] : []
  })
}

/** Says why a reading has to be typed again, or null when it may stand. */
export type Surprise = (source: RowSource, readings: readonly Reading[]) => string | null

const sameNumber = (a: string, b: string): boolean => {
  const [one, two] = [parseDecimal(a, { signed: true }), parseDecimal(b, { signed: true })]
  return one.ok && two.ok && one.value === two.value
}

function withField(
  draft: RowDraft,
  id: string,
  change: { text?: string; error?: string | null; first?: string; again?: boolean },
): RowDraft {
  const { [id]: _was, ...errors } = draft.errors
  return {
    ...draft,
    texts: change.text === undefined ? draft.texts : { ...draft.texts, [id]: change.text },
    errors: change.error ? { ...errors, [id]: change.error } : errors,
    first: change.first === undefined ? draft.first : { ...draft.first, [id]: change.first },
    typedAgain: change.again && !draft.typedAgain.includes(id) ? [...draft.typedAgain, id] : draft.typedAgain,
  }
}

/** Empties a field and asks for it once more. What was typed is kept aside, to be compared and never shown. */
export function askAgain(draft: RowDraft, source: RowSource, why: string): RowDraft {
  const text = draft.texts[source.id] ?? ''
  return {
    ...withField(draft, source.id, { text: '', first: text, error: `${why} Look again and type it once more.` }),
    focused: source.id,
  }
}

/**
 * Enter in one field. What can't be read keeps its text and says why; what surprises is emptied and asked
 * again, and stands only when it was typed the same twice.
 */
export function commitField(
  draft: RowDraft,
  sources: readonly RowSource[],
  id: string,
  surprise: Surprise,
): { draft: RowDraft; ok: boolean } {
  const source = sources.find((candidate) => candidate.id === id)
  if (!source) return { draft, ok: false }
  const text = (draft.texts[id] ?? '').trim()
  const parsed = parseDecimal(text, { signed: source.kind === 'point' })
  if (!parsed.ok) return { draft: { ...withField(draft, id, { error: parsed.message }), focused: id }, ok: false }
  const first = draft.first[id]
  const says = surprise(source, readingsOf(sources, draft))
  if (says === null || draft.typedAgain.includes(id))
    return { draft: withField(draft, id, { error: null, again: first !== undefined }), ok: true }
  if (first !== undefined && sameNumber(first, text)) return { draft: withField(draft, id, { error: null, again: true }), ok: true }
  return { draft: askAgain(draft, source, first === undefined ? says : `The two you typed differ. ${says}`), ok: false }
}

/** Typing in a field takes its sentence away; a field that stood by being typed twice has to earn it again. */
export function typeInto(draft: RowDraft, id: string, text: string): RowDraft {
  if (text === draft.texts[id]) return draft
  return { ...withField(draft, id, { text, error: null }), typedAgain: draft.typedAgain.filter((one) => one !== id) }
}

/** A key of the program's own pad at the end of the field that has the focus. */
export function pressKey(draft: RowDraft, key: string): RowDraft {
  const id = draft.focused
  if (id === null) return draft
  const text = draft.texts[id] ?? ''
  if (key === '-') return typeInto(draft, id, text.startsWith('-') ? text.slice(1) : `-${text}`)
  return typeInto(draft, id, text + key)
}

export function pressBackspace(draft: RowDraft): RowDraft {
  return draft.focused === null ? draft : typeInto(draft, draft.focused, (draft.texts[draft.focused] ?? '').slice(0, -1))
}

/** The first field, from the start of the row, that is empty or has a sentence against it. */
export function firstOpen(draft: RowDraft, sources: readonly RowSource[]): RowSource | null {
  return sources.find(({ id }) => draft.errors[id] !== undefined || (draft.texts[id] ?? '').trim() === '') ?? null
}

/** A reading in SI, or null where it can't be read. */
export function valueOf(readings: readonly Reading[], id: string): number | null {
  const reading = readings.find((candidate) => candidate.sourceId === id)
  return reading ? toSI(reading) : null
}
