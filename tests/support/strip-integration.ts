/**
 * Area and moments of a shape by adding up thin strips, from how wide it is at each level: another road than the
 * closed forms of the program. Midpoint rule between the given levels, where the width may jump.
 */
export function stripMoments(widthAt: (y: number) => number, levels: readonly number[], strips = 20_000) {
  const sorted = [...levels].sort((a, b) => a - b)
  let [area, first, second] = [0, 0, 0]
  for (let index = 1; index < sorted.length; index += 1) {
    const [from = 0, to = 0] = [sorted[index - 1], sorted[index]]
    const step = (to - from) / strips
    for (let strip = 0; strip < strips; strip += 1) {
      const y = from + (strip + 0.5) * step
      const part = widthAt(y) * step
      area += part
      first += part * y
      second += part * (y * y + (step * step) / 12)
    }
  }
  const level = first / area
  const secondMoment = second - area * level * level
  return { area, level, secondMoment }
}

/** The area that turns a shear force into the greatest shear stress: the least I·b/Q at any level looked at. */
export function leastShearArea(widthAt: (y: number) => number, levels: readonly number[], strips: number): number {
  const { level, secondMoment } = stripMoments(widthAt, levels, strips)
  const [bottom, top] = [Math.min(...levels), Math.max(...levels)]
  const hair = (top - bottom) * 1e-7
  const cuts = [level, ...levels.flatMap((each) => [each - hair, each + hair])].filter(
    (each) => each > bottom + 2 * hair && each < top - 2 * hair,
  )
  const areas = cuts.map((cut) => {
    const above = stripMoments(widthAt, [cut, ...levels.filter((each) => each > cut)], strips)
    return (secondMoment * widthAt(cut)) / (above.area * (above.level - level))
  })
  return Math.min(...areas)
}

/** Width of a rectangle with rounded corners that stands from `bottom` to `top`. */
export function roundedWidth(width: number, bottom: number, top: number, radius: number): (y: number) => number {
  return (y) => {
    if (y <= bottom || y >= top) return 0
    const fromEdge = Math.min(y - bottom, top - y)
    if (fromEdge >= radius) return width
    return width - 2 * (radius - Math.sqrt(radius ** 2 - (radius - fromEdge) ** 2))
  }
}
