import { useCallback } from 'react'
import type { FieldPath, FieldValues, UseFormReturn } from 'react-hook-form'
import { ProblemError, sayWhatFailed } from './problem'

function has(values: unknown, path: string): boolean {
  let here = values
  for (const part of path.split('.')) {
    if (typeof here !== 'object' || here === null || !(part in here)) return false
    here = (here as Record<string, unknown>)[part]
  }
  return true
}

/**
 * Puts a failed request onto the form that was sent: the server's sentences at the fields they name, the
 * rest above the form (as `errors.root`). What was typed stays.
 */
export function useProblemFields<V extends FieldValues, C, T>(form: UseFormReturn<V, C, T>): (error: unknown) => void {
  const { setError, getValues } = form
  return useCallback(
    (error: unknown) => {
      const values: unknown = getValues()
      const fields = error instanceof ProblemError ? Object.entries(error.fields) : []
      const known = fields.filter(([path]) => has(values, path))
      const unknown = fields.filter(([path]) => !has(values, path)).map(([, sentence]) => sentence)
      known.forEach(([path, message], index) => {
        setError(path as FieldPath<V>, { type: 'server', message }, { shouldFocus: index === 0 })
      })
      // Only what no field on this form can say goes to the top, else everything would be said twice.
      if (known.length === 0 || unknown.length > 0) {
        setError('root', { type: 'server', message: [sayWhatFailed(error), ...unknown].join(' ') })
      }
    },
    [getValues, setError],
  )
}
