import type { MemberSection } from '#shared/structure/section-shapes'
import { toSI } from '#shared/units'

/** A section as it is drawn, in mm, y up; the first loop of a piece is its outside, the next its bore. */
export interface SectionOutline {
  paths: string[]
  left: number
  top: number
  width: number
  height: number
}

interface Box {
  x: number
  y: number
  width: number
  height: number
}

const mm = (typed: { text: string; unit: 'mm' | 'in' | 'm' } | null): number => (typed ? toSI(typed) * 1000 : 0)

function boxPath({ x, y, width, height }: Box, radius = 0): string {
  const r = Math.max(0, Math.min(radius, width / 2, height / 2))
  const arc = r > 0 ? (dx: number, dy: number) => `a${r} ${r} 0 0 1 ${dx} ${dy}` : () => ''
  return `M${x + r} ${y}h${width - 2 * r}${arc(r, r)}v${height - 2 * r}${arc(-r, r)}h${-(width - 2 * r)}${arc(-r, -r)}v${-(height - 2 * r)}${arc(r, -r)}Z`
}

function circlePath(x: number, y: number, radius: number): string {
  return `M${x - radius} ${y}a${radius} ${radius} 0 1 0 ${2 * radius} 0a${radius} ${radius} 0 1 0 ${-2 * radius} 0Z`
}

type Built = Exclude<MemberSection, { shape: 'custom' }>

/** One piece with its lower left corner at x, 0; a second channel or angle stands back to back with the first. */
function piece(section: Built, x: number, mirrored: boolean): string {
  const side = (from: number, width: number, whole: number) => (mirrored ? x + whole - from - width : x + from)
  switch (section.shape) {
    case 'rectangular tube':
    case 'square tube': {
      const [width, height] =
        section.shape === 'square tube' ? [mm(section.side), mm(section.side)] : [mm(section.width), mm(section.height)]
      const wall = mm(section.wall)
      const radius = section.cornerRadius ? mm(section.cornerRadius) : 2 * wall
      const inside = { x: x + wall, y: wall, width: width - 2 * wall, height: height - 2 * wall }
      return boxPath({ x, y: 0, width, height }, radius) + boxPath(inside, radius - wall)
    }
    case 'flat':
      return boxPath({ x, y: 0, width: mm(section.width), height: mm(section.height) })
    case 'channel': {
      const [height, width, web, flange] = [mm(section.height), mm(section.flangeWidth), mm(section.web), mm(section.flange)]
      const back = side(0, 0, width)
      const way = mirrored ? -1 : 1
      const out = way * (width - web)
      return `M${back} 0h${way * width}v${flange}h${-out}v${height - 2 * flange}h${out}v${flange}h${-way * width}Z`
    }
    case 'angle': {
      const [height, width, thickness] = [mm(section.height), mm(section.width), mm(section.thickness)]
      const way = mirrored ? -1 : 1
      return `M${side(0, 0, width)} 0h${way * width}v${thickness}h${-way * (width - thickness)}v${height - thickness}h${-way * thickness}Z`
    }
    case 'round bar': {
      const radius = mm(section.diameter) / 2
      return circlePath(x + radius, radius, radius)
    }
    case 'round tube': {
      const radius = mm(section.diameter) / 2
      return circlePath(x + radius, radius, radius) + circlePath(x + radius, radius, radius - mm(section.wall))
    }
  }
}

function sizeOf(section: Built): { width: number; height: number } {
  switch (section.shape) {
    case 'rectangular tube':
    case 'flat':
    case 'angle':
      return { width: mm(section.width), height: mm(section.height) }
    case 'square tube':
      return { width: mm(section.side), height: mm(section.side) }
    case 'channel':
      return { width: mm(section.flangeWidth), height: mm(section.height) }
    case 'round bar':
    case 'round tube':
      return { width: mm(section.diameter), height: mm(section.diameter) }
  }
}

/**
 * A section from its dimensions, to scale: doubled pieces side by side, plates where they sit; radii of channels and
 * angles and the lean of flanges are left out. Null for one known by figures only.
 */
export function outlineOf(section: MemberSection): SectionOutline | null {
  if (section.shape === 'custom') return null
  const one = sizeOf(section)
  const width = one.width * section.sideBySide
  const paths = Array.from({ length: section.sideBySide }, (_, index) => {
    // Of a pair the left one is turned, so that both stand back to back.
    const mirrored = (section.shape === 'channel' || section.shape === 'angle') && section.sideBySide > 1 && index % 2 === 0
    return piece(section, index * one.width, mirrored)
  })
  let box: Box = { x: 0, y: 0, width, height: one.height }
  const grow = (plate: Box) => {
    paths.push(boxPath(plate))
    const x = Math.min(box.x, plate.x)
    const y = Math.min(box.y, plate.y)
    box = {
      x,
      y,
      width: Math.max(box.x + box.width, plate.x + plate.width) - x,
      height: Math.max(box.y + box.height, plate.y + plate.height) - y,
    }
  }
  const besides = section.plates.filter(({ place }) => place === 'beside')
  besides.forEach((plate, index) => {
    const [high, thick] = [mm(plate.width), mm(plate.thickness)]
    const x = index % 2 === 0 ? box.x + box.width : box.x - thick
    grow({ x, y: one.height / 2 - high / 2, width: thick, height: high })
  })
  for (const plate of section.plates) {
    if (plate.place === 'beside') continue
    const [wide, thick] = [mm(plate.width), mm(plate.thickness)]
    grow({ x: width / 2 - wide / 2, y: plate.place === 'on top' ? box.y + box.height : box.y - thick, width: wide, height: thick })
  }
  return { paths, left: box.x, top: box.y, width: box.width, height: box.height }
}
