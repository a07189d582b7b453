import type { Drawing } from '#shared/chart/drawing'
import { lineDrawing } from '#shared/chart/line-geometry'
import { recordLine } from '#shared/chart/record-line'
import { drawnPress, holeInUse, looseParts } from '#shared/drawing/drawn-press'
import { elevationDrawing, elevationLabel } from '#shared/drawing/elevation'
import { PAPER_INKS } from '#shared/drawing/inks'
import { jointMark } from '#shared/proof-test/walked'
import type { RecordOfTest } from '../record'
import { paintDrawing } from './painter'
import type { Paper } from './paper'

/** The line of one leg as it is drawn on a sheet of so many px; null before a stage was read. */
export function legDrawing(
  { opened, evaluation, state }: RecordOfTest,
  leg: number,
  size: { width: number; height: number },
): Drawing | null {
  const climbs = evaluation.climbs.filter((climb) => climb.leg === leg)
  const spec = recordLine(opened, climbs, size, state)
  return spec === null ? null : lineDrawing(spec)
}

/** The legs of which some stage was read. */
export function legsRead({ opened, evaluation }: RecordOfTest): number[] {
  const read = (leg: number): boolean =>
    evaluation.climbs.some(
      (climb) => climb.leg === leg && climb.climb === 0 && climb.stages.some(({ start }) => start?.lead && start.force),
    )
  return opened.legs.flatMap((_leg, leg) => (read(leg) ? [leg] : []))
}

/** Paints a leg's line `width` pt wide with its top left corner at x, y; returns its height. */
export function paintLeg(
  paper: Paper,
  record: RecordOfTest,
  leg: number,
  drawing: Drawing,
  place: { x: number; y: number; width: number },
): number {
  const scale = place.width / drawing.width
  const label = record.opened.legs[leg]?.label ?? `Leg ${leg + 1}`
  paintDrawing(
    paper,
    drawing,
    { x: place.x, y: place.y, scale },
    PAPER_INKS,
    `Deflection against load, ${label}. Every figure of it is in the table of stages.`,
  )
  return drawing.height * scale
}

const ELEVATION = { width: 620, height: 560 }

/** Height of the elevation when it is `width` pt wide. */
export const elevationHeight = (width: number): number => (ELEVATION.height * width) / ELEVATION.width

/** The press as it was tested, with every joint and measuring point. */
export function paintElevation(paper: Paper, { opened, state }: RecordOfTest, place: { x: number; y: number; width: number }): void {
  const joints = state.joints.map((one) => ({
    id: one.joint.id,
    number: one.joint.number,
    name: one.joint.name,
    // The last that was found of it: after load where it was looked at again.
    state: jointMark(one, one.after ? 'after load' : 'before load'),
    place: one.joint.place,
  }))
  const points = opened.points.map(({ letter, place: at }) => ({ letter, place: at }))
  const press = drawnPress(opened.press, holeInUse(opened.legs[0]?.bedHole))
  const loose = looseParts(opened.press, opened.joints)
  const drawing = elevationDrawing({ press, joints, points, loose, size: ELEVATION })
  const alt = `${elevationLabel(press.kind, joints.length)}; their examinations are in the table of joints.`
  paintDrawing(paper, drawing, { x: place.x, y: place.y, scale: place.width / ELEVATION.width }, PAPER_INKS, alt)
}
