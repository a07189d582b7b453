import type { ReactElement, ReactNode } from 'react'
import { Mark } from '../marks'
import type { MarkName } from '../marks'

interface LiveFigureProps {
  /** "What does the middle read?" */
  question: string
  hint?: string
  /** What was found about the field typed last, with its shape. */
  found?: { mark: MarkName; text: ReactNode }
  /** The load as typed so far; null while the gauge's field can't be read. */
  load: { figure: string; unit: string; uncertainty: string; also: string } | null
  /** With the load off there is no load to show. */
  bare?: boolean
}

/** The question at hand, and the load that the gauge's reading makes, always with its uncertainty. */
export function LiveFigure({ question, hint, found, load, bare = false }: LiveFigureProps): ReactElement {
  const words = load === null ? [] : load.unit.split(' ')
  return (
    <div className="@container min-w-0">
      <h2 className="text-20 font-semibold leading-[24px]">{question}</h2>
      {hint !== undefined && <p className="hidden text-16 text-graphite @min-[256px]:block">{hint}</p>}
      <div className="mt-2 border-t border-rule pt-2">
        {found !== undefined && (
          <p className="flex items-center gap-2 text-16 @min-[256px]:text-18">
            <Mark name={found.mark} size={22} />
            <span>{found.text}</span>
          </p>
        )}
        <output className={bare ? 'hidden' : 'block'}>
          {load === null ? (
            <span className="block pt-5 text-46 font-semibold text-graphite">—</span>
          ) : (
            <>
              <span className="mt-1 flex items-center gap-3">
                <span className="text-54 font-semibold tracking-[-0.01em] @min-[256px]:text-76">{load.figure}</span>
                <span className="text-22 font-medium leading-[24px]">
                  {words.map((word) => (
                    <span key={word} className="block">
                      {word}
                    </span>
                  ))}
                </span>
              </span>
              <span className="mt-1 block text-20">
                <span className="font-semibold">± {load.uncertainty}</span>
                <span className="mx-2 text-graphite">or</span>
                {load.also}
              </span>
            </>
          )}
        </output>
      </div>
    </div>
  )
}
