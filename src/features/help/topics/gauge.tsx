import { ASME_B40_GRADES, gaugeCanTell, gaugeErrorLimit, gaugeSuitability, type GaugeAccuracy } from '#shared/hydraulics/gauge'
import { formatNumber, formatQuantity, toSI, toUnit } from '#shared/units'
import { paths } from '../../../paths'
import { Axes, Board, Line, Say, scaleTo } from '../drawing-kit'
import { asTyped, forceWithU, FULL, FULL_SCALE, GAUGE_CLASS, kN, percent, RATED, STAGE_OVER, STAGE_UNDER, STAGES } from '../example-press'
import { Over, Q } from '../maths'
import type { Topic } from '../topic'

const GRADE = 'A'
const BY_GRADE: GaugeAccuracy = { standard: 'asme-b40.100', grade: GRADE }
const TOLERANCE = STAGE_UNDER + STAGE_OVER

const limitAt = (accuracy: GaugeAccuracy, reading: number) => gaugeErrorLimit({ accuracy, spanMin: 0, spanMax: toSI(FULL_SCALE), reading })

/** What a gauge may be wrong by at each place of its scale: a class all along, a grade by zones. */
function Drawing() {
  const full = toSI(FULL_SCALE)
  const along = scaleTo(0, full, 60, 400)
  const up = scaleTo(0, 2.4, 300, 80)
  const share = (accuracy: GaugeAccuracy, place: number) => up((limitAt(accuracy, place * full) / full) * 100)
  const grade = [0, 0.25, 0.25, 0.75, 0.75, 1].map((place, index) => ({
    x: along(place * full),
    y: share(BY_GRADE, index < 2 ? 0.1 : index < 4 ? 0.5 : 0.9),
  }))
  return (
    <Board
      label="Limit of error along the scale of a gauge: one percent of span everywhere for class 1, and two, one, two percent for grade A, by quarter, half and quarter."
      height={370}
    >
      <Line
        points={[
          { x: along(full / 4), y: 90 },
          { x: along(full / 4), y: 300 },
        ]}
        tone="ghost"
        dash="2 5"
      />
      <Line
        points={[
          { x: along((full * 3) / 4), y: 90 },
          { x: along((full * 3) / 4), y: 300 },
        ]}
        tone="ghost"
        dash="2 5"
      />
      <Axes left={60} right={412} top={70} bottom={300} up="may be wrong by, % of span" along="" />
      {[1, 2].map((value) => (
        <Say key={value} x={50} y={up(value) + 6} anchor="end">
          {value}
        </Say>
      ))}
      <Line points={grade} width={2.4} />
      <Line
        points={[
          { x: along(0), y: share(GAUGE_CLASS, 0) },
          { x: along(full), y: share(GAUGE_CLASS, 1) },
        ]}
        tone="chalk"
        width={2}
        dash="7 5"
      />
      <Say x={along(full / 2)} y={share(BY_GRADE, 0.1) + 6} anchor="middle" tone="scribe">
        grade {GRADE}, by zones
      </Say>
      <Say x={along(full / 2)} y={share(GAUGE_CLASS, 0) - 12} anchor="middle" tone="chalk">
        class {GAUGE_CLASS.class}, all along
      </Say>
      {[0, 1, 2, 3, 4].map((quarter) => (
        <Say key={quarter} x={along((full * quarter) / 4)} y={324} anchor="middle">
          {formatNumber(toUnit((full * quarter) / 4, 'bar'), 0)}
        </Say>
      ))}
      <Say x={412} y={352} anchor="end">
        reading, bar
      </Say>
      <Say x={along(full / 2)} y={286} anchor="middle">
        use it here
      </Say>
    </Board>
  )
}

export const gaugeTopic: Topic = {
  slug: 'gauge',
  title: 'Gauge classes and scale',
  question: 'How far may the gauge be wrong, and does its scale suit?',
  answer:
    'What is printed on the dial is a share of the whole scale, not of the reading: low on the scale the same few bar weigh more. A class holds all along; a grade with three figures holds by quarter, half and quarter.',
  formulas: [
    {
      gives: 'Limit of error of a class, EN 837-1',
      say: 'e equals c over 100 times the span',
      maths: (
        <>
          <Q>e</Q> = <Over top={<Q>c</Q>} under="100" /> · ( <Q sub="max">P</Q> − <Q sub="min">P</Q> )
        </>
      ),
    },
    {
      gives: 'Limit of error of a grade, ASME B40.100',
      say: 'e equals g of the zone over 100 times the span',
      maths: (
        <>
          <Q>e</Q> = <Over top={<Q sub="zone">g</Q>} under="100" /> · ( <Q sub="max">P</Q> − <Q sub="min">P</Q> )
        </>
      ),
    },
    {
      gives: 'A scale that suits',
      say: 'a quarter of full scale is at most the target pressure, which is at most three quarters of full scale',
      maths: (
        <>
          <Over top="1" under="4" /> <Q sub="max">P</Q> ≤ <Q sub="t">P</Q> ≤ <Over top="3" under="4" /> <Q sub="max">P</Q>
        </>
      ),
    },
    {
      gives: 'The gauge can tell what a limit asks',
      say: 'U is at most half of the distance the limit must resolve',
      maths: (
        <>
          <Q>U</Q> ≤ <Over top={<>Δ</>} under="2" />
        </>
      ),
    },
  ],
  symbols: [
    { sign: <Q>e</Q>, say: 'e', meaning: 'limit of error: the most that a reading may be wrong by, either way', unit: 'Pa, bar' },
    { sign: <Q>c</Q>, say: 'c', meaning: 'class on the dial: 0.1, 0.25, 0.6, 1, 1.6, 2.5 or 4', unit: '% of span' },
    {
      sign: <Q sub="zone">g</Q>,
      say: 'g of the zone',
      meaning: 'figure of the grade where the reading stands: outer quarters, or middle half',
      unit: '% of span',
    },
    {
      sign: (
        <>
          <Q sub="min">P</Q>, <Q sub="max">P</Q>
        </>
      ),
      say: 'P min and P max',
      meaning: 'the two ends of the scale',
      unit: 'Pa, bar',
    },
    { sign: <Q sub="t">P</Q>, say: 'P t', meaning: 'target pressure of a stage', unit: 'Pa, bar' },
    { sign: <Q>U</Q>, say: 'U', meaning: 'expanded uncertainty of the force at that reading', unit: 'N, kN' },
    { sign: <>Δ</>, say: 'delta', meaning: 'width of the window in which a stage counts as reached', unit: 'N, kN' },
  ],
  Drawing,
  drawing: {
    title: 'What it may be wrong by, along the scale',
    note: 'A calibration certificate’s own uncertainty takes the place of class or grade as soon as there is one in date.',
  },
  example() {
    const [low] = STAGES
    const full = toSI(FULL_SCALE)
    const lowAt = toSI(low.gauge)
    const highAt = toSI(FULL.gauge)
    const place = (reading: number) => percent(reading / full, 0)
    const { outer, middle } = ASME_B40_GRADES[GRADE]
    const { U } = forceWithU(FULL.gauge)
    const distance = toSI(RATED) * TOLERANCE
    const bar = (pascal: number) => formatQuantity(pascal, 'bar', 1)
    return {
      given: [
        ['Full scale', asTyped(FULL_SCALE)],
        ['Class', String(GAUGE_CLASS.class)],
        ['Another gauge, of grade', `${GRADE}: ${outer}, ${middle}, ${outer}`],
        ['Readings', `${asTyped(low.gauge)} and ${asTyped(FULL.gauge)}`],
      ],
      steps: [
        {
          what: `Class ${GAUGE_CLASS.class}, at any reading`,
          sum: `${GAUGE_CLASS.class} ÷ 100 × ${asTyped(FULL_SCALE)}`,
          value: `± ${bar(limitAt(GAUGE_CLASS, highAt))}`,
        },
        {
          what: `Grade ${GRADE} at ${asTyped(low.gauge)}`,
          sum: `${place(lowAt)} of the scale, outer quarter: ${outer} ÷ 100 × ${asTyped(FULL_SCALE)}`,
          value: `± ${bar(limitAt(BY_GRADE, lowAt))}`,
        },
        {
          what: `Grade ${GRADE} at ${asTyped(FULL.gauge)}`,
          sum: `${place(highAt)} of the scale, middle half: ${middle} ÷ 100 × ${asTyped(FULL_SCALE)}`,
          value: `± ${bar(limitAt(BY_GRADE, highAt))}`,
        },
        {
          what: 'Does the scale suit full load',
          sum: `${FULL.gauge.text} ÷ ${FULL_SCALE.text}`,
          value: place(highAt),
          note: gaugeSuitability({ fullScale: full, target: highAt }).sentence,
        },
        {
          what: 'Can it tell that full load is reached',
          sum: `U ${kN(U)} against half of the window from −${percent(STAGE_UNDER, 0)} to +${percent(STAGE_OVER, 0)}: ${kN(distance)} ÷ 2 = ${kN(distance / 2)}`,
          value: gaugeCanTell({ U, distance }) ? 'it can' : 'this gauge cannot tell',
        },
      ],
      so: 'Fit a gauge whose scale brings the targets between a quarter and three quarters. A target past full scale can’t be opened; one outside the middle half is said in the plan.',
    }
  },
  usedIn: [
    { where: 'Instruments: the limit of error under the gauge’s class', to: paths.instruments.href() },
    { where: 'Plan: whether the scale suits, and what this gauge cannot tell', to: paths.planProofTest.href() },
    { where: 'Every force: the gauge’s share of its uncertainty', to: paths.helpTopic.href('uncertainty') },
  ],
  sources: [
    'Classes: EN 837-1:1996, table 11.',
    'Grades: ASME B40.100, accuracy grade table; grades B, C and D from memory.',
    'A quarter to three quarters of full scale: US DoD UFC 4-390-01 (23 July 2003), pressure gages.',
    'Half of the distance that a limit must resolve: common practice, no source.',
  ],
  cautions: [],
}
