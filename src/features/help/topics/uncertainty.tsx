import { formatNumber, formatQuantity, toSI, weightOf } from '#shared/units'
import { paths } from '../../../paths'
import { Board, Line, Say, scaleTo, Whisker } from '../drawing-kit'
import {
  asTyped,
  BORE,
  BORE_TOLERANCE,
  CARRIED_TOLERANCE,
  forceWithU,
  FULL,
  FULL_SCALE,
  GAUGE_CLASS,
  GAUGE_STEP,
  kN,
  percent,
  ramOfExample,
  SPRINGS_TOLERANCE,
} from '../example-press'
import { Over, Q, Root, Tall, Up } from '../maths'
import type { Topic } from '../topic'

const SHORT: Record<string, string> = { 'half of the gauge’s readable increment': 'half a step' }
const nameOf = (name: string): string => SHORT[name] ?? name

/** The budget as bars, and what they come to: not a sum, but the root of squares. */
function Drawing() {
  const { force, u, U, budget } = forceWithU(FULL.gauge)
  const along = scaleTo(0, u, 150, 400)
  return (
    <Board
      label={`Shares of the uncertainty: ${budget.map(({ name }) => name).join(', ')}. Together they make the standard uncertainty u, and twice that is U, either way of the force.`}
      height={400}
    >
      <Say x={150} y={32}>
        standard uncertainty, N
      </Say>
      {budget.map(({ name, u: own }, index) => {
        const y = 60 + index * 38
        return (
          <g key={name}>
            <Say x={140} y={y + 6} anchor="end">
              {nameOf(name)}
            </Say>
            <Line
              points={[
                { x: 150, y: y - 9 },
                { x: Math.max(152, along(own)), y: y - 9 },
                { x: Math.max(152, along(own)), y: y + 9 },
                { x: 150, y: y + 9 },
              ]}
              closed
              fill="var(--thin-dye)"
            />
            <Say x={Math.max(152, along(own)) + 8} y={y + 6} tone="scribe">
              {formatNumber(own, 0)}
            </Say>
          </g>
        )
      })}
      <Line
        points={[
          { x: 150, y: 44 },
          { x: 150, y: 252 },
        ]}
        tone="faint-scribe"
        width={1.2}
      />
      <Say x={140} y={272} anchor="end" tone="scribe" strong>
        together, u
      </Say>
      <Line
        points={[
          { x: 150, y: 266 },
          { x: along(u), y: 266 },
        ]}
        width={3}
      />
      <Say x={along(u)} y={256} anchor="end" tone="scribe" strong>
        {formatNumber(u, 0)}
      </Say>
      <Whisker at={{ x: 216, y: 336 }} half={130} tone="chalk" />
      <Say x={216} y={320} anchor="middle" tone="chalk" strong>
        {kN(force, 1)}
      </Say>
      <Say x={86} y={372} anchor="middle">
        − {kN(U, 1)}
      </Say>
      <Say x={346} y={372} anchor="middle">
        + {kN(U, 1)}
      </Say>
    </Board>
  )
}

export const uncertaintyTopic: Topic = {
  slug: 'uncertainty',
  title: 'Uncertainty of a force',
  question: 'How surely is that force known?',
  answer:
    'Every force stands with a ± beside it. It gathers what the gauge may be wrong by, how finely it can be read, how exactly the bore is known, and what springs and weight may differ by. The largest of them nearly makes the whole.',
  formulas: [
    {
      gives: 'Standard uncertainty from a limit, rectangular',
      say: 'u i equals a over the square root of 3',
      maths: (
        <>
          <Q sub="i">u</Q> = <Over top={<Q>a</Q>} under={<Root>3</Root>} />
        </>
      ),
    },
    {
      gives: 'From a calibration certificate',
      say: 'u P equals U certificate over k',
      maths: (
        <>
          <Q sub="P">u</Q> = <Over top={<Q sub="cert">U</Q>} under={<Q>k</Q>} />
        </>
      ),
    },
    {
      gives: 'Of the force of one ram',
      say: 'u F equals the square root of: A times u P squared, plus 2 times P times A times u d over d squared, plus u ret squared, plus u W squared',
      maths: (
        <>
          <Q sub="F">u</Q> ={' '}
          <Root>
            ( <Q>A</Q> · <Q sub="P">u</Q> )<Up>2</Up> +{' '}
            <Tall>
              2 <Q>P</Q> <Q>A</Q> · <Over top={<Q sub="d">u</Q>} under={<Q>d</Q>} />
            </Tall>
            <Up>2</Up> + <Q sub="ret">u</Q>
            <Up>2</Up> + <Q sub="W">u</Q>
            <Up>2</Up>
          </Root>
        </>
      ),
    },
    {
      gives: 'As it is shown, about 95 % sure',
      say: 'U equals 2 times u F',
      maths: (
        <>
          <Q>U</Q> = 2 · <Q sub="F">u</Q>
        </>
      ),
    },
  ],
  symbols: [
    { sign: <Q>a</Q>, say: 'a', meaning: 'half-width: the most something may differ by, either way', unit: 'its own' },
    { sign: <Q sub="i">u</Q>, say: 'u i', meaning: 'standard uncertainty of one thing', unit: 'its own' },
    {
      sign: (
        <>
          <Q sub="cert">U</Q>, <Q>k</Q>
        </>
      ),
      say: 'U certificate and k',
      meaning: 'expanded uncertainty on the certificate and its coverage factor; they replace the class',
      unit: 'Pa, none',
    },
    { sign: <Q sub="P">u</Q>, say: 'u P', meaning: 'of the pressure: the gauge’s limit and half a step, as root of squares', unit: 'Pa' },
    { sign: <Q sub="d">u</Q>, say: 'u d', meaning: 'of the bore d', unit: 'mm' },
    {
      sign: (
        <>
          <Q sub="ret">u</Q>, <Q sub="W">u</Q>
        </>
      ),
      say: 'u ret and u W',
      meaning: 'of the springs’ pull and of the weight carried',
      unit: 'N',
    },
    { sign: <Q>U</Q>, say: 'U', meaning: 'expanded uncertainty, k = 2: what stands after the ±', unit: 'N, kN' },
  ],
  Drawing,
  drawing: {
    title: 'The budget at full load',
    note: 'Halving a small share changes next to nothing. A finer gauge changes nearly all of it.',
  },
  example() {
    const { force, u, U, budget } = forceWithU(FULL.gauge)
    const { area, relativeAreaTolerance, springReturnTolerance } = ramOfExample()
    const own = (name: string) => budget.find((line) => line.name === name)?.u ?? 0
    const square = `${formatNumber(area * 1e6, 1)} mm²`
    const newton = (value: number) => formatQuantity(value, 'N', 0)
    const limit = (toSI(FULL_SCALE) * GAUGE_CLASS.class) / 100
    const inMPa = (pascal: number, decimals: number) => `${formatNumber(pascal / 1e6, decimals)} N/mm²`
    return {
      given: [
        ['Reading', asTyped(FULL.gauge)],
        ['Gauge', `class ${GAUGE_CLASS.class} of ${asTyped(FULL_SCALE)}, step ${asTyped(GAUGE_STEP)}`],
        ['Bore', `${asTyped(BORE)} ± ${asTyped(BORE_TOLERANCE)}`],
        ['Springs, weight', `± ${asTyped(SPRINGS_TOLERANCE)}, ± ${asTyped(CARRIED_TOLERANCE)}`],
      ],
      steps: [
        { what: 'Gauge', sum: `${square} × ${inMPa(limit, 1)} ÷ √3`, value: newton(own('gauge')) },
        {
          what: 'Half a step',
          sum: `${square} × ${inMPa(toSI(GAUGE_STEP) / 2, 2)} ÷ √3`,
          value: newton(own('half of the gauge’s readable increment')),
        },
        {
          what: 'Bore',
          sum: `${inMPa(toSI(FULL.gauge), 1)} × ${square} × 2 × ${BORE_TOLERANCE.text} ÷ ${BORE.text} ÷ √3 (the area may differ by ${percent(relativeAreaTolerance, 1)})`,
          value: newton(own('bore')),
        },
        { what: 'Springs', sum: `${formatNumber(springReturnTolerance, 0)} N ÷ √3`, value: newton(own('return springs')) },
        { what: 'Weight', sum: `${formatNumber(weightOf(toSI(CARRIED_TOLERANCE)), 1)} N ÷ √3`, value: newton(own('carried weight')) },
        {
          what: 'Together',
          sum: `√(${budget.map((line) => `${formatNumber(line.u, 0)}²`).join(' + ')})`,
          value: newton(u),
          note: `The gauge makes ${percent(budget[0]?.share ?? 0, 0)} of it.`,
        },
        {
          what: 'As shown',
          sum: `2 × ${newton(u)}, beside the force of that reading`,
          value: `${kN(force, 1)} ± ${formatNumber(U / 1000, 1)}`,
        },
      ],
      so: 'When a plan says that this gauge cannot tell, look at the budget of the record: the line with the largest share is what to better.',
    }
  },
  usedIn: [
    { where: 'Plan: “known to” beside each target', to: paths.planProofTest.href() },
    { where: 'Run: the ± after the live tonnage' },
    { where: 'Record: the budget of the force at full load', to: paths.proofTests.href() },
    { where: 'Clearance load: what is taken off', to: paths.helpTopic.href('clearance') },
  ],
  sources: [
    'JCGM 100:2008 (GUM), 4.3.7 (rectangular limits), 5.1.2 (root sum of squares) and 6.2 (expanded uncertainty).',
    'Checked against draws by JCGM 101:2008 (Monte-Carlo).',
  ],
  cautions: [],
}
