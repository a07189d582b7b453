import type { Point } from '../chart/drawing'
import type { FrameKind } from '../press/model'

/** What is drawn of a press; lengths in metres, null where nobody has measured. */
export interface PressDimensions {
  height: number | null
  /** Between the centre lines of the uprights. */
  width: number | null
  /** From the ram's centre line to the column of a C-frame. */
  throat?: number | null
  holes?: number
  holePitch?: number | null
  /** The hole the bed is pinned in, counted from the top. */
  bedHole?: number | null
}

export interface DrawnPress {
  kind: FrameKind
  dimensions: PressDimensions
}

export interface Box {
  width: number
  height: number
}

/** A part of an elevation that stands for a member of the press. */
export type FramePart =
  | 'head'
  | 'upright-left'
  | 'upright-right'
  | 'seat'
  | 'ram'
  | 'adaptor'
  | 'bed'
  | 'stiffener-left'
  | 'stiffener-right'
  | 'foot-left'
  | 'foot-right'

/** Lanes that balloons stand in: outside the frame, or between upright and ram. */
export type Lane = 'outer-left' | 'outer-right' | 'inner-left' | 'inner-right'

/** A spot of an elevation: what the leader points at, and where its balloon would like to stand. */
export interface Anchor {
  tip: Point
  lane: Lane
  y: number
}

export interface Elevation {
  lanes: Record<Lane, number>
  anchors: Record<string, Anchor>
  /** `clear` is how far from the triangle's middle its letter stands. */
  points: Record<string, { at: Point; letter: 'left' | 'right'; clear?: number }>
  /** Where the word for a part that hangs loose can stand. */
  parts: Partial<Record<FramePart, Point>>
  /** First and last px from the top that a balloon's centre may have. */
  from: number
  to: number
  /** The same for the lanes between the uprights while they aren't full: under the head, off what they point at. */
  innerFrom: number
}

/** Heights of ram, adaptor and stack between head and bed (px). */
export interface RamHeights {
  seat: number
  flange: number
  cylinder: number
  nut: number
  rod: number
  adaptor: number
  stack: number
}

/** Shares of the daylight between head and bed; every part keeps at least a few px. */
export function ramHeights({ headBottom, bedTop }: { headBottom: number; bedTop: number }): RamHeights {
  const daylight = bedTop - headBottom
  const at = (share: number): number => Math.round(headBottom + daylight * share)
  return {
    seat: at(0.036),
    flange: at(0.064),
    cylinder: at(0.35),
    nut: at(0.366),
    rod: at(0.58),
    adaptor: at(0.646),
    stack: at(0.96),
  }
}

/** Sides of a sheet (px): the dimension's line, and the lanes outside the frame. */
export function sheetSides({ width }: Box): { dimensionX: number; laneLeft: number; laneRight: number; clear: number } {
  const small = width < 440
  const dimensionX = small ? 14 : 36
  return { dimensionX, laneLeft: dimensionX + (small ? 38 : 42), laneRight: width - (small ? 31 : 56), clear: small ? 12 : 33 }
}

/** Metres as whole millimetres, in groups of three; null for what nobody has measured. */
export function millimetres(metres: number | null | undefined): string | null {
  if (metres === null || metres === undefined) return null
  return Math.round(metres * 1000)
    .toString()
    .replace(/\B(?=(\d{3})+$)/g, '\u202f')
}
