import type { Workbook } from 'exceljs'
import { momentText, type RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, header, heading, putRow, type Column } from '../sheet'

export const PEOPLE_SHEET = 'People and signatures'

const columns: Column[] = [
  { header: 'Part', width: 22 },
  { header: 'Printed name', width: 28 },
  { header: 'Relation to the shop', width: 40, wrap: true },
]

const signatureColumns: Column[] = [
  { header: 'Signed as', width: 22 },
  { header: 'Printed name', width: 28 },
  { header: 'Meaning of the signature', width: 40, wrap: true },
  { header: 'When', width: 36 },
  { header: 'How', width: 22 },
  { header: 'Hash signed', width: 68 },
]

const DAY = 24 * 3600 * 1000

/** Who took part, and who signed what, when, and with which meaning. */
export function peopleSheet(workbook: Workbook, record: RecordOfTest): void {
  const { opened, state } = record
  const { lead, pumpHand, witness } = opened.people
  const note = 'A signature is a person’s printed name, the time, what it means, and their password given again over the hash beside it.'
  const sheet = addSheet(workbook, PEOPLE_SHEET, { title: 'People and signatures', note, record: record.title }, columns)
  signatureColumns.forEach(({ width }, index) => (sheet.getColumn(index + 1).width = width))
  const parts = [
    ['Lead, who ran the test', lead],
    ['Pump hand', pumpHand],
    ['Witness, who was there', witness],
  ] as const
  parts.forEach(([part, person], index) =>
    putRow(sheet, FIRST_ROW + index, columns, [part, { words: person.name, bold: true }, person.relation]),
  )

  let row = FIRST_ROW + parts.length + 1
  heading(sheet, row, 'Signatures')
  header(sheet, row + 1, signatureColumns)
  row += 2
  const late = state.signed && state.countersigned ? Date.parse(state.countersigned.signedAt) - Date.parse(state.signed.signedAt) : 0
  for (const [as, signature] of [['Lead', state.signed] as const, ['Witness', state.countersigned] as const]) {
    if (!signature) {
      putRow(sheet, row, signatureColumns, [as, `${as === 'Lead' ? lead.name : witness.name} has not signed`])
    } else {
      const hours = as === 'Witness' && late > DAY ? `; ${Math.round(late / 3600000)} hours after the lead` : ''
      putRow(sheet, row, signatureColumns, [
        as,
        { words: signature.printedName, bold: true },
        signature.meaning,
        `${momentText(signature.signedAt)}${hours}`,
        'signed with password',
        signature.headHash,
      ])
    }
    row += 1
  }
  for (const declined of state.declined) {
    putRow(sheet, row, signatureColumns, [
      'Declined',
      { words: declined.printedName, bold: true },
      declined.why,
      momentText(declined.at),
      'signed with password',
    ])
    row += 1
  }
  for (const seal of record.seals) {
    putRow(sheet, row, signatureColumns, [
      `Seal over entry ${seal.seq}`,
      `key ${seal.kid}`,
      'Ed25519 of this server over the hash beside it',
      momentText(seal.sealedAt),
      '',
      seal.headHash,
    ])
    putRow(sheet, row + 1, signatureColumns, ['', '', 'signature of the seal', '', '', seal.signature])
    row += 2
  }
}
