import { useCallback, useRef } from 'react'
import type { Reading } from '#shared/proof-test/entries'
import { dropDraft, useDraft } from './drafts'
import {
  commitField,
  EMPTY_ROW,
  firstOpen,
  pressBackspace,
  pressKey,
  readingsOf,
  typeInto,
  type RowDraft,
  type RowSource,
  type Surprise,
} from './row-model'
import { markNow } from './use-run'

/** A row as it is entered. */
export interface EnteredRow {
  mark: NonNullable<RowDraft['mark']>
  readings: Reading[]
  typedAgain: string[]
}

interface RowOptions {
  /** Where the draft is kept: the test, and the row's place in it. */
  draftKey: string
  sources: readonly RowSource[]
  surprise: Surprise
  onEnter: (row: EnteredRow, temperature: string) => void
}

/** One row being read: mark, fields, keys, and what has to be typed again. */
export function useRow({ draftKey, sources, surprise, onEnter }: RowOptions) {
  const [draft, change] = useDraft<RowDraft>(draftKey, EMPTY_ROW)
  const latest = useRef(draft)
  latest.current = draft
  const set = useCallback(
    (next: RowDraft) => {
      latest.current = next
      change(next)
    },
    [change],
  )
  const mark = () => {
    if (latest.current.mark === null) set({ ...latest.current, mark: markNow(), focused: sources[0]?.id ?? null })
  }
  const enterRow = (from: RowDraft): void => {
    let next = from
    for (const source of sources) {
      const committed = commitField(next, sources, source.id, surprise)
      next = committed.draft
      if (!committed.ok) {
        set(next)
        return
      }
    }
    set(next)
    if (next.mark) onEnter({ mark: next.mark, readings: readingsOf(sources, next), typedAgain: next.typedAgain }, next.temperature)
  }
  /** Enter in a field: takes it and goes on to the next; after the last, the row is entered. False when it was not taken. */
  const commit = (id: string): boolean => {
    const committed = commitField(latest.current, sources, id, surprise)
    if (!committed.ok) {
      set(committed.draft)
      return false
    }
    const index = sources.findIndex((source) => source.id === id)
    const after = sources[index + 1]
    if (after) set({ ...committed.draft, focused: after.id })
    else {
      const open = firstOpen(committed.draft, sources)
      if (open) set({ ...committed.draft, focused: open.id })
      else enterRow(committed.draft)
    }
    return true
  }
  const { focused } = draft
  const position = sources.findIndex((source) => source.id === focused)
  return {
    draft,
    readings: readingsOf(sources, draft),
    focusedSource: sources[position] ?? null,
    nextSource: sources[position + 1] ?? null,
    last: position === sources.length - 1,
    mark,
    focus: (id: string) => {
      if (latest.current.focused !== id) set({ ...latest.current, focused: id })
    },
    type: (id: string, text: string) => set(typeInto(latest.current, id, text)),
    key: (key: string) => set(pressKey(latest.current, key)),
    backspace: () => set(pressBackspace(latest.current)),
    commit,
    enter: () => {
      if (latest.current.focused !== null) commit(latest.current.focused)
    },
    temperature: (text: string) => set({ ...latest.current, temperature: text }),
    drop: () => dropDraft(draftKey),
  }
}

export type RowInHand = ReturnType<typeof useRow>
