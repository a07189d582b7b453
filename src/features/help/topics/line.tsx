import { predict } from '#shared/proof-test/figures'
import { fitLine } from '#shared/statistics/line'
import { studentTQuantile } from '#shared/statistics/student-t'
import { formatNumber } from '#shared/units'
import { paths } from '../../../paths'
import { Axes, Board, Line, Say, scaleTo, Whisker } from '../drawing-kit'
import { climb, forceAt, FULL, kN, mm, percent, perMillimetre, PROTOCOL, STAGES } from '../example-press'
import { Each, Over, Q, Root, Sum, Up } from '../maths'
import type { Topic } from '../topic'

const ALLOWANCE_PERCENT = PROTOCOL.predictionAllowancePercent

/** The line through what was read before full load, and what it says of full load. */
function worked() {
  const before = climb(STAGES.slice(0, 3))
  const fit = fitLine(before.map(({ force, deflection }) => ({ x: force, y: deflection })))
  const force = forceAt(FULL.gauge)
  const prediction = predict({ protocol: { content: PROTOCOL } }, before, force)
  if (prediction === null) throw new RangeError('The example’s climb has no spread of forces.')
  const read = climb().at(-1)?.deflection ?? 0
  return { before, fit, force, prediction, read }
}

function Drawing() {
  const { before, fit, force, prediction, read } = worked()
  const right = scaleTo(0, 1.2e-3, 56, 410)
  const up = scaleTo(0, 112e3, 330, 60)
  const on = (newton: number) => ({ x: right(Math.max(0, fit.intercept + fit.slope * newton)), y: up(newton) })
  return (
    <Board
      label="Load up, deflection right: a line through datum and three stages, drawn on beyond them with a band, and the reading at full load inside the band."
      height={370}
    >
      <Axes left={56} right={416} top={46} bottom={330} up="load, kN" along="deflection, mm" />
      {[25, 50, 75, 100].map((load) => (
        <g key={load}>
          <Line
            points={[
              { x: 56, y: up(load * 1000) },
              { x: 410, y: up(load * 1000) },
            ]}
            tone="ghost"
            dash="2 5"
            width={1}
          />
          <Say x={48} y={up(load * 1000) + 6} anchor="end">
            {load}
          </Say>
        </g>
      ))}
      <Line
        points={[on(before.at(-1)?.force ?? 0), { x: right(prediction.from), y: up(force) }, { x: right(prediction.to), y: up(force) }]}
        closed
        tone="faint-scribe"
        width={1}
        fill="var(--thin-dye)"
      />
      <Line points={[on(0), on(before.at(-1)?.force ?? 0)]} width={2.4} />
      <Line points={[on(before.at(-1)?.force ?? 0), on(force)]} dash="9 5" width={2} />
      {before.map((point) => (
        <Whisker key={point.force} at={{ x: right(point.deflection), y: up(point.force) }} half={3} />
      ))}
      <Line
        points={[
          { x: right(prediction.from), y: up(force) - 10 },
          { x: right(prediction.from), y: up(force) + 10 },
        ]}
        tone="chalk"
        width={2}
      />
      <Line
        points={[
          { x: right(prediction.to), y: up(force) - 10 },
          { x: right(prediction.to), y: up(force) + 10 },
        ]}
        tone="chalk"
        width={2}
      />
      <Line
        points={[
          { x: right(prediction.from), y: up(force) },
          { x: right(prediction.to), y: up(force) },
        ]}
        tone="chalk"
        width={2}
      />
      <circle cx={right(read)} cy={up(force)} r={4.5} fill="var(--scribe)" />
      <Say x={right(prediction.from) - 12} y={up(force) + 6} anchor="end" tone="chalk">
        expected here
      </Say>
    </Board>
  )
}

export const lineTopic: Topic = {
  slug: 'line',
  title: 'The line and its prediction',
  question: 'Does the frame still behave like a spring, and where should the next reading lie?',
  answer:
    'A sound frame gives in proportion to the load. A line through datum and stages says how stiff it is, how much was slack, and in which band the next reading is expected. Outside that band, on either side: wait, and read again.',
  formulas: [
    {
      gives: 'Slope and intercept by least squares',
      say: 'b equals the sum of F i less F bar times delta i less delta bar, over the sum of F i less F bar squared; a equals delta bar less b times F bar',
      maths: (
        <>
          <Each>
            <Q>b</Q> ={' '}
            <Over
              top={
                <>
                  <Sum />( <Q sub="i">F</Q> − <Q>F̄</Q> )( <Q sub="i">δ</Q> − <Q>δ̄</Q> )
                </>
              }
              under={
                <>
                  <Sum />( <Q sub="i">F</Q> − <Q>F̄</Q> )<Up>2</Up>
                </>
              }
            />
          </Each>
          <Each>
            <Q>a</Q> = <Q>δ̄</Q> − <Q>b</Q> · <Q>F̄</Q>
          </Each>
        </>
      ),
    },
    {
      gives: 'Stiffness of the frame',
      say: 'K equals 1 over b',
      maths: (
        <>
          <Q>K</Q> = <Over top="1" under={<Q>b</Q>} />
        </>
      ),
    },
    {
      gives: 'Half-width from the readings’ own uncertainty',
      say: 'w equals the square root of: 4 times the sum of w i times u i squared, plus u squared, plus p times the predicted deflection squared; where w i is 1 over n plus F less F bar times F i less F bar over S',
      maths: (
        <>
          <Each>
            <Q>w</Q> ={' '}
            <Root>
              4 ( <Sum />( <Q sub="i">w</Q> <Q sub="i">u</Q> )<Up>2</Up> + <Q>u</Q>
              <Up>2</Up> ) + ( <Q>p</Q> · <Q>δ̂</Q> )<Up>2</Up>
            </Root>
          </Each>
          <Each>
            <Q sub="i">w</Q> = <Over top="1" under={<Q>n</Q>} /> +{' '}
            <Over
              top={
                <>
                  ( <Q>F</Q> − <Q>F̄</Q> )( <Q sub="i">F</Q> − <Q>F̄</Q> )
                </>
              }
              under={<Q>S</Q>}
            />
          </Each>
        </>
      ),
    },
    {
      gives: 'Half-width from the scatter, from three degrees of freedom on',
      say: 'w s equals t times s times the square root of 1 plus 1 over n plus F less F bar squared over S; the wider of both counts',
      maths: (
        <>
          <Q sub="s">w</Q> = <Q>t</Q> · <Q>s</Q> ·{' '}
          <Root>
            1 + <Over top="1" under={<Q>n</Q>} /> +{' '}
            <Over
              top={
                <>
                  ( <Q>F</Q> − <Q>F̄</Q> )<Up>2</Up>
                </>
              }
              under={<Q>S</Q>}
            />
          </Root>
        </>
      ),
    },
  ],
  symbols: [
    {
      sign: (
        <>
          <Q sub="i">F</Q>, <Q sub="i">δ</Q>
        </>
      ),
      say: 'F i and delta i',
      meaning: 'force and deflection of datum and stages; F̄ and δ̄ are their means',
      unit: 'kN, mm',
    },
    { sign: <Q>b</Q>, say: 'b', meaning: 'slope: how far it gives for each kN', unit: 'mm/kN' },
    { sign: <Q>a</Q>, say: 'a', meaning: 'intercept: slack that was taken up before the frame worked', unit: 'mm' },
    { sign: <Q>K</Q>, say: 'K', meaning: 'stiffness', unit: 'kN/mm' },
    { sign: <Q>S</Q>, say: 'S', meaning: 'sum of the squares of the forces about their mean', unit: 'kN²' },
    { sign: <Q>u</Q>, say: 'u', meaning: 'standard uncertainty of one reading, that of its force included', unit: 'mm' },
    { sign: <Q>p</Q>, say: 'p', meaning: 'allowance of the protocol on top', unit: '%' },
    {
      sign: (
        <>
          <Q>s</Q>, <Q>t</Q>
        </>
      ),
      say: 's and t',
      meaning: 'scatter of the points about the line, and Student’s t for its n − 2 degrees of freedom',
      unit: 'mm, none',
    },
  ],
  Drawing,
  drawing: {
    title: 'Three stages read, full load to come',
    note: 'Solid through what was read, dashed beyond it. The chalk gap is where the next reading is expected.',
  },
  example() {
    const { before, fit, force, prediction, read } = worked()
    const outside = read < prediction.from || read > prediction.to
    const cell = (point: { force: number; deflection: number }) =>
      `${formatNumber(point.force / 1000, 2)} kN at ${formatNumber(point.deflection * 1000, 3)} mm`
    const t = studentTQuantile(0.975, fit.dof)
    return {
      given: before.map((point, index) => [index === 0 ? 'Datum' : (STAGES[index - 1]?.what ?? ''), cell(point)] as const),
      steps: [
        {
          what: 'Slope',
          sum: `least squares through ${fit.n} points, mean force ${kN(fit.meanX)}, S = ${formatNumber(fit.sxx / 1e6, 0)} kN²`,
          value: `${formatNumber(fit.slope * 1e9, 2)} µm/kN`,
        },
        { what: 'Stiffness', sum: `1 ÷ ${formatNumber(fit.slope * 1e9, 2)} µm/kN`, value: perMillimetre(1 / fit.slope) },
        { what: 'Slack', sum: 'where the line meets no load', value: mm(fit.intercept) },
        { what: 'How straight', sum: 'r², the share of the movement that the line explains', value: formatNumber(fit.r2 ?? 0, 4) },
        {
          what: 'Expected at full load',
          sum: `${mm(fit.intercept)} + ${formatNumber(fit.slope * 1e9, 2)} µm/kN × ${kN(force)}`,
          value: mm(prediction.deflection),
        },
        {
          what: 'Give or take',
          sum: `the readings’ own uncertainty with ${percent(ALLOWANCE_PERCENT / 100, 0)} allowed on top; ${fit.dof} degrees of freedom are too few to believe the scatter (t would be ${formatNumber(t, 2)})`,
          value: `± ${mm(prediction.halfWidth)}`,
        },
        {
          what: 'Was read',
          sum: `expected between ${mm(prediction.from)} and ${mm(prediction.to)}`,
          value: mm(read),
          note: outside ? 'Outside: wait, and read again.' : 'Inside the band: the frame still behaves like the spring it was.',
        },
      ],
      so: 'Read again what lies outside, and go on only with a reason. On the soft side something gives; on the stiff side look for an indicator that is stuck or has fallen, or a turn of its pointer miscounted.',
    }
  },
  usedIn: [
    { where: 'Run: the line, and the band of the next reading, between stages' },
    { where: 'Record: the chart, its stiffness and r²', to: paths.proofTests.href() },
    { where: 'Protocol: by how much the prediction is widened', to: paths.protocols.href() },
  ],
  sources: [
    'Least squares and its interval: NIST/SEMATECH e-Handbook of Statistical Methods, 4.1.4.1 and 5.5.9.1; checked against NIST StRD Norris and NoInt1.',
    'Student’s t: NIST/SEMATECH e-Handbook, 1.3.6.7.2.',
    'The readings’ own uncertainty below three degrees of freedom, and the allowance on top: common practice, no source.',
  ],
  cautions: [],
}
