import type { Workbook } from 'exceljs'
import type { NamedAttachment } from '#shared/ledger/attachments'
import type { ProofTestDraft } from '#shared/proof-test/entries'
import { MOST_PICTURES, type RecordFiles } from '../files'
import { momentText, type RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, colours, put, putRow, type Column, type Content } from '../sheet'

export const PHOTOS_SHEET = 'Photos'

/** px of a picture on the sheet; in the file it is larger and can be drawn out. */
const SHOWN = { width: 300, height: 225 }
const POINTS_PER_PIXEL = 0.75

const columns: Column[] = [
  { header: 'No.', width: 6, align: 'right' },
  { header: 'Entry', width: 7, align: 'right' },
  { header: 'What the entry says', width: 36, wrap: true },
  { header: 'Name', width: 24, wrap: true },
  { header: 'Type', width: 16 },
  { header: 'Size, bytes', width: 11, align: 'right' },
  { header: 'Where its bytes are', width: 34, wrap: true },
  { header: 'SHA-256 of its bytes', width: 38, wrap: true },
  { header: 'Picture, made smaller', width: 46 },
]

/** Points that a row of wrapped words takes: programs that open a workbook don't grow its rows by themselves. */
function heightOf(contents: readonly Content[]): number {
  const lines = contents.map((content, index) => {
    const words = typeof content === 'string' ? content : content !== null && 'words' in content ? content.words : ''
    return Math.ceil((words.length * 1.1) / (columns[index]?.width ?? 1))
  })
  return 6 + 13 * Math.max(1, ...lines)
}

/** What an entry is about, in a few words: what the photo should show. */
export function aboutEntry({ entries, state }: RecordOfTest, seq: number): string {
  const entry = entries.find((one) => one.seq === seq)
  if (!entry) return ''
  const draft = { kind: entry.kind, payload: entry.payload } as ProofTestDraft
  const joint = (id: string): string => `Joint ${state.joints.find((one) => one.joint.id === id)?.joint.number ?? '?'}`
  switch (draft.kind) {
    case 'joint-examined':
      return `${joint(draft.payload.jointId)} examined, ${draft.payload.occasion}: ${draft.payload.result}`
    case 'joint-worked':
      return `${joint(draft.payload.jointId)} worked on: ${draft.payload.makeUp}`
    case 'observed':
      return draft.payload.note
    case 'stopped':
      return `Stopped: ${draft.payload.why}`
    default:
      return entry.kind.replaceAll('-', ' ')
  }
}

/** Whether the bytes of a file are here, altered, given up or not here. */
export function whereItIs(record: RecordOfTest, files: RecordFiles, { sha256, lost }: NamedAttachment): Content {
  if (files.altered.has(sha256)) return { words: 'Altered after it was kept: not shown', bold: true, colour: colours.stop }
  if (files.present.has(sha256)) return 'On the server'
  if (lost) return { words: `Declared lost by ${record.nameOf(lost.by)}, ${momentText(lost.at)}: ${lost.why}`, colour: colours.stop }
  return { words: 'Not on the server', bold: true, colour: colours.stop }
}

/** Every photo and document that an entry names, with the picture where there is one. */
export function photosSheet(workbook: Workbook, record: RecordOfTest, files: RecordFiles): void {
  const { attachments } = record.state
  const note = `An entry names a file by its SHA-256, and is sealed with it. The first ${MOST_PICTURES} photos stand here as pictures, made smaller; the files themselves are kept with the record.`
  const sheet = addSheet(workbook, PHOTOS_SHEET, { title: 'Photos and documents', note, record: record.title }, columns)
  if (attachments.length === 0) {
    put(sheet.getCell(FIRST_ROW, 1), 'No entry names a photo or document.')
    return
  }
  const images = new Map<string, number>()
  attachments.forEach((file, index) => {
    const row = FIRST_ROW + index
    const contents: Content[] = [
      { number: index + 1, format: '0' },
      { number: file.seq, format: '0' },
      aboutEntry(record, file.seq),
      file.name ?? '',
      file.type,
      { number: file.size, format: '#,##0' },
      whereItIs(record, files, file),
      file.sha256,
    ]
    putRow(sheet, row, columns, contents)
    sheet.getRow(row).height = heightOf(contents)
    const picture = files.pictures.get(file.sha256)
    if (!picture) return
    const scale = Math.min(1, SHOWN.width / picture.width, SHOWN.height / picture.height)
    const [width, height] = [Math.round(picture.width * scale), Math.round(picture.height * scale)]
    sheet.getRow(row).height = Math.max(heightOf(contents), (height + 12) * POINTS_PER_PIXEL)
    // Named by several entries, it is in the file once.
    const image = images.get(file.sha256) ?? workbook.addImage({ base64: picture.jpeg.toString('base64'), extension: 'jpeg' })
    images.set(file.sha256, image)
    sheet.addImage(image, { tl: { col: columns.length - 1 + 0.03, row: row - 1 + 0.03 }, ext: { width, height }, editAs: 'oneCell' })
  })
}
