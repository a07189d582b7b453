import { calibrationState } from '#shared/instruments/model'
import { lowestLimit } from '#shared/press/ratings'
import { budgetTexts, fullestForce } from '#shared/proof-test/budget'
import { engineerText } from '#shared/proof-test/check-record'
import { checkOf } from '#shared/proof-test/expected'
import { UTC_DATES } from '#shared/proof-test/print-dates'
import { capital, inPrint } from '#shared/proof-test/record'
import { ramText } from '#shared/proof-test/record-facts'
import { notMeasuredText } from '#shared/proof-test/record-words'
import type { JointExamination } from '#shared/proof-test/state'
import { CHECK_CAUTIONS, demandWords, factorWords, usedWords } from '#shared/structure/check-words'
import type { CheckResult } from '#shared/structure/load-path-check'
import { formatForce } from '#shared/units'
import type { RecordOfTest } from '../record'
import { leadPoints } from '../rows'
import { CALIBRATION_STATES, detailCells } from '../sheets/instruments'
import { protocolLines, setUpText } from '../sheets/protocol'
import { ratingsOf } from '../sheets/train'
import type { Content } from '../sheet'
import { normal, quiet, sound, stopped, strong } from './cells'
import { contentText } from './content-text'
import { elevationHeight, paintElevation } from './drawings'
import { BODY, type Paper } from './paper'
import { table, type TableColumn, type TableRow } from './table'
import type { Run } from './typesetter'

const right = (head: string): TableColumn => ({ head, align: 'right' })
/** Parts of one cell under each other; empty ones are left out. */
const stacked = (parts: readonly string[]): string => parts.filter((part) => part !== '').join('\n')

/** The press with its joints and measuring points, to scale as far as it was measured. */
export function drawing(paper: Paper, record: RecordOfTest): void {
  const width = Math.min(paper.width, 390)
  const height = elevationHeight(width)
  paper.heading('Drawing', {
    note: 'Dimensions in mm; what nobody measured is drawn in proportion. A joint bears its number and its last examination in this test; a letter is a measuring point.',
  })
  paper.need(height + 4)
  paintElevation(paper, record, { x: paper.left + (paper.width - width) / 2, y: paper.y, width })
  paper.down(height + 4)
}

function examined(record: RecordOfTest, examination: JointExamination | null): Run[] {
  if (!examination) return stopped('not examined')
  const { result, method, by, at, remark } = examination
  const rest = stacked([`, ${method}`, `${record.nameOf(by)}, ${UTC_DATES.dateAndTime(at)}`, remark])
  return [...(result === 'accepted' ? sound(result) : stopped(result)), ...normal(rest)]
}

/** Every joint of the load path with how it is made and its examination before and after the load. */
export function joints(paper: Paper, record: RecordOfTest): void {
  const { state, opened } = record
  const memberOf = (id: string): string => opened.press.members.find((member) => member.id === id)?.name ?? 'a member not listed'
  const confirmed = state.loadPathConfirmed
  const note = confirmed
    ? `That no joint is missing was confirmed by ${record.nameOf(confirmed.by)} (${confirmed.as}), ${UTC_DATES.dateAndTime(confirmed.at)} UTC. Dye penetrant finds surface cracks only.`
    : 'Nobody confirmed that no joint is missing.'
  paper.heading('Joints', { note })
  table(paper, {
    columns: [
      right('No.'),
      { head: 'Joint', wrap: true },
      { head: 'Between', wrap: true },
      { head: 'Made', wrap: true },
      { head: 'Before load', wrap: true },
      { head: 'After load', wrap: true },
    ],
    rows: state.joints.map(({ joint, makeUp, before, after, fellBackBecause }) => ({
      cells: [
        strong(String(joint.number)),
        [...strong(joint.name), ...normal(`\n${[joint.kind, joint.detail].filter(Boolean).join(', ')}`)],
        joint.between.map(memberOf).join(' and '),
        stacked([makeUp, joint.madeBy, joint.filler, joint.madeOn ? UTC_DATES.shortDate(joint.madeOn) : '']),
        examined(record, before),
        [...examined(record, after), ...(fellBackBecause ? stopped(`\nfell back: ${fellBackBecause}`) : [])],
      ],
    })),
  })
}

function verdictOf({ verdict }: CheckResult): Run[] {
  if (verdict === 'not checked') return strong('NOT CHECKED')
  return verdict === 'beyond' ? stopped(verdict) : sound(verdict)
}

/** Every check of every member and joint as the test was opened with them, and what nobody checked. */
export function loadPathCheck(paper: Paper, record: RecordOfTest): void {
  const { opened } = record
  const check = checkOf(opened)
  paper.heading('Load path check, an estimate', { note: check.sentence })
  if (opened.engineer) paper.paragraph(`Engineer’s document: ${engineerText(opened.engineer)}`)
  const some = check.results.some(({ verdict }) => verdict !== 'not checked')
  table(paper, {
    size: 7,
    columns: [
      { head: 'Member or joint', wrap: true },
      { head: 'Check', wrap: true },
      ...(some ? [{ head: 'Asked of what is allowed', wrap: true }, right('Used')] : []),
      { head: 'Verdict' },
      { head: 'Source, or why it is not checked', wrap: true },
    ],
    rows: check.results.map((result) => ({
      cells: [
        strong(capital(result.name)),
        result.check,
        ...(some ? [demandWords(result, opened.forceUnit), result.verdict === 'not checked' ? '' : usedWords(result)] : []),
        verdictOf(result),
        quiet(result.notChecked ?? result.source),
      ],
    })),
  })
  const { band, missing } = check.expected
  paper.down(4)
  paper.paragraph(
    band
      ? `Expected opening: ${(band.low * 1000).toFixed(2)} to ${(band.high * 1000).toFixed(2)} mm at ${(check.load / 1000).toFixed(1)} kN.`
      : `Expected opening not estimated: ${missing}`,
  )
  paper.paragraph(
    `Allowed: ${factorWords()
      .map(([name, value]) => `${name.toLowerCase()} ${value}`)
      .join('; ')}.`,
  )
  paper.paragraph(CHECK_CAUTIONS.join(' '))
}

/** Rams, and what each part that the force or its pressure passes through may carry. */
export function train(paper: Paper, record: RecordOfTest): void {
  const { press, forceUnit } = record.opened
  paper.heading('Train', {
    note: 'Force = pressure × area − springs + weight. A rated pressure counts as the force that the rams make at it.',
  })
  const rows = ratingsOf(record).map(({ name, typed, newton }): TableRow => ({
    cells: [name, inPrint(typed), `${(newton / 1000).toFixed(1)} kN`, formatForce(newton, forceUnit)],
  }))
  const lowest = lowestLimit(press)
  table(paper, {
    columns: [{ head: 'Part', wrap: true }, right('Rating as given'), right('Carries'), right('')],
    rows: [
      ...rows,
      ...(lowest
        ? [
            {
              strong: true,
              cells: [
                `Lowest rating in the train: ${lowest.name}`,
                null,
                `${(lowest.force / 1000).toFixed(1)} kN`,
                formatForce(lowest.force, forceUnit),
              ],
            },
          ]
        : []),
      { strong: true, cells: ['Rated load of the press', inPrint(press.ratedLoad), null, null] },
    ],
  })
  paper.down(4)
  for (const ram of press.rams) {
    const more = [
      `stroke ${inPrint(ram.stroke)}`,
      `${ram.acting}-acting`,
      ...(ram.springReturn ? [`springs pull ${inPrint(ram.springReturn)}`] : []),
      ...(ram.carriedMass
        ? [`carries ${inPrint(ram.carriedMass)}, which ${ram.carriedComesDown ? 'comes down with it' : 'it lifts'}`]
        : []),
    ]
    paper.paragraph(`${ram.name}: ${ramText(ram)}, ${more.join(', ')}.`)
  }
}

/** Instruments with the calibration then in force, the points they read, and where the uncertainty comes from. */
export function instruments(paper: Paper, record: RecordOfTest): void {
  const { opened, state } = record
  const day = (state.openedAt ?? record.writtenAt).slice(0, 10)
  paper.heading('Instruments', {
    note: opened.instrumentOverride
      ? `Used out of calibration, with this reason: ${opened.instrumentOverride}`
      : 'As they were when the test was opened, with the calibration then in force.',
  })
  table(paper, {
    columns: [
      { head: 'Code' },
      { head: 'Kind', wrap: true },
      right('Range'),
      right('Reads in steps of'),
      { head: 'Accuracy', wrap: true },
      { head: 'Calibrated, due', wrap: true },
      { head: 'At the test' },
      { head: 'Certificate', wrap: true },
      { head: 'Compared with', wrap: true },
    ],
    rows: opened.instruments.map((instrument) => {
      const { calibration, details } = instrument
      const [kind = '', description = '', , , , , accuracy = ''] = detailCells(instrument).map(contentText)
      const is = calibrationState(calibration, day)
      const certified = calibration?.uncertainty
      return {
        cells: [
          strong(details.code),
          stacked([kind, description]),
          inPrint(details.kind === 'indicator' ? details.range : details.fullScale),
          inPrint(details.increment),
          accuracy,
          calibration ? `${UTC_DATES.shortDate(calibration.calibratedOn)}\n${UTC_DATES.shortDate(calibration.dueOn)}` : '',
          is === 'in-date' ? CALIBRATION_STATES[is] : stopped(CALIBRATION_STATES[is]),
          stacked([calibration?.certificate ?? '', certified ? `U ${inPrint(certified.value)}, k = ${certified.k}` : '']),
          calibration?.comparedWith ?? '',
        ],
      }
    }),
  })
  points(paper, record)
  budget(paper, record)
}

function points(paper: Paper, { opened }: RecordOfTest): void {
  const lead = leadPoints(opened)
  paper.subheading('Measuring points')
  table(paper, {
    columns: [
      { head: 'Letter' },
      { head: 'Point', wrap: true },
      { head: 'Read by' },
      { head: 'With load it' },
      { head: 'In the net figure' },
    ],
    rows: opened.points.map((point) => ({
      cells: [
        strong(point.letter),
        point.label,
        opened.instruments.find(({ id }) => id === point.instrumentId)?.details.code ?? '',
        point.risesWithLoad ? 'rises' : 'falls',
        !lead ? '' : point === lead.plus ? 'plus' : lead.minus.includes(point) ? 'less the mean' : '',
      ],
    })),
  })
  paper.down(4)
  paper.paragraph([
    { text: opened.notMeasured.length > 0 ? `${notMeasuredText(opened)}.` : 'Every member has a point.', style: { ...BODY, weight: 600 } },
  ])
}

function budget(paper: Paper, { evaluation }: RecordOfTest): void {
  const fullest = fullestForce(evaluation)
  if (!fullest) return
  const { force, percent } = fullest
  paper.subheading(`Where ± comes from, at ${percent} %: ${formatForce(force.force, 'kN')}, U = ${formatForce(force.U, 'kN')} with k = 2`)
  table(paper, {
    columns: [{ head: 'Source', wrap: true }, right('± kN'), { head: 'Distribution' }, right('u, kN'), right('Share of the variance')],
    rows: budgetTexts(force).map((line) => ({ cells: [capital(line.name), line.value, line.distribution, strong(line.u), line.share] })),
  })
  paper.down(3)
  paper.paragraph(
    'JCGM 100 (GUM) 5: standard uncertainties add as squares; U = 2u. A certificate’s U/k stands in place of the class where there is one. The spreadsheet has the budget of every row.',
  )
}

/** "60 s hold in the first climb", "simple acceptance, k = 2": a value with what it is of. */
function planned(value: Content, of: string): Run[] {
  const isNumber = typeof value === 'object' && value !== null && 'number' in value
  return [...strong(contentText(value)), ...normal(of === '' ? '' : isNumber ? `\u00a0${of}` : `, ${of}`)]
}

/** The written plan as it was frozen into the test, and what was confirmed before load. */
export function protocol(paper: Paper, record: RecordOfTest): void {
  paper.heading('Protocol and limits', { note: 'Limits without a named source are common practice, or the shop’s own.' })
  table(paper, {
    columns: [{ head: 'What' }, { head: 'As planned', wrap: true }],
    rows: protocolLines(record).map(([what, value, of]) => ({ cells: [what, planned(value, of)] })),
  })
  const confirmed = setUpText(record)
  paper.down(4)
  paper.paragraph(confirmed ?? 'No set-up was confirmed.')
}
