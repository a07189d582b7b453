/** A text as a PDF string: ASCII only, its brackets escaped (ISO 32000-1, 7.3.4.2). */
const pdfString = (text: string): string => `(${text.replace(/[^\x20-\x7e]/g, '?').replace(/[\\()]/g, (sign) => `\\${sign}`)})`

/** One page with lines of text, by the font that every reader of PDF has (ISO 32000-1, 7.5 and 9.6.2.2). */
export function plainPdf(lines: readonly string[]): Buffer {
  const drawn = lines
    .map((line, index) => `BT /F1 ${index === 0 ? 22 : 12} Tf 60 ${740 - index * 28} Td ${pdfString(line)} Tj ET`)
    .join('\n')
  const objects = [
    '<< /Type /Catalog /Pages 2 0 R >>',
    '<< /Type /Pages /Kids [3 0 R] /Count 1 >>',
    '<< /Type /Page /Parent 2 0 R /MediaBox [0 0 595 842] /Contents 4 0 R /Resources << /Font << /F1 5 0 R >> >> >>',
    `<< /Length ${drawn.length} >>\nstream\n${drawn}\nendstream`,
    '<< /Type /Font /Subtype /Type1 /BaseFont /Helvetica >>',
  ]
  let text = '%PDF-1.4\n'
  const places = objects.map((object, index) => {
    const at = text.length
    text += `${index + 1} 0 obj\n${object}\nendobj\n`
    return at
  })
  const table = [
    `xref\n0 ${objects.length + 1}`,
    '0000000000 65535 f ',
    ...places.map((at) => `${String(at).padStart(10, '0')} 00000 n `),
  ].join('\n')
  text += `${table}\ntrailer\n<< /Size ${objects.length + 1} /Root 1 0 R >>\nstartxref\n${text.length}\n%%EOF\n`
  return Buffer.from(text, 'latin1')
}
