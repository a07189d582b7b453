import { UTC_DATES } from '#shared/proof-test/print-dates'
import { cautionsOf } from '#shared/proof-test/record'
import { lateness, noticesOf } from '#shared/proof-test/record-words'
import type { RecordFiles } from '../files'
import { momentText, type RecordOfTest } from '../record'
import { aboutEntry, whereItIs } from '../sheets/photos'
import { mono, normal, stopped, strong } from './cells'
import { contentText } from './content-text'
import { BODY, SMALL, leading, type Paper } from './paper'
import { table, type TableRow } from './table'
import { GRAPHITE, plain, type Line } from './typesetter'

/** What the lead concluded and why, and everything that stands beside the figures. */
export function conclusion(paper: Paper, record: RecordOfTest): void {
  const { state } = record
  const { conclusion: end } = state
  paper.heading('Conclusion')
  if (end) {
    paper.paragraph([
      { text: `Concluded ${end.conclusion}`, style: { ...BODY, weight: 600 } },
      { text: ` by ${record.nameOf(end.by)}, ${momentText(end.at)}.${end.why === '' ? '' : ` ${end.why}`}`, style: BODY },
    ])
  } else paper.paragraph('Not concluded.')
  for (const { title, mark, lines } of noticesOf(record, UTC_DATES)) {
    paper.subheading(title, mark)
    for (const line of lines) paper.paragraph(line, BODY, 1)
  }
}

/** Who took part, and who signed what, when and with which meaning. */
export function signatures(paper: Paper, record: RecordOfTest): void {
  const { opened, state } = record
  const { lead, pumpHand, witness } = opened.people
  paper.heading('People and signatures', {
    note: 'A signature is a person’s printed name, the time, what it means, and their password given again over the hash beside it.',
  })
  table(paper, {
    columns: [{ head: 'Part' }, { head: 'Printed name', wrap: true }, { head: 'Relation to the shop', wrap: true }],
    rows: [
      { cells: ['Lead, who ran the test', strong(lead.name), lead.relation] },
      { cells: ['Pump hand', strong(pumpHand.name), pumpHand.relation] },
      { cells: ['Witness, who was there', strong(witness.name), witness.relation] },
    ],
  })
  paper.subheading('Signatures')
  const late = lateness(state)
  const signed = ([['Lead', state.signed, lead.name] as const, ['Witness', state.countersigned, witness.name] as const] as const).map(
    ([as, signature, name]): TableRow => ({
      cells: signature
        ? [
            as,
            strong(signature.printedName),
            signature.meaning,
            [
              ...normal(`${momentText(signature.signedAt)}, signed with password`),
              ...(as === 'Witness' && late !== null ? stopped(`\n${late}`) : []),
            ],
            mono(signature.headHash),
          ]
        : [as, strong(name), stopped('has not signed'), '', ''],
    }),
  )
  const declined = state.declined.map(({ printedName, why, at }): TableRow => ({
    cells: ['Declined', strong(printedName), why, `${momentText(at)}, signed with password`, ''],
  }))
  table(paper, {
    columns: [
      { head: 'Signed as' },
      { head: 'Printed name', wrap: true },
      { head: 'Meaning of the signature', wrap: true },
      { head: 'When and how', wrap: true },
      { head: 'Hash signed', wrap: true },
    ],
    rows: [...signed, ...declined],
  })
}

/** Every seal in full, and how somebody who trusts nobody checks it. */
export function seals(paper: Paper, record: RecordOfTest, checkAddress: string): void {
  const { state, seals: sealed } = record
  paper.heading('Seal, and how to check it')
  if (sealed.length === 0) {
    paper.paragraph(`No seal yet: it is set over a signature. The last of ${state.headSeq} entries has the hash`)
    paper.paragraph([{ text: state.headHash, style: { size: 7.5, family: 'mono' } }])
  } else {
    table(paper, {
      columns: [{ head: 'Seal' }, { head: 'As the server set it', wrap: true }],
      rows: sealed.flatMap(({ seq, kid, headHash, signature, sealedAt }): TableRow[] => [
        { cells: [strong(`Over entries 1 to ${seq}`), `Sealed ${momentText(sealedAt)}, Ed25519, key ${kid}`] },
        { cells: ['Hash of its last entry', mono(headHash)] },
        { cells: ['Signature of the seal', mono(signature)] },
      ]),
    })
    paper.down(4)
  }
  const hash = sealed.at(-1)?.headHash ?? state.headHash
  for (const [index, step] of [
    `Ask the shop for the ledger file of ${record.opened.number}: every entry of this test, its chain and its seals. This sheet is printed from it.`,
    `Open ${checkAddress}, drop the file there and compare the hash it shows with ${hash.slice(0, 4)} ${hash.slice(4, 8)} … ${hash.slice(-4)} above. It is checked in the browser; nothing is sent.`,
    'Or, with a copy of the program and no server: npm run verify -- FILE. Compare the fingerprint of the key with the one the shop gave you.',
  ].entries()) {
    paper.paragraph(`${index + 1}. ${step}`, BODY, 1)
  }
  paper.paragraph(
    'A paper can be changed; the ledger file can’t without its seal breaking. Where the two differ, the file stands.',
    { ...BODY, ink: GRAPHITE },
    3,
  )
}

/** What these figures are not. */
export function cautions(paper: Paper, record: RecordOfTest): void {
  paper.heading('Cautions')
  for (const caution of cautionsOf(record.state, record.evaluation)) paper.paragraph(caution, BODY, 1)
}

const COLUMNS = 3
const GAP = 10
const HIGHEST = 150

/** A caption of three lines at most; the table under the pictures has the whole of it. */
function captionLines(paper: Paper, text: string, width: number): Line[] {
  const lines = paper.type.wrap(plain(text, SMALL), width)
  if (lines.length <= 3) return lines
  const rest = lines.slice(2).flatMap(({ runs }) => runs.map((run) => run.text))
  const last = paper.type.fit(rest.join(' '), SMALL, width)
  return [...lines.slice(0, 2), { runs: plain(last, SMALL), width: paper.type.width(last, SMALL) }]
}

/** Every photo and document that an entry names: the pictures, then what became of each file. */
export function photos(paper: Paper, record: RecordOfTest, files: RecordFiles): void {
  const { attachments } = record.state
  if (attachments.length === 0) return
  const shown = attachments.flatMap((file, index) => {
    const picture = files.pictures.get(file.sha256)
    return picture ? [{ file, picture, number: index + 1 }] : []
  })
  paper.heading('Photos and documents', {
    note: 'An entry names a file by its SHA-256, and is sealed with it. Pictures are made smaller here; the files themselves are kept with the record.',
  })
  const width = (paper.width - GAP * (COLUMNS - 1)) / COLUMNS
  for (let from = 0; from < shown.length; from += COLUMNS) {
    const row = shown.slice(from, from + COLUMNS).map(({ file, picture, number }) => {
      const scale = Math.min(width / picture.width, HIGHEST / picture.height)
      const words = captionLines(paper, `${number}. Entry ${file.seq}: ${aboutEntry(record, file.seq)}`, width)
      return { picture, words, size: { width: picture.width * scale, height: picture.height * scale }, alt: `Photo of entry ${file.seq}` }
    })
    const tallest = Math.max(...row.map(({ size }) => size.height))
    const wordy = Math.max(...row.map(({ words }) => words.length)) * leading(SMALL.size)
    paper.need(tallest + wordy + 12)
    row.forEach(({ picture, words, size, alt }, column) => {
      const x = paper.left + column * (width + GAP)
      paper.tag('Figure', () => paper.doc.image(picture.jpeg, x, paper.y, size), { alt })
      paper.tag('P', () => paper.lines(words, x, paper.y + tallest + 3, SMALL.size))
    })
    paper.down(tallest + wordy + 12)
  }
  table(paper, {
    size: 7,
    columns: [
      { head: 'No.', align: 'right' },
      { head: 'Entry', align: 'right' },
      { head: 'What the entry says', wrap: true },
      { head: 'Name', wrap: true },
      { head: 'Type' },
      { head: 'Where its bytes are', wrap: true },
      { head: 'SHA-256 of its bytes', wrap: true },
    ],
    rows: attachments.map((file, index) => ({
      cells: [
        String(index + 1),
        String(file.seq),
        aboutEntry(record, file.seq),
        file.name ?? '',
        file.type,
        contentText(whereItIs(record, files, file)),
        mono(file.sha256),
      ],
    })),
  })
}
