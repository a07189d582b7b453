import { expectedDeflection, type DeflectionBand } from '../structure/expected-deflection'
import { checkLoadPath, type LoadPathCheck } from '../structure/load-path-check'
import { toSI } from '../units'
import type { Opened } from './entries'
import type { Prediction } from './figures'

/**
 * The band (m) in which the figure that leads is expected at the rated load, from the members' sections: an
 * estimate. Null where sections are not known, or where there is no estimate of such a point.
 */
export function expectedOf(opened: Opened, leg: number): DeflectionBand | null {
  const position = opened.legs[leg]?.ramPosition ?? 'central'
  const frame = { description: opened.press, joints: opened.joints }
  const { points, net } = expectedDeflection(frame, toSI(opened.press.ratedLoad), opened.points, { position, net: opened.net })
  const lead = opened.net ? net : points.get(opened.points[0]?.id ?? '')
  return lead?.band ?? null
}

/**
 * Where the first reading of a climb should lie, before there is a line: the expected band at that force (N),
 * widened by the readings' own U. `uReading` is the standard uncertainty of one reading, m.
 */
export function predictFromBand(opened: Opened, leg: number, force: number, uReading: number): Prediction | null {
  const band = expectedOf(opened, leg)
  const rated = toSI(opened.press.ratedLoad)
  if (!band || !(force > 0) || !(rated > 0)) return null
  const share = force / rated
  const own = 2 * Math.SQRT2 * uReading
  const from = band.low * share - own
  const to = band.high * share + own
  return { force, deflection: band.deflection * share, halfWidth: (to - from) / 2, from, to }
}

/** The load path check of a press as a test froze it, at its highest stage: an estimate, never an approval. */
export function checkOf(opened: Pick<Opened, 'press' | 'joints' | 'protocol' | 'forceUnit'>): LoadPathCheck {
  const highest = Math.max(100, ...opened.protocol.content.stages.map((stage) => stage.percent))
  // A joint is made up during the walk-down: what it will carry is checked as finished, and R14 keeps load off until it is.
  const joints = opened.joints.map((joint) => ({ ...joint, makeUp: 'finished' as const }))
  return checkLoadPath({
    description: opened.press,
    joints,
    load: (highest / 100) * toSI(opened.press.ratedLoad),
    forceUnit: opened.forceUnit,
  })
}
