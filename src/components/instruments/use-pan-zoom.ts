import { useCallback, useEffect, useRef, useState, type FocusEvent, type KeyboardEvent, type MouseEvent, type PointerEvent } from 'react'
import type { Point } from '#shared/chart/drawing'
import { broughtIn, FITTED, pannedBy, zoomedAt, type View } from './pan-zoom'

const STEP = 1.5
const ARROW = 60
/** A hand that shakes by less than this taps (px). */
const TAP = 6

const ARROWS: Record<string, readonly [number, number]> = {
  ArrowLeft: [ARROW, 0],
  ArrowRight: [-ARROW, 0],
  ArrowUp: [0, ARROW],
  ArrowDown: [0, -ARROW],
}

function middleOf(touches: TouchList, box: DOMRect): { at: Point; apart: number } | null {
  const [a, b] = [touches[0], touches[1]]
  if (!a || !b) return null
  return {
    at: { x: (a.clientX + b.clientX) / 2 - box.left, y: (a.clientY + b.clientY) / 2 - box.top },
    apart: Math.hypot(a.clientX - b.clientX, a.clientY - b.clientY),
  }
}

/** Two fingers enlarge and move; one finger moves only once somebody asked for it, so that a page scrolls under a thumb. */
function followTouches(element: HTMLElement, change: (next: (view: View) => View) => void, held: () => boolean): () => void {
  let before: { at: Point; apart: number } | null = null
  let finger: Point | null = null
  const start = ({ touches }: TouchEvent): void => {
    before = middleOf(touches, element.getBoundingClientRect())
    const only = touches.length === 1 ? touches[0] : undefined
    finger = only && held() ? { x: only.clientX, y: only.clientY } : null
  }
  const move = (event: TouchEvent): void => {
    const { touches } = event
    const now = middleOf(touches, element.getBoundingClientRect())
    if (now && before) {
      event.preventDefault()
      const was = before
      change((view) => {
        const enlarged = zoomedAt(view, now.apart / Math.max(1, was.apart), was.at, windowOf(element))
        return pannedBy(enlarged, now.at.x - was.at.x, now.at.y - was.at.y, windowOf(element))
      })
    } else if (finger && touches[0]) {
      const was = finger
      const { clientX, clientY } = touches[0]
      change((view) => pannedBy(view, clientX - was.x, clientY - was.y, windowOf(element)))
      finger = { x: clientX, y: clientY }
    }
    before = now
  }
  element.addEventListener('touchstart', start, { passive: true })
  element.addEventListener('touchmove', move, { passive: false })
  return () => {
    element.removeEventListener('touchstart', start)
    element.removeEventListener('touchmove', move)
  }
}

const windowOf = (element: HTMLElement) => ({ width: element.clientWidth, height: element.clientHeight })

const within = (target: Element, element: HTMLElement) => {
  const [box, outer] = [target.getBoundingClientRect(), element.getBoundingClientRect()]
  return { left: box.left - outer.left, right: box.right - outer.left, top: box.top - outer.top, bottom: box.bottom - outer.top }
}

/** Enlarges about the joint that has the focus, which stays in sight, else about the middle. */
function zoomedOn(view: View, factor: number, element: HTMLElement): View {
  const window = windowOf(element)
  const focused = document.activeElement
  if (!focused || focused === element || !element.contains(focused))
    return zoomedAt(view, factor, { x: window.width / 2, y: window.height / 2 }, window)
  const { left, right, top, bottom } = within(focused, element)
  const at = { x: (left + right) / 2, y: (top + bottom) / 2 }
  const next = zoomedAt(view, factor, at, window)
  const by = next.k / view.k / 2
  const [x, y] = [(right - left) * by, (bottom - top) * by]
  return broughtIn(next, { left: at.x - x, right: at.x + x, top: at.y - y, bottom: at.y + y }, window)
}

/** Pan and zoom of one drawing: by finger, mouse, wheel, keys and buttons. */
export function usePanZoom() {
  const [view, setView] = useState<View>(FITTED)
  const [held, setHeld] = useState(false)
  const [element, setElement] = useState<HTMLDivElement | null>(null)
  const holding = useRef(false)
  const drag = useRef<{ from: Point; moved: boolean } | null>(null)

  useEffect(() => {
    holding.current = held
  }, [held])
  useEffect(() => {
    if (element === null) return undefined
    const wheel = (event: WheelEvent): void => {
      // A wheel alone scrolls the page until somebody asked for the drawing to be enlarged.
      if (!event.ctrlKey && !event.metaKey && !holding.current) return
      event.preventDefault()
      const box = element.getBoundingClientRect()
      const at = { x: event.clientX - box.left, y: event.clientY - box.top }
      setView((before) => zoomedAt(before, Math.exp(-event.deltaY / 300), at, windowOf(element)))
    }
    element.addEventListener('wheel', wheel, { passive: false })
    const release = followTouches(element, setView, () => holding.current)
    return () => {
      element.removeEventListener('wheel', wheel)
      release()
    }
  }, [element])

  const zoom = useCallback(
    (factor: number) => {
      if (element === null) return
      setHeld(true)
      setView((before) => zoomedOn(before, factor, element))
    },
    [element],
  )
  const fit = useCallback(() => {
    setHeld(false)
    setView(FITTED)
  }, [])
  const onKeyDown = (event: KeyboardEvent): void => {
    const arrow = ARROWS[event.key]
    if (event.ctrlKey || event.metaKey || event.altKey) return
    if (event.key === '+' || event.key === '=') zoom(STEP)
    else if (event.key === '-') zoom(1 / STEP)
    else if (event.key === '0') fit()
    else if (arrow && view.k > 1 && element) setView((before) => pannedBy(before, arrow[0], arrow[1], windowOf(element)))
    else return
    event.preventDefault()
  }
  const onPointerDown = ({ pointerType, button, clientX, clientY }: PointerEvent): void => {
    drag.current = pointerType === 'touch' || button !== 0 ? null : { from: { x: clientX, y: clientY }, moved: false }
  }
  const onPointerMove = ({ clientX, clientY, buttons, pointerId }: PointerEvent): void => {
    const going = drag.current
    if (!going || buttons === 0 || !element || view.k === 1) return
    const [dx, dy] = [clientX - going.from.x, clientY - going.from.y]
    if (!going.moved && Math.hypot(dx, dy) < TAP) return
    if (!going.moved) element.setPointerCapture(pointerId)
    drag.current = { from: { x: clientX, y: clientY }, moved: true }
    setView((before) => pannedBy(before, dx, dy, windowOf(element)))
  }
  /** What ends a drag is no tap on the joint that lies there. */
  const onClickCapture = (event: MouseEvent): void => {
    if (drag.current?.moved === true) event.stopPropagation()
    drag.current = null
  }
  const onFocus = ({ target }: FocusEvent): void => {
    if (!element || view.k === 1 || target === element) return
    const box = within(target, element)
    setView((before) => broughtIn(before, box, windowOf(element)))
  }
  return {
    view,
    held,
    zoomIn: () => zoom(STEP),
    zoomOut: () => zoom(1 / STEP),
    fit,
    onKeyDown,
    window: { ref: setElement, onKeyDown, onPointerDown, onPointerMove, onClickCapture, onFocus },
  }
}

export type PanZoom = ReturnType<typeof usePanZoom>
