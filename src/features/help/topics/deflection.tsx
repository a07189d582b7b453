import { deflectionUncertainty } from '#shared/hydraulics/uncertainty'
import { toSI } from '#shared/units'
import { CentreLine, Hair } from '../../../components/instruments/drafting'
import { paths } from '../../../paths'
import { Arrow, Board, Distance, Letter, Line, Say } from '../drawing-kit'
import { asTyped, DATUM, deflectionsOf, FULL, INDICATOR_LIMIT, INDICATOR_STEP, mm, netUncertainty } from '../example-press'
import { Over, Q, Root, Sum, Up } from '../maths'
import type { Topic } from '../topic'

/** The bed sags, its pins give: what each of three indicators sees. */
function Drawing() {
  const sag = Array.from({ length: 41 }, (_, index) => {
    const share = index / 40
    return { x: 76 + share * 280, y: 190 + 70 * Math.sin(Math.PI * share) }
  })
  return (
    <Board
      label="A bed beam on two pins bends under the ram. Indicators at the left pin, the middle and the right pin each read how far they moved. The net is the middle less the mean of the pins."
      height={370}
    >
      <Line
        points={[
          { x: 60, y: 150 },
          { x: 372, y: 150 },
        ]}
        tone="ghost"
        dash="7 5"
        width={1.4}
      />
      <Say x={372} y={140} anchor="end">
        bed before load
      </Say>
      <Line points={sag} width={2.4} />
      <Line
        points={[
          { x: 76, y: 190 },
          { x: 356, y: 190 },
        ]}
        tone="faint-scribe"
        dash="9 5"
        width={1.2}
      />
      <circle cx={76} cy={190} r={8} fill="var(--dye)" stroke="var(--scribe)" strokeWidth={1.6} />
      <circle cx={356} cy={190} r={8} fill="var(--dye)" stroke="var(--scribe)" strokeWidth={1.6} />
      <Arrow from={{ x: 216, y: 60 }} to={{ x: 216, y: 142 }} tone="scribe" width={2.4} head={13} />
      <Say x={228} y={92} tone="scribe" strong>
        <Letter>F</Letter>
      </Say>
      <CentreLine d="M216 156V318" />
      {(
        [
          [76, 190, 'L'],
          [216, 260, 'M'],
          [356, 190, 'R'],
        ] as const
      ).map(([x, y, letter]) => (
        <g key={letter}>
          <Hair d={`M${x} ${y + 10}V316M${x - 18} 318H${x + 18}`} />
          <path d={`M${x} ${y + 10}L${x - 9} ${y + 28}H${x + 9}Z`} fill="var(--dye)" stroke="var(--scribe)" strokeWidth={1.6} />
          <Say x={x} y={344} anchor="middle" tone="scribe" strong>
            {letter}
          </Say>
        </g>
      ))}
      <Distance from={{ x: 46, y: 150 }} to={{ x: 46, y: 190 }} />
      <Say x={36} y={176} anchor="end">
        <Letter sub="L">δ</Letter>
      </Say>
      <Distance from={{ x: 386, y: 150 }} to={{ x: 386, y: 190 }} />
      <Say x={396} y={176}>
        <Letter sub="R">δ</Letter>
      </Say>
      <Distance from={{ x: 250, y: 190 }} to={{ x: 250, y: 255 }} tone="chalk" />
      <Say x={262} y={220} tone="chalk" strong>
        net
      </Say>
      <Distance from={{ x: 182, y: 150 }} to={{ x: 182, y: 255 }} />
      <Say x={172} y={222} anchor="end">
        <Letter sub="M">δ</Letter>
      </Say>
    </Board>
  )
}

export const deflectionTopic: Topic = {
  slug: 'deflection',
  title: 'Deflection and net',
  question: 'How far did the frame give, and how much of that is the bed itself?',
  answer:
    'Each indicator counts from its own datum, in the direction of loading. The bed also rides down with its pins; the middle less the mean of both pins leaves what the bed alone bends. The difference between left and right says whether it went down level.',
  formulas: [
    {
      gives: 'Deflection of a point',
      say: 'delta equals r less r zero',
      maths: (
        <>
          <Q>δ</Q> = <Q>r</Q> − <Q sub="0">r</Q>
        </>
      ),
    },
    {
      gives: 'Net of the bed',
      say: 'delta net equals delta M less the half of delta L plus delta R',
      maths: (
        <>
          <Q sub="net">δ</Q> = <Q sub="M">δ</Q> −{' '}
          <Over
            top={
              <>
                <Q sub="L">δ</Q> + <Q sub="R">δ</Q>
              </>
            }
            under="2"
          />
        </>
      ),
    },
    {
      gives: 'Its uncertainty, readings and datum together',
      say: 'U equals 2 times the square root of the sum over all readings of c squared times: e squared over 3 plus q over 2 squared over 3',
      maths: (
        <>
          <Q>U</Q> = 2{' '}
          <Root>
            <Sum /> <Q>c</Q>
            <Up>2</Up>{' '}
            <Over
              top={
                <>
                  <Q>e</Q>
                  <Up>2</Up> + (<Q>q</Q>/2)<Up>2</Up>
                </>
              }
              under="3"
            />
          </Root>
        </>
      ),
    },
  ],
  symbols: [
    { sign: <Q>δ</Q>, say: 'delta', meaning: 'deflection of a point, positive in the direction of loading', unit: 'mm, in' },
    {
      sign: (
        <>
          <Q>r</Q>, <Q sub="0">r</Q>
        </>
      ),
      say: 'r and r zero',
      meaning: 'what the indicator reads, and read at the datum',
      unit: 'mm, in',
    },
    { sign: 'L, M, R', say: 'L, M, R', meaning: 'left pin, middle of the bed, right pin', unit: '' },
    {
      sign: <Q>c</Q>,
      say: 'c',
      meaning: 'how much a reading counts: 1 for the middle, ½ for each pin, and the same again for the datum',
      unit: 'none',
    },
    { sign: <Q>e</Q>, say: 'e', meaning: 'limit of error of the indicator; one step where its maker names none', unit: 'mm' },
    { sign: <Q>q</Q>, say: 'q', meaning: 'one step of the indicator', unit: 'mm' },
  ],
  Drawing,
  drawing: {
    title: 'Three indicators under a bed',
    note: 'Their stands are on the floor, independent of the frame: a stand on the frame moves with what it measures.',
  },
  example() {
    const { middle, left, right, net } = deflectionsOf(FULL)
    const one = deflectionUncertainty({ increment: toSI(INDICATOR_STEP), errorLimit: toSI(INDICATOR_LIMIT), terms: [1, -1] })
    const combined = netUncertainty(2)
    const difference = (point: 'middle' | 'left' | 'right') => `${FULL[point].text} − ${DATUM[point].text}`
    const each = `(${INDICATOR_LIMIT.text}² + (${INDICATOR_STEP.text} ÷ 2)²) ÷ 3`
    return {
      given: [
        ['Datum: L, M, R', `${DATUM.left.text}, ${DATUM.middle.text}, ${DATUM.right.text} mm`],
        ['Full load: L, M, R', `${FULL.left.text}, ${FULL.middle.text}, ${FULL.right.text} mm`],
        ['One step', asTyped(INDICATOR_STEP)],
        ['Limit of error', asTyped(INDICATOR_LIMIT)],
      ],
      steps: [
        { what: 'Middle', sum: difference('middle'), value: mm(middle) },
        { what: 'Left pin', sum: difference('left'), value: mm(left) },
        { what: 'Right pin', sum: difference('right'), value: mm(right) },
        { what: 'Left less right', sum: `${mm(left)} − ${mm(right)}`, value: mm(left - right) },
        { what: 'Net', sum: `${mm(middle)} − (${mm(left)} + ${mm(right)}) ÷ 2`, value: mm(net) },
        { what: 'U of one point', sum: `2 × √(2 × ${each})`, value: `± ${mm(one.U, 4)}` },
        {
          what: 'U of the net',
          sum: `2 × √(2 × (1² + ½² + ½²) × ${each})`,
          value: `± ${mm(combined.U, 4)}`,
          note: 'Twice, because the datum was read with the same indicators.',
        },
      ],
      so: 'Limits are applied to the net and to each point. A reading a whole turn of the pointer off what the line predicts is asked about before it is taken. Members without an indicator are named as not measured, on the record and on the tag.',
    }
  },
  usedIn: [
    { where: 'Run: the net beside the row of readings' },
    { where: 'Record: stages as read', to: paths.proofTests.href() },
    { where: 'Plan: measuring points and how they are combined', to: paths.planProofTest.href() },
  ],
  sources: [
    'Differences of readings: common practice, no source.',
    'Uncertainty: JCGM 100:2008 (GUM), 4.3.7, 5.1.2 and 6.2. One step taken for a limit of error that nobody states: common practice, no source.',
  ],
  cautions: [],
}
