import type { Workbook } from 'exceljs'
import type { JointExamination } from '#shared/proof-test/state'
import type { RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, colours, put, putRow, type Column, type Content } from '../sheet'

export const JOINTS_SHEET = 'Joints'

const examined = (when: string): Column[] => [
  { header: `${when}`, width: 11 },
  { header: 'Method', width: 16 },
  { header: 'By', width: 18 },
  { header: 'At (UTC)', width: 19 },
  { header: 'Remark', width: 22, wrap: true },
]

const columns: Column[] = [
  { header: 'No.', width: 5, align: 'right' },
  { header: 'Joint', width: 28 },
  { header: 'Kind', width: 9 },
  { header: 'Detail', width: 24 },
  { header: 'Between', width: 28 },
  { header: 'Make-up', width: 10 },
  { header: 'Made by', width: 16 },
  { header: 'Filler', width: 16 },
  { header: 'Made on', width: 11 },
  ...examined('Before load'),
  ...examined('After load'),
]

function examination(record: RecordOfTest, examination: JointExamination | null): Content[] {
  if (!examination) return [{ words: 'not examined', bold: true, colour: colours.stop }, null, null, null, null]
  const colour = examination.result === 'accepted' ? colours.sound : colours.stop
  return [
    { words: examination.result, bold: true, colour },
    examination.method,
    record.nameOf(examination.by),
    { moment: examination.at },
    examination.remark,
  ]
}

/** Every joint of the load path, with its examination before and after the load. */
export function jointsSheet(workbook: Workbook, record: RecordOfTest): void {
  const { state, opened } = record
  const nameOf = (id: string): string => opened.press.members.find((member) => member.id === id)?.name ?? 'a member not listed'
  const confirmed = state.loadPathConfirmed
  const note = confirmed
    ? `That no joint is missing was confirmed by ${record.nameOf(confirmed.by)} (${confirmed.as}), ${confirmed.at.slice(0, 19)}Z. Dye penetrant finds surface cracks only.`
    : 'Nobody confirmed that no joint is missing.'
  const sheet = addSheet(workbook, JOINTS_SHEET, { title: 'Joints', note, record: record.title }, columns)
  state.joints.forEach(({ joint, makeUp, before, after, fellBackBecause }, index) => {
    const row = FIRST_ROW + index
    putRow(sheet, row, columns, [
      { number: joint.number, format: '0' },
      joint.name,
      joint.kind,
      joint.detail,
      joint.between.map(nameOf).join(' and '),
      makeUp,
      joint.madeBy,
      joint.filler,
      joint.madeOn,
      ...examination(record, before),
      ...examination(record, after),
    ])
    if (fellBackBecause) put(sheet.getCell(row, columns.length + 1), `fell back: ${fellBackBecause}`)
  })
}
