import sharp from 'sharp'

const SIZE = { width: 1200, height: 900 }

/** Letters as strokes on a field of 4 × 6: a machine that draws them needs no fonts. */
const STROKES: Record<string, string> = {
  A: 'M0 6L2 0L4 6M1 4L3 4',
  C: 'M4 1L3 0L1 0L0 1L0 5L1 6L3 6L4 5',
  D: 'M0 0L0 6L2.5 6L4 4.5L4 1.5L2.5 0Z',
  E: 'M4 0L0 0L0 6L4 6M0 3L3 3',
  G: 'M4 1L3 0L1 0L0 1L0 5L1 6L3 6L4 5L4 3L2.5 3',
  H: 'M0 0L0 6M4 0L4 6M0 3L4 3',
  I: 'M2 0L2 6',
  M: 'M0 6L0 0L2 3L4 0L4 6',
  N: 'M0 6L0 0L4 6L4 0',
  O: 'M1 0L3 0L4 1L4 5L3 6L1 6L0 5L0 1Z',
  P: 'M0 6L0 0L3 0L4 1L4 2L3 3L0 3',
  R: 'M0 6L0 0L3 0L4 1L4 2L3 3L0 3M2 3L4 6',
  T: 'M0 0L4 0M2 0L2 6',
  V: 'M0 0L2 6L4 0',
  W: 'M0 0L1 6L2 2.5L3 6L4 0',
}

function letters(words: string, x: number, y: number, size: number): string {
  return [...words]
    .map((letter, index) => {
      const stroke = STROKES[letter]
      return stroke === undefined
        ? ''
        : `<path d="${stroke}" transform="translate(${x + index * 5.4 * size} ${y}) scale(${size})" vector-effect="non-scaling-stroke"/>`
    })
    .join('')
}

/** A weld seen from the side: ripples along a seam between two plates. */
function seam(y: number): string {
  const ripples = Array.from({ length: 34 }, (_, index) => `<path d="M${120 + index * 28} ${y - 26}q22 26 0 52"/>`)
  return `<rect x="110" y="${y - 28}" width="980" height="56" rx="28" fill="#8d99a3"/>${ripples.join('')}`
}

const SUBJECTS = {
  'scaled beam': `<rect x="90" y="250" width="1020" height="330" fill="#b9c2c9"/><path d="M180 300l90 40l-30 70l80 60l-60 50M330 320l60 90l-40 60" stroke="#e8c84a"/>`,
  'cracked weld': `<rect x="90" y="200" width="1020" height="200" fill="#b9c2c9"/><rect x="90" y="430" width="1020" height="230" fill="#a5afb7"/>${seam(415)}<path d="M430 376l40 22l30 -14l44 24l36 -10l50 26" stroke="#a00d17" stroke-width="7"/>`,
  'sound weld': `<rect x="90" y="200" width="1020" height="200" fill="#b9c2c9"/><rect x="90" y="430" width="1020" height="230" fill="#a5afb7"/>${seam(415)}`,
} as const
export type DrawnSubject = keyof typeof SUBJECTS

/** What stands for a photo in the demo shop: a drawing that says that it is one. */
export function demoPhoto(subject: DrawnSubject): Promise<Buffer> {
  const svg = [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${SIZE.width}" height="${SIZE.height}" fill="none" stroke="#364459" stroke-width="4" stroke-linecap="round" stroke-linejoin="round">`,
    `<rect width="${SIZE.width}" height="${SIZE.height}" fill="#dfe5e9" stroke="none"/>`,
    SUBJECTS[subject],
    `<g stroke="#142a66" stroke-width="9">${letters('DEMO DRAWING', 90, 720, 10)}</g>`,
    `<g stroke="#142a66" stroke-width="6">${letters('NOT A PHOTO', 90, 815, 6)}</g>`,
    '</svg>',
  ].join('')
  return sharp(Buffer.from(svg)).jpeg({ quality: 82 }).toBuffer()
}
