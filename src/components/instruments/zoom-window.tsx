import type { ReactElement, ReactNode } from 'react'
import { LARGEST } from './pan-zoom'
import type { PanZoom } from './use-pan-zoom'

/** The window that a drawing is moved and enlarged under. */
export function ZoomWindow({ zoom, children }: { zoom: PanZoom; children: ReactNode }): ReactElement {
  const { k, x, y } = zoom.view
  return (
    <div
      {...zoom.window}
      className="h-full w-full overflow-clip"
      // The browser keeps scrolling by one finger; enlarging by two is the drawing's own.
      style={{ touchAction: zoom.held ? 'none' : 'pan-x pan-y', cursor: k > 1 ? 'grab' : undefined }}
    >
      <div style={{ transform: `translate(${x}px, ${y}px) scale(${k})`, transformOrigin: '0 0' }}>{children}</div>
    </div>
  )
}

const KEY =
  'flex size-14 touch-manipulation items-center justify-center border border-ghost bg-dye text-18 font-semibold text-scribe -outline-offset-3! disabled:text-ghost'

/** Enlarge, make smaller, fit: for a thumb, a mouse or the tab key; arrows and + − 0 work on them and on every joint. */
export function ZoomKeys({ zoom, className = '' }: { zoom: PanZoom; className?: string }): ReactElement {
  const { k } = zoom.view
  return (
    <div role="group" aria-label="Drawing" onKeyDown={zoom.onKeyDown} className={`flex shrink-0 -space-x-px print:hidden ${className}`}>
      <button type="button" aria-label="Zoom out" disabled={k <= 1} onClick={zoom.zoomOut} className={KEY}>
        <svg aria-hidden width={22} height={22} viewBox="0 0 22 22">
          <path d="M3 11H19" stroke="currentColor" strokeWidth={2} />
        </svg>
      </button>
      <button type="button" aria-label="Zoom in" disabled={k >= LARGEST} onClick={zoom.zoomIn} className={KEY}>
        <svg aria-hidden width={22} height={22} viewBox="0 0 22 22">
          <path d="M3 11H19M11 3V19" stroke="currentColor" strokeWidth={2} />
        </svg>
      </button>
      <button type="button" aria-label="Fit the drawing" disabled={k === 1 && !zoom.held} onClick={zoom.fit} className={KEY}>
        Fit
      </button>
    </div>
  )
}
