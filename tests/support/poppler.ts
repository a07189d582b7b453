import { execFile } from 'node:child_process'
import { mkdtemp, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { promisify } from 'node:util'

const run = promisify(execFile)

export interface ReadPdf {
  /** All words, every stretch of white space as one blank. */
  words: string
  /** The words of each page, set out as they stand on it. */
  pages: string[]
  info: Record<string, string>
  /** Name, whether embedded, whether only the letters that are used. */
  fonts: { name: string; embedded: boolean; subset: boolean }[]
  /** What the reader complained of. */
  complaints: string
}

const oneBlank = (text: string): string => text.replace(/\s+/gu, ' ')

/** A PDF as Poppler reads it, a program that this one has nothing to do with. */
export async function readPdf(bytes: Buffer): Promise<ReadPdf> {
  const folder = await mkdtemp(join(tmpdir(), 'record-pdf-'))
  try {
    const file = join(folder, 'record.pdf')
    await writeFile(file, bytes)
    const [flowing, laid, told, listed] = await Promise.all([
      run('pdftotext', ['-raw', file, '-']),
      run('pdftotext', ['-layout', file, '-'], { maxBuffer: 16 * 1024 * 1024 }),
      run('pdfinfo', [file]),
      run('pdffonts', [file]),
    ])
    const info = Object.fromEntries(
      told.stdout.split('\n').map((line) => [line.split(':')[0] ?? '', line.slice(line.indexOf(':') + 1).trim()]),
    )
    const fonts = listed.stdout
      .split('\n')
      .slice(2)
      .filter((line) => line.trim() !== '')
      .map((line) => {
        const marks = /\s(yes|no)\s+(yes|no)\s+(yes|no)\s+\d+\s+\d+\s*$/.exec(line)
        return { name: line.split(' ')[0] ?? '', embedded: marks?.[1] === 'yes', subset: marks?.[2] === 'yes' }
      })
    return {
      words: oneBlank(flowing.stdout),
      pages: laid.stdout.split('\f').slice(0, -1),
      info,
      fonts,
      complaints: [flowing, laid, told, listed].map(({ stderr }) => stderr).join(''),
    }
  } finally {
    await rm(folder, { recursive: true, force: true })
  }
}
