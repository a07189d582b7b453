import { createRequire } from 'node:module'
import { openSync } from 'fontkit'
import type { Font } from 'fontkit'

/**
 * Words as outlines. The picture is drawn where no fonts are installed, and the renderer takes no web fonts;
 * so each letter is taken from the font file and placed by hand.
 */
type Weight = 400 | 500 | 600

const locate = createRequire(import.meta.url)
const opened = new Map<string, Font>()

function fontFor(condensed: boolean, weight: Weight): Font {
  const name = condensed ? 'ibm-plex-sans-condensed' : 'ibm-plex-sans'
  const file = `@fontsource/${name}/files/${name}-latin-${weight}-normal.woff2`
  const known = opened.get(file)
  if (known !== undefined) return known
  const font = openSync(locate.resolve(file))
  if (!('layout' in font)) throw new TypeError(`${file} holds several fonts.`)
  opened.set(file, font)
  return font
}

export interface Words {
  text: string
  x: number
  /** Base line. */
  y: number
  size: number
  weight: Weight
  condensed: boolean
  anchor: 'start' | 'middle' | 'end'
}

const rounded = (value: number): string => String(Math.round(value * 100) / 100)

/** SVG path data (px) of a line of text. A letter that the font lacks leaves a narrow gap. */
export function textPath({ text, x, y, size, weight, condensed, anchor }: Words): string {
  const font = fontFor(condensed, weight)
  const run = font.layout(text)
  const scale = size / font.unitsPerEm
  // The font lacks the narrow space of "75 %", and its sign for a missing letter is far wider.
  const advances = run.positions.map((position, index) => (run.glyphs[index]?.id === 0 ? size / 5 : position.xAdvance * scale))
  const width = advances.reduce((sum, advance) => sum + advance, 0)
  let pen = anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2
  const parts: string[] = []
  run.glyphs.forEach((glyph, index) => {
    const position = run.positions[index]
    if (position === undefined) return
    const left = pen + position.xOffset * scale
    const base = y - position.yOffset * scale
    if (glyph.id !== 0) {
      for (const { command, args } of glyph.path.commands) {
        const places = args.map((value, at) => rounded(at % 2 === 0 ? left + value * scale : base - value * scale))
        parts.push(`${letters[command] ?? ''}${places.join(' ')}`)
      }
    }
    pen += advances[index] ?? 0
  })
  return parts.join('')
}

const letters: Record<string, string> = { moveTo: 'M', lineTo: 'L', quadraticCurveTo: 'Q', bezierCurveTo: 'C', closePath: 'Z' }
