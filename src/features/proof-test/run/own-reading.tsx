import { useEffect, useRef, type ReactElement } from 'react'
import { hasCoarsePointer } from '../../../components/run/reading-row'
import type { RowSource } from '../row-model'
import type { RowInHand } from '../use-row'

interface OwnReadingProps {
  row: RowInHand
  sources: readonly RowSource[]
  name: string
}

/** The witness's own field: large, alone, with nothing beside it that could be copied. */
export function OwnReading({ row, sources, name }: OwnReadingProps): ReactElement {
  const first = useRef<HTMLInputElement>(null)
  useEffect(() => first.current?.focus(), [])
  return (
    <div className="grid gap-3">
      {sources.map((source, index) => {
        const error = row.draft.errors[source.id]
        const focused = row.draft.focused === source.id
        return (
          <div key={source.id}>
            <input
              ref={index === 0 ? first : undefined}
              type="text"
              inputMode={hasCoarsePointer() ? 'none' : 'decimal'}
              autoComplete="off"
              aria-label={`${source.label} as ${name} reads it, ${source.unitText}`}
              aria-invalid={error !== undefined}
              aria-describedby={`own-${source.id}`}
              value={row.draft.texts[source.id] ?? ''}
              onFocus={() => row.focus(source.id)}
              onChange={(event) => row.type(source.id, event.target.value)}
              onKeyDown={(event) => {
                if (event.key !== 'Enter' || event.nativeEvent.isComposing) return
                event.preventDefault()
                row.commit(source.id)
              }}
              className={`block h-16 w-full rounded-field border-2 bg-field px-4 text-46 font-medium text-ink caret-ink ${error ? 'border-stop-ink' : 'border-ink'} ${focused ? 'focus-ring' : ''}`}
            />
            <p id={`own-${source.id}`} className="mt-1 text-16">
              <span className="font-medium">{sources.length > 1 ? `${source.label}, ${source.unitText}` : source.unitText}</span>
              {error && <span className="ml-3 font-medium text-stop-ink">{error}</span>}
            </p>
          </div>
        )
      })}
    </div>
  )
}
