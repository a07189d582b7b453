import type { ReactElement } from 'react'
import { balloonItems, jointStateWord, type JointMarkState } from '#shared/drawing/balloon-items'
import { DrawingItems } from './instruments/drawing-view'

export { jointStateWord, type JointMarkState }

interface JointBalloonProps {
  /** Without a number the outline alone is drawn, as beside its word in a list of what outlines mean. */
  number?: number
  state: JointMarkState
  tone?: 'dye' | 'steel'
  /** Diameter of the ring. A diamond reaches a little further. */
  size?: number
  /** Replaces "Joint 7, tacked". */
  label?: string
  /** True where the words beside it already say the same. */
  decorative?: boolean
}

/** The balloon of a joint on its own, named for those who can't see it. */
export function JointBalloon(props: JointBalloonProps): ReactElement {
  const { number, state, tone = 'steel', size = 42, label, decorative = false } = props
  const named = label ?? (number === undefined ? jointStateWord[state] : `Joint ${number}, ${jointStateWord[state]}`)
  // Room for the corners of the diamond and the strikes, without making the balloon itself smaller.
  const box = Math.ceil(size * 1.36)
  return (
    <svg
      viewBox={`0 0 ${box} ${box}`}
      width={box}
      height={box}
      style={{ margin: -(box - size) / 2 }}
      className="shrink-0"
      data-state={state}
      {...(decorative ? { 'aria-hidden': true } : { role: 'img', 'aria-label': named })}
    >
      <DrawingItems
        items={balloonItems({ number, state, at: { x: box / 2, y: box / 2 }, size })}
        ground={tone === 'dye' ? 'dye' : 'words'}
      />
    </svg>
  )
}
