import { CAUTIONS } from '#shared/cautions'
import { clearanceLoad, clearancePressure } from '#shared/hydraulics/clearance'
import { formatNumber, formatQuantity, toSI } from '#shared/units'
import { paths } from '../../../paths'
import { Board, Line, Say, scaleTo } from '../drawing-kit'
import { asTyped, forceWithU, GAUGE_STEP, HOLD_END, kN, ramOfExample, RATED } from '../example-press'
import { Over, Q } from '../maths'
import type { Topic } from '../topic'

/** A shop that sets a margin of its own, to show what it does. */
const OTHER_MARGIN = 1.25

function worked(margin = 1) {
  const { force, U } = forceWithU(HOLD_END.gauge)
  const cleared = clearanceLoad({ lowestForce: force, U, margin, ratedLoad: toSI(RATED), unit: 'kN', decimals: 1 })
  return { force, U, cleared, gauge: clearancePressure({ load: cleared.load, rams: [ramOfExample()], increment: toSI(GAUGE_STEP) }) }
}

/** From the rated load down to what is cleared, each step a line. */
function Drawing() {
  const { force, cleared } = worked()
  const rated = toSI(RATED)
  const up = scaleTo(cleared.load - 1500, rated + 600, 350, 60)
  const levels = [
    { newton: rated, words: 'rated load', text: kN(rated, 1) },
    { newton: force, words: 'lowest force of the hold', text: kN(force, 1) },
    { newton: cleared.load, words: 'less U, rounded down', text: `${cleared.text} kN` },
  ]
  return (
    <Board
      label={`Rated load, below it the lowest force of the last hold at full load, and below that what is cleared: ${cleared.text} kN.`}
      height={390}
    >
      {levels.map(({ newton, words, text }, index) => {
        const tone = index === 2 ? 'chalk' : 'scribe'
        return (
          <g key={words}>
            <Line
              points={[
                { x: 50, y: up(newton) },
                { x: 410, y: up(newton) },
              ]}
              tone={tone}
              width={index === 2 ? 3 : 1.6}
              dash={index === 0 ? '9 5' : undefined}
            />
            <Say x={120} y={up(newton) - 10} tone={tone} strong={index === 2}>
              {words}
            </Say>
            <Say x={410} y={up(newton) - 10} anchor="end" tone={tone} strong={index === 2}>
              {text}
            </Say>
          </g>
        )
      })}
      <path
        d={`M50 ${up(cleared.load)}V352L64 340L78 364L92 352V${up(cleared.load)}Z`}
        fill="var(--thin-dye)"
        stroke="var(--scribe)"
        strokeWidth={1.6}
      />
    </Board>
  )
}

export const clearanceTopic: Topic = {
  slug: 'clearance',
  title: 'Clearance load',
  question: 'To what load may the press be used after this?',
  answer:
    'No more than it surely carried: the lowest force through the last hold at full load, less what that force may be wrong by, over the margin of the protocol, rounded down, and never above the rated load. With it goes the gauge pressure that belongs to it, on the same ram and gauge.',
  formulas: [
    {
      gives: 'Clearance load',
      say: 'C equals the smaller of: lowest F less U, over m; and the rated load. Rounded down',
      maths: (
        <>
          <Q>C</Q> = min({' '}
          <Over
            top={
              <>
                <Q sub="low">F</Q> − <Q>U</Q>
              </>
            }
            under={<Q>m</Q>}
          />{' '}
          , <Q sub="rated">F</Q> ), rounded down
        </>
      ),
    },
    {
      gives: 'Gauge not past',
      say: 'P C equals C plus the pull of the springs less the weight, over A, rounded down to a step',
      maths: (
        <>
          <Q sub="C">P</Q> ={' '}
          <Over
            top={
              <>
                <Q>C</Q> + <Q sub="ret">F</Q> − <Q>W</Q>
              </>
            }
            under={<Q>A</Q>}
          />
          , rounded down to a step
        </>
      ),
    },
  ],
  symbols: [
    { sign: <Q>C</Q>, say: 'C', meaning: 'clearance load', unit: 'kN, or as read' },
    { sign: <Q sub="low">F</Q>, say: 'F low', meaning: 'lowest force through the last hold at full load', unit: 'N, kN' },
    { sign: <Q>U</Q>, say: 'U', meaning: 'expanded uncertainty of that force', unit: 'N, kN' },
    { sign: <Q>m</Q>, say: 'm', meaning: 'margin of the protocol; 1 unless the shop sets one, never below', unit: 'none' },
    { sign: <Q sub="rated">F</Q>, say: 'F rated', meaning: 'rated load', unit: 'N, kN' },
    {
      sign: (
        <>
          <Q sub="ret">F</Q>, <Q>W</Q>, <Q>A</Q>
        </>
      ),
      say: 'F ret, W and A',
      meaning: 'springs, weight and area of the ram it was proven with',
      unit: 'N, N, mm²',
    },
  ],
  Drawing,
  drawing: { title: 'From rated down to cleared', note: 'The scale begins near the top: what is taken off is small, and it is taken off.' },
  example() {
    const { force, U, cleared, gauge } = worked()
    const other = worked(OTHER_MARGIN)
    return {
      given: [
        ['Lowest reading of the last hold', asTyped(HOLD_END.gauge)],
        ['Margin', '1'],
        ['Rated load', asTyped(RATED)],
        ['One step of the gauge', asTyped(GAUGE_STEP)],
      ],
      steps: [
        { what: 'Lowest force', sum: `at ${asTyped(HOLD_END.gauge)}, with springs and weight`, value: kN(force) },
        { what: 'Its uncertainty', sum: 'by the budget of a force', value: `± ${kN(U)}` },
        {
          what: 'Cleared up to',
          sum: `(${formatNumber(force / 1000, 2)} − ${formatNumber(U / 1000, 2)}) ÷ 1, rounded down`,
          value: formatQuantity(cleared.load, 'kN', 1),
        },
        {
          what: 'Gauge not past',
          sum: `the pressure that makes it, rounded down to ${asTyped(GAUGE_STEP)}; that makes ${kN(gauge.force)}`,
          value: formatQuantity(gauge.pressure, 'bar', 0),
        },
        {
          what: `With a margin of ${OTHER_MARGIN}`,
          sum: `(${formatNumber(force / 1000, 2)} − ${formatNumber(U / 1000, 2)}) ÷ ${OTHER_MARGIN}, rounded down`,
          value: formatQuantity(other.cleared.load, 'kN', 1),
        },
      ],
      so: 'It holds for the bed hole, ram position, tooling and gauge it was proven with, until the date on it, and ends at once when the press is changed, overloaded or knocked. Friction in the seals doesn’t lower it, because the press is later used by the same ram and gauge; changing either ends it.',
    }
  },
  usedIn: [
    { where: 'Press page: cleared up to, and the gauge pressure beside it', to: paths.presses.href() },
    { where: 'Record: the arithmetic of the load', to: paths.proofTests.href() },
    { where: 'Protocol: the margin', to: paths.protocols.href() },
  ],
  sources: [
    'The lowest force less its uncertainty, over a margin, rounded down: common practice, no source.',
    'Examined again within six months, for jacks used at one place: 29 CFR 1910.244(a)(2)(vi).',
  ],
  cautions: CAUTIONS,
}
