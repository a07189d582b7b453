/**
 * Area and moments of a cross-section's outline in closed form, corners rounded or sharp. A section is built of
 * outlines added and taken away; y is measured upwards from any level that all its outlines share.
 */

/** A corner of an outline, m; `radius` rounds it, outwards or inwards as the corner points. */
export interface Corner {
  x: number
  y: number
  radius?: number
}

/** Area (m²), first moment (m³) and second moment (m⁴) about y = 0. */
export interface Moments {
  area: number
  first: number
  second: number
}

export const NO_MOMENTS: Moments = { area: 0, first: 0, second: 0 }

/** Moments of a section with `part` added, or taken away with `times` −1, or added n times. */
export function withMoments(section: Moments, part: Moments, times = 1): Moments {
  return {
    area: section.area + times * part.area,
    first: section.first + times * part.first,
    second: section.second + times * part.second,
  }
}

/** Polygon with straight edges, corners anticlockwise, by Green's theorem edge by edge. */
function polygonMoments(corners: readonly Corner[]): Moments {
  return corners.reduce((sum, a, index) => {
    const b = corners[(index + 1) % corners.length] ?? a
    const cross = a.x * b.y - b.x * a.y
    return withMoments(sum, {
      area: cross / 2,
      first: (cross * (a.y + b.y)) / 6,
      second: (cross * (a.y * a.y + a.y * b.y + b.y * b.y)) / 12,
    })
  }, NO_MOMENTS)
}

/** Sector of a circle, `half` angle each side of the direction (cos, sin). */
function sectorMoments(centre: Corner, radius: number, half: number, sine: number, cosine: number): Moments {
  const area = radius * radius * half
  const along = (2 * radius ** 3 * Math.sin(half)) / 3
  const spread = radius ** 4 / 8
  const ownSecond = sine * sine * spread * (2 * half + Math.sin(2 * half)) + cosine * cosine * spread * (2 * half - Math.sin(2 * half))
  const ownFirst = along * sine
  return {
    area,
    first: area * centre.y + ownFirst,
    second: area * centre.y ** 2 + 2 * centre.y * ownFirst + ownSecond,
  }
}

/** What a rounded corner takes off (convex) or puts on (concave): the kite of its tangents less the sector. */
function cornerMoments(before: Corner, corner: Corner, after: Corner): Moments {
  const radius = corner.radius ?? 0
  if (radius <= 0) return NO_MOMENTS
  const toBefore = unit(corner, before)
  const toAfter = unit(corner, after)
  const angle = Math.acos(Math.max(-1, Math.min(1, toBefore.x * toAfter.x + toBefore.y * toAfter.y)))
  const reach = radius / Math.tan(angle / 2)
  const bisector = unit({ x: 0, y: 0 }, { x: toBefore.x + toAfter.x, y: toBefore.y + toAfter.y })
  const centre = {
    x: corner.x + (bisector.x * radius) / Math.sin(angle / 2),
    y: corner.y + (bisector.y * radius) / Math.sin(angle / 2),
  }
  const kite = polygonMoments([
    { x: corner.x + toBefore.x * reach, y: corner.y + toBefore.y * reach },
    corner,
    { x: corner.x + toAfter.x * reach, y: corner.y + toAfter.y * reach },
    centre,
  ])
  // Seen from the outline's inside a convex corner is passed anticlockwise, and so is its kite.
  const sign = Math.sign(kite.area)
  const sector = sectorMoments(centre, radius, (Math.PI - angle) / 2, -bisector.y, -bisector.x)
  return withMoments(kite, sector, -sign)
}

function unit(from: Corner, to: Corner): { x: number; y: number } {
  const length = Math.hypot(to.x - from.x, to.y - from.y)
  return { x: (to.x - from.x) / length, y: (to.y - from.y) / length }
}

/**
 * Moments of an outline whose corners go round anticlockwise. Radii must leave room on each edge for both its
 * corners; callers see to that, because only they know what to say about it.
 * Source: Green's theorem; the circular sector's moments by integration (elementary calculus).
 */
export function outlineMoments(corners: readonly Corner[]): Moments {
  return corners.reduce((sum, corner, index) => {
    const before = corners[(index + corners.length - 1) % corners.length] ?? corner
    const after = corners[(index + 1) % corners.length] ?? corner
    return withMoments(sum, cornerMoments(before, corner, after), -1)
  }, polygonMoments(corners))
}

/** A rectangle from the origin's level upwards, with one radius on all its corners, or on the upper two. */
export function rectangle(width: number, height: number, bottom: number, radius = 0, rounded: 'all' | 'top' = 'all'): Corner[] {
  const low = rounded === 'all' ? radius : 0
  return [
    { x: 0, y: bottom, radius: low },
    { x: width, y: bottom, radius: low },
    { x: width, y: bottom + height, radius },
    { x: 0, y: bottom + height, radius },
  ]
}
