import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { create, type Font } from 'fontkit'
import { sfntOf } from './sfnt'

/** Where the letters of a record come from: IBM Plex, embedded, with further subsets for names from anywhere. */
export type Family = 'sans' | 'condensed' | 'mono'
export type Weight = 400 | 500 | 600

const PACKAGES: Record<Family, { name: string; subsets: readonly string[] }> = {
  sans: { name: 'ibm-plex-sans', subsets: ['latin', 'latin-ext', 'cyrillic', 'cyrillic-ext', 'greek', 'vietnamese'] },
  condensed: { name: 'ibm-plex-sans-condensed', subsets: ['latin', 'latin-ext', 'cyrillic-ext', 'vietnamese'] },
  mono: { name: 'ibm-plex-mono', subsets: ['latin', 'latin-ext', 'cyrillic', 'cyrillic-ext', 'vietnamese'] },
}

export interface Face {
  /** Unique among all faces. */
  name: string
  bytes: Buffer
  has(codePoint: number): boolean
}

const locate = createRequire(import.meta.url)
const faces = new Map<string, Face>()

/** Signs without ink: some subsets end with one, and fontkit then reads past the end of the file's outlines. */
const BLANK = new Set([0x00, 0x0d, 0x20, 0xa0])

function canBeSet(font: Font, codePoint: number): boolean {
  if (!BLANK.has(codePoint)) return true
  try {
    font.layout(String.fromCodePoint(codePoint))
    return true
  } catch (error) {
    if (error instanceof RangeError) return false
    throw error
  }
}

/** One file of letters, read once. */
function face(family: Family, subset: string, weight: Weight): Face {
  const { name } = PACKAGES[family]
  const file = `@fontsource/${name}/files/${name}-${subset}-${weight}-normal.woff`
  const known = faces.get(file)
  if (known) return known
  const bytes = sfntOf(readFileSync(locate.resolve(file)))
  const font: Font = create(bytes) as Font
  const covered = new Set(font.characterSet.filter((codePoint) => canBeSet(font, codePoint)))
  const made = { name: `${family} ${subset} ${weight}`, bytes, has: (codePoint: number) => covered.has(codePoint) }
  faces.set(file, made)
  return made
}

/** The faces a text may be set in, the best first; sans has more alphabets than the narrow cut and the mono. */
export function facesOf(family: Family, weight: Weight): (() => Face)[] {
  const own = PACKAGES[family].subsets.map((subset) => () => face(family, subset, weight))
  if (family === 'sans') return own
  return [...own, ...PACKAGES.sans.subsets.map((subset) => () => face('sans', subset, weight))]
}
