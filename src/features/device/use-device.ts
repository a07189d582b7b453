import { useCallback, useEffect, useState } from 'react'
import { outbox, type OutboxContents } from '../../lib/outbox'
import type { Waiting } from '../../lib/outbox-database'
import { readStrandedFile, strandedFile, strandedFileName } from '../../lib/stranded-file'
import { useOutboxSummary } from '../../lib/use-unsent'

/** The entries of this device, read again whenever something moves. */
export function useContents(): OutboxContents | null {
  const summary = useOutboxSummary()
  const [contents, setContents] = useState<OutboxContents | null>(null)
  useEffect(() => {
    let here = true
    outbox.contents().then(
      (read) => here && setContents(read),
      // The fault stands over the list: the summary says it.
      () => undefined,
    )
    return () => {
      here = false
    }
  }, [summary])
  return contents
}

/** Hands a text to the browser as a download. */
function download(name: string, text: string): void {
  const address = URL.createObjectURL(new Blob([text], { type: 'application/json' }))
  const link = document.createElement('a')
  link.href = address
  link.download = name
  link.click()
  setTimeout(() => URL.revokeObjectURL(address), 60_000)
}

/** Saves one person's entries; they stay on this device as well. */
export function saveToFile(author: { id: string; name: string | null }, entries: readonly Waiting[]): string {
  const savedAt = new Date()
  const name = strandedFileName(savedAt)
  download(name, strandedFile({ author, entries, savedAt }))
  return name
}

export interface TakenIn {
  ok: boolean
  says: string
}

const counted = (count: number): string => (count === 1 ? 'One entry' : `${count} entries`)

/** Takes a file of entries in, when it is whole and its author's. */
export async function takeInFile(text: string, me: { id: string; name: string }): Promise<TakenIn> {
  const read = readStrandedFile(text)
  if (!read.whole) return { ok: false, says: read.says }
  const { author, entries } = read.file
  if (author.id !== me.id) {
    const who = author.name ?? 'another person, whose name the file does not say'
    return {
      ok: false,
      says: `These entries were made by ${who}, and you are signed in as ${me.name}. Only their author can have them sent: sign in as ${author.name ?? 'that person'}, here or anywhere else, and take the file in. Nothing of it was taken in now.`,
    }
  }
  try {
    const added = await outbox.takeIn(entries)
    if (added === 0)
      return { ok: true, says: `${counted(entries.length)} read: this device had all of them already. Nothing is entered twice.` }
    const rest = entries.length - added
    return {
      ok: true,
      says: `${counted(added)} taken in, to be sent now.${rest > 0 ? ` ${counted(rest)} of the file ${rest === 1 ? 'was' : 'were'} here already.` : ''}`,
    }
  } catch {
    return { ok: false, says: 'This device’s storage fails, so nothing was taken in. Keep the file and take it in on another device.' }
  }
}

/** A busy word while something runs, so that nothing is pressed twice. */
export function useTakeIn(me: { id: string; name: string }): { taken: TakenIn | null; busy: boolean; take: (file: File) => void } {
  const [taken, setTaken] = useState<TakenIn | null>(null)
  const [busy, setBusy] = useState(false)
  const { id, name } = me
  const take = useCallback(
    (file: File): void => {
      setBusy(true)
      void file
        .text()
        .then((text) => takeInFile(text, { id, name }))
        .catch((): TakenIn => ({ ok: false, says: 'The browser could not read this file. Choose it again.' }))
        .then(setTaken)
        .finally(() => setBusy(false))
    },
    [id, name],
  )
  return { taken, busy, take }
}
