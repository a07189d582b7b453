import type { Point } from '#shared/chart/drawing'

/** How a sheet lies under its window: `k` times as large, shifted by x, y (px). */
export interface View {
  k: number
  x: number
  y: number
}

interface Window {
  width: number
  height: number
}

export const FITTED: View = { k: 1, x: 0, y: 0 }
export const LARGEST = 5

/** Keeps the window covered by the sheet: nobody loses the drawing. */
export function kept(view: View, { width, height }: Window): View {
  const k = Math.min(LARGEST, Math.max(1, view.k))
  const within = (shift: number, long: number): number => Math.min(0, Math.max(long * (1 - k), shift))
  return { k, x: within(view.x, width), y: within(view.y, height) }
}

/** Enlarges about a point of the window, which stays over the same spot of the sheet while there is room. */
export function zoomedAt(view: View, factor: number, at: Point, window: Window): View {
  const k = Math.min(LARGEST, Math.max(1, view.k * factor))
  const by = k / view.k
  return kept({ k, x: at.x - (at.x - view.x) * by, y: at.y - (at.y - view.y) * by }, window)
}

export const pannedBy = (view: View, dx: number, dy: number, window: Window): View =>
  kept({ ...view, x: view.x + dx, y: view.y + dy }, window)

/** Moves the sheet as little as it takes to bring a box of the window (px) inside it. */
export function broughtIn(view: View, box: { left: number; top: number; right: number; bottom: number }, window: Window): View {
  const by = (from: number, to: number, long: number): number => (from < 0 ? -from : to > long ? Math.max(-from, long - to) : 0)
  return pannedBy(view, by(box.left, box.right, window.width), by(box.top, box.bottom, window.height), window)
}
