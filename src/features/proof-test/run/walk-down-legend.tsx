import type { ReactElement } from 'react'
import type { Opened } from '#shared/proof-test/entries'
import { JointBalloon, Mark, type JointMarkState } from '../../../components/marks'

const OUTLINES: readonly { state: JointMarkState; word: string; says: string }[] = [
  { state: 'open', word: 'Open', says: 'no metal across' },
  { state: 'tacked', word: 'Tacked', says: 'counts as no weld' },
  { state: 'finished', word: 'Finished', says: 'still to be examined' },
  { state: 'accepted', word: 'Accepted', says: 'examined today' },
  { state: 'rejected', word: 'Rejected', says: 'repair, then examine' },
]

/** What the outlines of the balloons say, and where the indicators stand. */
export function WalkDownLegend({ opened, height }: { opened: Opened; height: number }): ReactElement {
  const roomy = height >= 540
  return (
    <div className="flex flex-col gap-3 overflow-hidden border-l border-ghost px-6 py-5" style={{ height }}>
      <h2 className="text-18">What the outline says</h2>
      <ul className={`grid ${roomy ? 'gap-4' : 'gap-1'}`}>
        {OUTLINES.map(({ state, word, says }) => (
          <li key={state} className="flex items-center gap-4">
            <span className="flex w-10 justify-center">
              <JointBalloon state={state} tone="dye" size={roomy ? 34 : 24} decorative />
            </span>
            <span>
              <span className="block text-18 leading-[22px] font-semibold">{word}</span>
              {roomy && <span className="block font-condensed text-16 leading-[20px] text-faint-scribe">{says}</span>}
            </span>
          </li>
        ))}
      </ul>
      {roomy && (
        <>
          <h2 className="mt-2 border-t border-ghost pt-3 text-18">Measuring points</h2>
          <ul className="grid gap-1">
            {opened.points.map((point) => (
              <li key={point.id} className="flex items-center gap-4 font-condensed text-16">
                <span className="flex w-10 justify-center">
                  <Mark name="measuring-point" tone="dye" size={18} />
                </span>
                <span className="w-4 font-semibold">{point.letter}</span>
                <span className="text-faint-scribe">{point.label}</span>
              </li>
            ))}
          </ul>
        </>
      )}
    </div>
  )
}
