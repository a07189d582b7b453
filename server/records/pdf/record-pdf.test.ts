import { createHash } from 'node:crypto'
import { beforeAll, describe, expect, it, vi } from 'vitest'
import {
  countersignedLater,
  firstClimb,
  recordedTest,
  repeatClimb,
  stoppedTest,
  storedEntries,
  twoLegTest,
  type RecordedTest,
} from '../../../tests/factories/recorded-test'
import { openedPayload } from '../../../tests/factories/test-press'
import { picture } from '../../../tests/factories/files'
import { readPdf, type ReadPdf } from '../../../tests/support/poppler'
import type { PaperSize } from '#shared/api/records'
import { marginWords } from '#shared/proof-test/criterion-words'
import { cautionsOf, headlineOf } from '#shared/proof-test/record'
import { NO_FILES, type RecordFiles } from '../files'
import { recordOf, type RecordSource } from '../record'
import { recordPdf } from './record-pdf'

vi.setConfig({ testTimeout: 120_000, hookTimeout: 120_000 })

const seal = (recorded: RecordedTest) => {
  const last = recorded.entries.at(-1)
  if (!last) throw new Error('The test has entries.')
  return {
    kid: '0123456789abcdef',
    ledgerId: recorded.id,
    seq: last.seq,
    headHash: last.hash,
    sealedAt: last.receivedAt,
    signature: 'c4'.repeat(64),
  }
}

function sourceOf(recorded: RecordedTest, changes: Partial<RecordSource> = {}): RecordSource {
  return {
    id: recorded.id,
    stored: storedEntries(recorded.entries),
    people: recorded.people,
    seals: [],
    writtenAt: '2026-09-21T08:00:00.000Z',
    ...changes,
  }
}

async function bytesOf(source: RecordSource, paper: PaperSize = 'a4', files: RecordFiles = NO_FILES): Promise<Buffer> {
  const parts: Buffer[] = []
  for await (const part of recordPdf(source, { paper, files, checkAddress: 'https://press.example/check' })) parts.push(part as Buffer)
  return Buffer.concat(parts)
}

const printed = async (recorded: RecordedTest, paper: PaperSize = 'a4'): Promise<ReadPdf> =>
  readPdf(await bytesOf(sourceOf(recorded), paper))
/** Without white space: Poppler makes of a narrow space a blank or nothing, as it thinks fit. */
const said = (text: string): string => text.replace(/\s+/gu, '')

/** Every page but the last is full enough, none is empty, and each bears its number. */
function expectWholePages({ pages, info, complaints }: ReadPdf): void {
  expect(complaints).toBe('')
  expect(pages).toHaveLength(Number(info['Pages']))
  pages.forEach((page, index) => {
    expect(said(page)).toContain(said(`Page ${index + 1} of ${pages.length}`))
    // Zones, head and foot alone come to about 40 words.
    expect(page.split(/\s+/u).length, `page ${index + 1}`).toBeGreaterThan(70)
  })
}

describe('the record of a countersigned test on paper', () => {
  const recorded = recordedTest()
  const record = recordOf(sourceOf(recorded, { seals: [seal(recorded)] }))
  let pdf: ReadPdf
  beforeAll(async () => {
    pdf = await readPdf(await bytesOf(sourceOf(recorded, { seals: [seal(recorded)] })))
  })

  it('says on its first page what was tested, what it came to, by whom, until when, and what nobody measured', () => {
    const [first = ''] = pdf.pages
    for (const words of [
      'PT-0043',
      'Press 2, straightening press',
      'Hollin Bridge Fabricating',
      'Accepted. Cleared up to 11.7 short tons',
      '104.0 kN, rated 12 short tons. Gauge G-02 not past 7 650 psi. Bed hole 4, ram central.',
      'Cleared by Marit Sandoval on 15 September 2026 after two static loads.',
      'First load by quarters, version 3.',
      'Within every limit checked',
      'Head beam, left upright and right upright not measured',
      'I ran this test and these are its readings.',
      'I was present and read the gauge myself.',
      'works next door, no part in the build',
      'Chain whole over 68 entries',
    ])
      expect(said(first)).toContain(said(words))
    expect(said(first)).toContain(said('Until 15 March 2027'))
  })

  it('has every criterion with its reading and limit, and the worst of them on page one', () => {
    const [first = ''] = pdf.pages
    for (const { reading, limitText } of record.evaluation.criteria) {
      expect(said(first)).toContain(said(reading))
      expect(said(pdf.words)).toContain(said(limitText))
    }
    const all = record.evaluation.climbs.flatMap((climb) => [
      ...climb.stages.flatMap(({ criteria }) => criteria),
      ...(climb.set?.criteria ?? []),
    ])
    expect(said(pdf.words)).toContain(said(`Every criterion, ${all.length} in all`))
    for (const criterion of all) {
      const margin = marginWords(record.opened, criterion)
      expect(said(pdf.words)).toContain(said(`${criterion.label} ${criterion.reading}`))
      expect(said(pdf.words)).toContain(said(`${criterion.limitText} ${margin}`))
    }
  })

  it('has every reading as it was typed, and what was struck with its letter', () => {
    const typed = [firstClimb, repeatClimb].flatMap((climb) => climb.stages.flatMap(({ start, end }) => [start, end]))
    const rows = said(pdf.words.slice(pdf.words.indexOf('Every reading')))
    const corrected: string[] = []
    for (const [gauge, ...points] of typed) {
      // The corrected ones are looked at below.
      if (!rows.includes(said(`${gauge} ${points.join(' ')}`))) corrected.push(gauge)
    }
    expect(said(pdf.words)).toContain(said('Two corrections, both kept'))
    expect(corrected).toEqual(['5580'])
    expect(rows).toContain('39001.080.230.910.19a')
    expect(rows).toContain('55805850b1.650.330.31')
    expect(said(pdf.words)).toContain(said('Digits swapped when typed.'))
  })

  it('has the stages with force, uncertainty, step and softening as the record page has them', () => {
    for (const row of [
      '26.4 ± 0.7',
      '52.8 ± 0.7',
      '79.9 ± 0.7',
      '106.3 ± 0.7',
      'first step',
      '60.0',
      '58.7',
      'Held 5 min',
      'second set 0.00 mm',
    ])
      expect(said(pdf.words)).toContain(said(row))
  })

  it('has joints with both examinations, train, instruments, budget, check, protocol, people, seal and cautions', () => {
    for (const { joint } of recorded.state.joints) expect(said(pdf.words)).toContain(said(joint.name))
    for (const words of [
      'accepted, dye penetrant Marit Sandoval, 15 Sep 2026, 09:20',
      'Lowest rating in the train: Ram, rated capacity',
      'LM-25-1209',
      'dead-weight tester DW-3',
      'ASME B40.100 grade 2A, 0.5 % of span',
      'Half of the gauge’s readable increment',
      'NOT CHECKED',
      '15.0 % against the stiffest step so far',
      'relief set to 8500 psi',
      'Over entries 1 to 68',
      'key 0123456789abcdef',
      'npm run verify',
      'https://press.example/check',
    ])
      expect(said(pdf.words)).toContain(said(words))
    expect(said(pdf.words)).toContain(recorded.state.headHash)
    expect(said(pdf.words)).toContain('c4'.repeat(64))
    for (const caution of cautionsOf(recorded.state, record.evaluation)) expect(said(pdf.words)).toContain(said(caution))
    expect(pdf.words).not.toMatch(/\bsafe\b|\bapproved\b/i)
    expect(pdf.words.match(/[^trc-] tons?\b/gi) ?? []).toEqual([])
  })

  it('is whole pages with number, title, author and language, tagged, every font embedded', () => {
    expectWholePages(pdf)
    expect(pdf.info).toMatchObject({ Title: 'Record of PT-0043, Press 2', Author: 'Hollin Bridge Fabricating', Tagged: 'yes' })
    expect(pdf.info['Page size']).toContain('595.28 x 841.89')
    expect(pdf.fonts.length).toBeGreaterThan(3)
    expect(pdf.fonts.filter(({ embedded, subset }) => !embedded || !subset)).toEqual([])
    expect(pdf.fonts.every(({ name }) => name.includes('IBMPlex'))).toBe(true)
  })

  it('makes the same bytes again, whenever it is written, and other bytes for another record', async () => {
    const hash = (bytes: Buffer): string => createHash('sha256').update(bytes).digest('hex')
    const [one, later, other] = await Promise.all([
      bytesOf(sourceOf(recorded)),
      bytesOf(sourceOf(recorded, { writtenAt: '2027-01-02T03:04:05.000Z' })),
      bytesOf(sourceOf(countersignedLater(recorded, 1))),
    ])
    expect(one.includes('/Lang (en-GB)')).toBe(true)
    expect(hash(later)).toBe(hash(one))
    expect(hash(other)).not.toBe(hash(one))
  })

  it('fits Letter as it fits A4', async () => {
    const letter = await printed(recorded, 'letter')
    expectWholePages(letter)
    expect(letter.info['Page size']).toContain('612 x 792')
    expect(said(letter.pages[0] ?? '')).toContain(said('I was present and read the gauge myself.'))
  })
})

/** The same test as it stood before anybody concluded anything. */
function notConcluded(recorded: RecordedTest): RecordedTest {
  return {
    ...recorded,
    entries: recorded.entries.slice(
      0,
      recorded.entries.findIndex(({ kind }) => kind === 'concluded'),
    ),
  }
}

describe('the record of a test that came to something else', () => {
  const cases: [string, RecordedTest, string[]][] = [
    [
      'rejected',
      stoppedTest(),
      ['Rejected. Stopped at 75 %', 'This test clears the press to no load.', 'Against “accepted”', 'Beyond two limits'],
    ],
    ['stopped', notConcluded(stoppedTest()), ['Stopped at 75 %. Not concluded', 'Not concluded yet']],
    ['under way', recordedTest({ until: 'decided' }), ['Under way. Nothing is concluded', 'Not concluded yet', 'No seal yet']],
    ['just opened', recordedTest({ until: 'opened' }), ['Under way. Nothing is concluded', 'No load was put on.', 'not examined']],
    [
      'not signed',
      recordedTest({ until: 'concluded' }),
      ['Concluded accepted. Not signed', 'Until it is countersigned it clears nothing.'],
    ],
    [
      'abandoned',
      recordedTest({ climbs: [], conclusion: 'abandoned', conclusionWhy: 'The witness was called away.' }),
      ['Abandoned. Nothing is cleared', 'The witness was called away.'],
    ],
    ['off-centre', twoLegTest(), ['Ram far left', 'Ram far right', 'ram far left and far right', 'after four static loads']],
    ['countersigned late', countersignedLater(recordedTest(), 30), ['30 hours after the lead']],
  ]
  it.each(cases)('%s: says so in words, on whole pages', async (_name, recorded, expected) => {
    const pdf = await printed(recorded)
    expectWholePages(pdf)
    for (const words of expected) expect(said(pdf.words)).toContain(said(words))
    const { state, evaluation } = recordOf(sourceOf(recorded))
    expect(said(pdf.pages[0] ?? '')).toContain(said(headlineOf(state, evaluation)))
  })

  it('no heading ends a page: it stands where its table begins', async () => {
    const { pages } = await printed(twoLegTest())
    const page = pages.find((one) => one.includes('Four corrections, all kept')) ?? ''
    expect(said(page)).toContain(said('Entry 23 corrects 22'))
  })

  it('above rating: names the load and the rule it comes from', async () => {
    const { protocol } = openedPayload()
    const stages = [...protocol.content.stages, { percent: 110, holdSeconds: 600 }]
    const full = { at: '11:42', start: ['8650', '2.40', '0.46', '0.44'], end: ['8600', '2.41', '0.46', '0.44'] } as const
    const second = { ...repeatClimb, stages: [...repeatClimb.stages, full], releasedAt: '12:03', setAt: '12:07' }
    const pdf = await printed(
      recordedTest({ protocol: { stages, aboveRatingRule: 'ASME ASP-2010 3-4.1.3' }, climbs: [firstClimb, second] }),
    )
    expectWholePages(pdf)
    for (const words of ['110 %', 'ASME ASP-2010 3-4.1.3', 'Held 10 min']) expect(said(pdf.words)).toContain(said(words))
  })
})

describe('what people wrote', () => {
  const known = openedPayload()
  const opened = {
    press: {
      ...known.press,
      name: 'The long straightening press of the old rolling mill hall in Łódź',
      whatFor: 'straightening of shafts, axles and whatever customers bring, Πειραιάς',
    },
    shop: { ...known.shop, name: 'Hollin Bridge Fabricating and Heavy Repairs of Agricultural and Forestry Machinery Limited' },
    people: { ...known.people, witness: { ...known.people.witness, name: 'Дмитрий Аристархович Преображенский' } },
    instrumentOverride: 'The only gauge of this range.',
  }

  it.each(['a4', 'letter'] as const)('wraps long names and sets other alphabets, on %s', async (paper) => {
    const pdf = await printed(recordedTest({ opened, observed: 'A creak at the left pin, once, not again. '.repeat(11) }), paper)
    expectWholePages(pdf)
    for (const words of ['Łódź', 'Πειραιάς', 'Дмитрий Аристархович Преображенский', 'Used out of date: The only gauge of this range.'])
      expect(said(pdf.words)).toContain(said(words))
    expect(pdf.words.match(/A creak at the left pin/g)).toHaveLength(11)
    expect(pdf.fonts.filter(({ embedded }) => !embedded)).toEqual([])
  })

  it('prints the photos that are here, and says what became of the others', async () => {
    const recorded = recordedTest({ observed: 'See the photos.' })
    const { bytes, attachment } = await picture('jpeg', { width: 400, height: 300 })
    const gone = { ...attachment, sha256: 'd'.repeat(64), name: 'Gone.jpeg' }
    const entries = recorded.entries.map((entry) => (entry.kind === 'observed' ? { ...entry, attachments: [attachment, gone] } : entry))
    const files: RecordFiles = {
      present: new Set([attachment.sha256]),
      altered: new Set(),
      pictures: new Map([[attachment.sha256, { jpeg: bytes, width: 400, height: 300 }]]),
    }
    const whole = await bytesOf(sourceOf({ ...recorded, entries }), 'a4', files)
    expect(whole.includes('/DCTDecode')).toBe(true)
    const { words } = await readPdf(whole)
    expect(words).toContain('Photos and documents')
    expect(words).toContain('Not on the server')
    expect(said(words)).toContain(attachment.sha256)
  })
})
