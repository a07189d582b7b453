import { creep, creepLimit, creepUncertainty, pressureLoss, pressureLossUncertainty } from '#shared/statistics/hold'
import { stepStiffness } from '#shared/statistics/softening'
import { formatNumber, toSI, type Typed } from '#shared/units'
import { paths } from '../../../paths'
import { Axes, Board, Line, Say } from '../drawing-kit'
import {
  asTyped,
  climb,
  deflectionsOf,
  forceAt,
  forceWithU,
  FULL,
  GAUGE_STEP,
  HOLD_END,
  INDICATOR_STEP,
  kN,
  mm,
  MOST_CREEP,
  MOST_LOSS,
  netUncertainty,
  percent,
  perMillimetre,
} from '../example-press'
import { Over, Q, Root, Sum } from '../maths'
import type { Topic } from '../topic'

/** A hold that was topped up once, invented. */
const FALLEN: Typed<'bar'> = { text: '490', unit: 'bar' }
const TOPPED: Typed<'bar'> = { text: '505', unit: 'bar' }

/** Pressure over time: falling, topped up, falling again; the falls add up. */
function Drawing() {
  return (
    <Board
      label="Gauge pressure over the time of a hold: it falls, is topped up, and falls again. Both falls count, and the top-up starts the hold anew."
      height={340}
    >
      <Axes left={56} right={416} top={60} bottom={290} up="gauge" along="time of the hold" />
      <Line
        points={[
          { x: 70, y: 110 },
          { x: 190, y: 186 },
        ]}
        width={2.4}
      />
      <Line
        points={[
          { x: 190, y: 186 },
          { x: 206, y: 110 },
        ]}
        width={1.6}
        dash="7 5"
        tone="chalk"
      />
      <Line
        points={[
          { x: 206, y: 110 },
          { x: 400, y: 150 },
        ]}
        width={2.4}
      />
      <Line
        points={[
          { x: 56, y: 110 },
          { x: 410, y: 110 },
        ]}
        tone="ghost"
        dash="2 5"
        width={1.2}
      />
      <Line
        points={[
          { x: 182, y: 110 },
          { x: 182, y: 180 },
        ]}
        tone="faint-scribe"
        width={1.2}
      />
      <Line
        points={[
          { x: 392, y: 110 },
          { x: 392, y: 148 },
        ]}
        tone="faint-scribe"
        width={1.2}
      />
      <Say x={96} y={204}>
        first fall
      </Say>
      <Say x={404} y={180} anchor="end">
        second fall
      </Say>
      <Say x={214} y={226} tone="chalk">
        topped up:
      </Say>
      <Say x={214} y={248} tone="chalk">
        the hold starts again
      </Say>
    </Board>
  )
}

export const holdTopic: Topic = {
  slug: 'hold',
  title: 'Hold: pressure loss and creep',
  question: 'Does it hold, or does it leak or crawl?',
  answer:
    'While a stage is held the gauge shows whether oil gets away, and the indicators whether steel does. Every fall between top-ups counts. Creep is what the frame moved by itself, at equal pressure: what a falling pressure let spring back is put in again.',
  formulas: [
    {
      gives: 'Pressure lost in a hold',
      say: 'loss equals the sum over the stretches between top-ups of first less last reading, over the pressure at the start',
      maths: (
        <>
          <Q>l</Q> ={' '}
          <Over
            top={
              <>
                <Sum />( <Q sub="first">P</Q> − <Q sub="last">P</Q> )
              </>
            }
            under={<Q sub="start">P</Q>}
          />
        </>
      ),
    },
    {
      gives: 'Its uncertainty, m stretches',
      say: 'U l equals 2 times the square root of 2 m, times q over the square root of 12, over the pressure at the start',
      maths: (
        <>
          <Q sub="l">U</Q> ={' '}
          <Over
            top={
              <>
                2{' '}
                <Root>
                  2<Q>m</Q>
                </Root>{' '}
                · <Q>q</Q>
              </>
            }
            under={
              <>
                <Root>12</Root> · <Q sub="start">P</Q>
              </>
            }
          />
        </>
      ),
    },
    {
      gives: 'Creep at equal pressure',
      say: 'c equals delta end less delta start, plus F start less F end over K',
      maths: (
        <>
          <Q>c</Q> = <Q sub="end">δ</Q> − <Q sub="start">δ</Q> +{' '}
          <Over
            top={
              <>
                <Q sub="start">F</Q> − <Q sub="end">F</Q>
              </>
            }
            under={<Q>K</Q>}
          />
        </>
      ),
    },
    {
      gives: 'The most it may be',
      say: 'limit equals the larger of p times delta, and 2 times q indicator',
      maths: (
        <>
          <Q sub="max">c</Q> = max( <Q>p</Q> · <Q>δ</Q> , 2 <Q sub="δ">q</Q> )
        </>
      ),
    },
  ],
  symbols: [
    { sign: <Q>l</Q>, say: 'l', meaning: 'pressure lost, as a share of where the hold began', unit: '%' },
    { sign: <Q>P</Q>, say: 'P', meaning: 'gauge readings of the hold', unit: 'bar, psi' },
    { sign: <Q>q</Q>, say: 'q', meaning: 'one step of the gauge; with δ, of the indicator', unit: 'bar, mm' },
    { sign: <Q>c</Q>, say: 'c', meaning: 'creep', unit: 'mm' },
    { sign: <Q>δ</Q>, say: 'delta', meaning: 'deflection at start and end of the hold', unit: 'mm' },
    { sign: <Q>F</Q>, say: 'F', meaning: 'force at start and end of the hold', unit: 'kN' },
    { sign: <Q>K</Q>, say: 'K', meaning: 'stiffness of the step that led to this stage', unit: 'kN/mm' },
    { sign: <Q>p</Q>, say: 'p', meaning: 'share of the stage’s deflection that the protocol allows', unit: '%' },
  ],
  Drawing,
  drawing: {
    title: 'A hold that was topped up',
    note: 'A second top-up at full load is a stop: oil that has to be put back twice is going somewhere.',
  },
  example() {
    const readings = [
      { pressure: toSI(FULL.gauge), toppedUp: false },
      { pressure: toSI(HOLD_END.gauge), toppedUp: false },
    ]
    const toppedUp = [
      { pressure: toSI(FULL.gauge), toppedUp: false },
      { pressure: toSI(FALLEN), toppedUp: false },
      { pressure: toSI(TOPPED), toppedUp: true },
      { pressure: toSI(HOLD_END.gauge), toppedUp: false },
    ]
    const [start, end] = [deflectionsOf(FULL).net, deflectionsOf(HOLD_END).net]
    const [forceStart, forceEnd] = [forceAt(FULL.gauge), forceAt(HOLD_END.gauge)]
    const stiffness = stepStiffness(climb()).at(-1)?.stiffness ?? Infinity
    const value = creep({ deflectionStart: start, deflectionEnd: end, forceStart, forceEnd, stiffness })
    const U = creepUncertainty({ uDeflection: netUncertainty(1).u, uForce: forceWithU(FULL.gauge).uIndependent, stiffness })
    const limit = creepLimit({ fraction: MOST_CREEP, stageDeflection: start, increment: toSI(INDICATOR_STEP) })
    return {
      given: [
        ['Gauge, start and end', `${FULL.gauge.text} and ${asTyped(HOLD_END.gauge)}`],
        ['One step of the gauge', asTyped(GAUGE_STEP)],
        ['Net, start and end', `${formatNumber(start * 1000, 3)} and ${mm(end)}`],
        ['Stiffness of the last step', perMillimetre(stiffness)],
      ],
      steps: [
        {
          what: 'Pressure lost',
          sum: `(${FULL.gauge.text} − ${HOLD_END.gauge.text}) ÷ ${FULL.gauge.text}`,
          value: percent(pressureLoss(readings), 2),
          note: `The shipped limit is ${percent(MOST_LOSS, 0)}.`,
        },
        {
          what: 'Its uncertainty',
          sum: `2 × √2 × ${GAUGE_STEP.text} ÷ √12 ÷ ${FULL.gauge.text}`,
          value: `± ${percent(pressureLossUncertainty(readings, toSI(GAUGE_STEP)), 2)}`,
        },
        {
          what: `Had it been topped up at ${asTyped(FALLEN)}`,
          sum: `((${FULL.gauge.text} − ${FALLEN.text}) + (${TOPPED.text} − ${HOLD_END.gauge.text})) ÷ ${FULL.gauge.text}`,
          value: percent(pressureLoss(toppedUp), 2),
        },
        {
          what: 'Sprung back as the force fell',
          sum: `(${formatNumber(forceStart / 1000, 2)} − ${formatNumber(forceEnd / 1000, 2)}) kN ÷ ${perMillimetre(stiffness)}`,
          value: mm((forceStart - forceEnd) / stiffness, 4),
        },
        {
          what: 'Creep',
          sum: `${formatNumber(end * 1000, 3)} − ${formatNumber(start * 1000, 3)} + ${formatNumber(((forceStart - forceEnd) / stiffness) * 1000, 4)} mm`,
          value: mm(value, 4),
        },
        {
          what: 'Uncertainty of the creep',
          sum: '2 × √2 × √(u² of the net + (u of the force ÷ stiffness)²): start and end of the hold',
          value: `± ${mm(U, 4)}`,
        },
        {
          what: 'The most it may be',
          sum: `the larger of ${percent(MOST_CREEP, 0)} of ${mm(start)} and 2 × ${asTyped(INDICATOR_STEP)}`,
          value: mm(limit, 4),
          note: `The fall of ${kN(forceStart - forceEnd)} is oil; the creep is steel.`,
        },
      ],
      so: 'Beyond its limit, either one stops the test: release first, look after.',
    }
  },
  usedIn: [
    { where: 'Run: at the end of every hold' },
    { where: 'Record: pressure loss and creep, the worst of the test', to: paths.proofTests.href() },
    { where: 'Protocol: lengths of the holds and both limits', to: paths.protocols.href() },
  ],
  sources: [
    'Pressure loss, creep and their limits: common practice, no source.',
    'Uncertainties: JCGM 100:2008 (GUM), 4.3.7 and 5.1.2.',
    'Holds of one minute off centre and ten minutes above rating: ASME ASP-2010, 3-4.1.1 and 3-4.1.3.',
  ],
  cautions: [],
}
