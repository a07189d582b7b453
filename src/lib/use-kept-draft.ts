import { useCallback, useEffect, useRef } from 'react'
import type { FieldValues, UseFormReturn } from 'react-hook-form'
import { dropDraft, keepDraft } from './drafts'

const PAUSE = 300

/**
 * Keeps what is typed into a long form on this device, shortly after each change and when the form is left.
 * Answers `finish`: nothing is kept from there on, because what was typed is where it belongs.
 */
export function useKeptDraft<V extends FieldValues, C, T>(form: UseFormReturn<V, C, T>, name: string, version: number): () => void {
  const { subscribe, getValues } = form
  const done = useRef(false)
  useEffect(() => {
    let timer: ReturnType<typeof setTimeout> | undefined
    const save = () => {
      if (!done.current) keepDraft(name, version, getValues())
    }
    const stop = subscribe({
      formState: { values: true },
      callback: () => {
        clearTimeout(timer)
        timer = setTimeout(save, PAUSE)
      },
    })
    return () => {
      stop()
      if (timer !== undefined) {
        clearTimeout(timer)
        save()
      }
    }
  }, [getValues, name, subscribe, version])
  return useCallback(() => {
    done.current = true
    dropDraft(name)
  }, [name])
}
