import { create } from 'qrcode'

/** White round the code that ISO/IEC 18004 asks for, in modules. */
const QUIET = 4

/** Whether the module in a row and column of a code is dark. */
export function darkModules(text: string): { size: number; dark: (row: number, column: number) => boolean } {
  // Q: a quarter of it may be scratched or under grease, and it is still read.
  const { modules } = create(text, { errorCorrectionLevel: 'Q' })
  return { size: modules.size, dark: (row, column) => modules.get(row, column) === 1 }
}

/** An address as a QR code, drawn in black on its own white, so that it scans from a dark screen too. */
export function QrCode({ text, className }: { text: string; className?: string }) {
  const { size, dark } = darkModules(text)
  const runs: string[] = []
  for (let row = 0; row < size; row += 1) {
    for (let column = 0; column < size; column += 1) {
      if (!dark(row, column)) continue
      const from = column
      while (column + 1 < size && dark(row, column + 1)) column += 1
      runs.push(`M${from + QUIET} ${row + QUIET}h${column - from + 1}v1h-${column - from + 1}z`)
    }
  }
  const side = size + 2 * QUIET
  return (
    <svg viewBox={`0 0 ${side} ${side}`} role="img" aria-label={`QR code of ${text}`} shapeRendering="crispEdges" className={className}>
      <rect width={side} height={side} fill="#fff" />
      <path d={runs.join('')} fill="#000" />
    </svg>
  )
}
