import { facesOf, type Face, type Family, type Weight } from './fonts'

/** Words on paper: measured, broken into lines, and set in faces that have their letters. */

export interface Style {
  /** pt. */
  size: number
  weight?: Weight
  family?: Family
  ink?: string
  /** Struck through in red: what was typed before a correction. */
  struck?: boolean
  /** Set small and high: the letter of a correction. */
  raised?: boolean
}

export interface Run {
  text: string
  style: Style
}

/** Part of a run that one face can set. `sign` stands for a sign that no face has and that is drawn. */
interface Piece {
  text: string
  face: Face
  sign: Sign | null
}

interface Sign {
  /** What a reader, a search and a copy find. */
  actual: string
  /** Drawn with a bar under it. */
  base: string
}

export interface Line {
  runs: Run[]
  width: number
}

export const INK = '#0b1733'
export const GRAPHITE = '#364459'
export const HAIRLINE = '#a9b5c0'
export const RULE = '#5c6b7e'
export const STOP = '#960b15'
export const SOUND = '#085039'

/** Signs that IBM Plex's web subsets lack, drawn from one they have. */
const SIGNS: Record<string, Sign> = { '≤': { actual: '≤', base: '<' }, '≥': { actual: '≥', base: '>' } }
/** What stands for signs that are missing or blank in some subsets; lines have been broken before, so no space breaks here. */
const SPACES: Record<string, string> = { '\u00a0': ' ', '\u202f': '\u2009', '\t': ' ', '→': '–', '\u2011': '-' }
const MISSING = '\ufffd'

const weightOf = ({ weight = 400 }: Style): Weight => weight
const sizeOf = ({ size, raised }: Style): number => (raised === true ? size * 0.72 : size)

export class Typesetter {
  readonly #registered = new Set<string>()
  readonly #widths = new Map<string, number>()
  readonly #pieces = new Map<string, Piece[]>()

  constructor(private readonly doc: PDFKit.PDFDocument) {}

  #piecesOf(text: string, style: Style): Piece[] {
    const key = `${style.family ?? 'sans'} ${weightOf(style)} ${text}`
    const known = this.#pieces.get(key)
    if (known) return known
    const faces = facesOf(style.family ?? 'sans', weightOf(style))
    const pieces: Piece[] = []
    for (const typed of text) {
      const letter = SPACES[typed] ?? typed
      const sign = SIGNS[letter] ?? null
      const wanted = sign?.base ?? letter
      const found = faces.find((face) => face().has(wanted.codePointAt(0) ?? 0))
      const face = (found ?? faces[0])?.()
      if (!face) continue
      const shown = found ? wanted : MISSING
      const last = pieces.at(-1)
      if (last && last.face === face && last.sign === null && sign === null) last.text += shown
      else pieces.push({ text: shown, face, sign })
    }
    this.#pieces.set(key, pieces)
    return pieces
  }

  #use(face: Face, style: Style): void {
    if (!this.#registered.has(face.name)) {
      this.doc.registerFont(face.name, face.bytes)
      this.#registered.add(face.name)
    }
    this.doc.font(face.name).fontSize(sizeOf(style))
  }

  /** Width of a text on one line, pt. */
  width(text: string, style: Style): number {
    const key = `${style.family ?? 'sans'} ${weightOf(style)} ${sizeOf(style)} ${text}`
    const known = this.#widths.get(key)
    if (known !== undefined) return known
    const width = this.#piecesOf(text, style).reduce((sum, piece) => {
      this.#use(piece.face, style)
      return sum + this.doc.widthOfString(piece.text)
    }, 0)
    this.#widths.set(key, width)
    return width
  }

  widthOf(runs: readonly Run[]): number {
    return runs.reduce((sum, { text, style }) => sum + this.width(text, style), 0)
  }

  /** The width below which some word would have to be broken. */
  longestWord(runs: readonly Run[]): number {
    return Math.max(0, ...runs.flatMap(({ text, style }) => text.split(/[ \n]/).map((word) => this.width(word, style))))
  }

  /** Breaks words that are wider than a line by themselves. */
  #broken({ text, style }: Run, width: number): string[] {
    if (this.width(text, style) <= width) return [text]
    const parts: string[] = []
    let part = ''
    for (const letter of text) {
      if (part !== '' && this.width(part + letter, style) > width) {
        parts.push(part)
        part = ''
      }
      part += letter
    }
    return part === '' ? parts : [...parts, part]
  }

  /** Lines no wider than `width` (pt), broken at spaces, within words only where a word alone is too wide. */
  wrap(runs: readonly Run[], width: number): Line[] {
    const lines: Line[] = [{ runs: [], width: 0 }]
    const last = (): Line => lines[lines.length - 1] ?? { runs: [], width: 0 }
    const open = (): void => void lines.push({ runs: [], width: 0 })
    const add = (text: string, style: Style): void => {
      const line = last()
      const end = line.runs.at(-1)
      if (end?.style === style) end.text += text
      else line.runs.push({ text, style })
      line.width = this.widthOf(line.runs)
    }
    for (const { text, style } of runs) {
      text.split('\n').forEach((paragraph, index) => {
        if (index > 0) open()
        for (const [, space = '', word = ''] of paragraph.matchAll(/( *)([^ ]*)/g)) {
          if (space === '' && word === '') continue
          const wanted = this.width(space + word, style)
          if (last().width + wanted <= width + 0.01 || (last().width === 0 && this.width(word, style) <= width)) {
            add(last().width === 0 ? word : space + word, style)
            continue
          }
          for (const [at, part] of this.#broken({ text: word, style }, width).entries()) {
            if (at > 0 || last().width > 0) open()
            add(part, style)
          }
        }
      })
    }
    return lines
  }

  /** As much of a text as fits on one line, with an ellipsis where something was left out. */
  fit(text: string, style: Style, width: number): string {
    if (this.width(text, style) <= width) return text
    const letters = [...text]
    while (letters.length > 0 && this.width(`${letters.join('').trimEnd()}…`, style) > width) letters.pop()
    return `${letters.join('').trimEnd()}…`
  }

  /** Sets a text from `x` with its base line at `y`; returns where it ends. */
  set(text: string, x: number, y: number, style: Style): number {
    const { doc } = this
    const ink = style.struck === true ? STOP : (style.ink ?? INK)
    const base = style.raised === true ? y - style.size * 0.32 : y
    let pen = x
    for (const piece of this.#piecesOf(text, style)) {
      this.#use(piece.face, style)
      const width = doc.widthOfString(piece.text)
      doc.fillColor(ink)
      if (piece.sign) {
        const size = sizeOf(style)
        doc.markContent('Span', { actual: piece.sign.actual })
        doc.text(piece.text, pen, base - size * 0.06, { lineBreak: false, baseline: 'alphabetic' })
        doc.endMarkedContent()
        doc.rect(pen + width * 0.1, base - size * 0.02, width * 0.8, size * 0.07).fill(ink)
      } else doc.text(piece.text, pen, base, { lineBreak: false, baseline: 'alphabetic' })
      pen += width
    }
    if (style.struck === true) {
      const middle = base - sizeOf(style) * 0.3
      doc
        .moveTo(x - 0.5, middle)
        .lineTo(pen + 0.5, middle)
        .lineWidth(0.8)
        .strokeColor(STOP)
        .stroke()
    }
    return pen
  }

  /** Sets a line that was broken before, from `x`, its base line at `y`. */
  setLine({ runs }: Line, x: number, y: number): void {
    let pen = x
    for (const { text, style } of runs) pen = this.set(text, pen, y, style)
  }
}

/** A text as runs in one style. */
export const plain = (text: string, style: Style): Run[] => (text === '' ? [] : [{ text, style }])
