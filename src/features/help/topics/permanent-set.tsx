import {
  ASP_PERMANENT_INCREASE_LIMIT,
  indicatorTooCoarse,
  secondSetVanishes,
  setIsResolved,
  setLimit,
} from '#shared/statistics/permanent-set'
import { formatNumber, toSI, type Typed } from '#shared/units'
import { paths } from '../../../paths'
import { Axes, Board, Distance, Letter, Line, Say } from '../drawing-kit'
import { asTyped, deflectionsOf, FULL, INDICATOR_STEP, mm, MOST_SET, netUncertainty, percent, SECOND_SET, SET } from '../example-press'
import { Q } from '../maths'
import type { Topic } from '../topic'

/** An indicator that many a shop has. */
const COARSE: Typed<'mm'> = { text: '0.05', unit: 'mm' }

/** Up the line, down again, and what is left at the foot. */
function Drawing() {
  return (
    <Board
      label="Load up, deflection right. Going up and coming down again, the frame does not quite return to where it started: what is left is the permanent set. A second climb returns to where it began."
      height={370}
    >
      <Axes left={56} right={416} top={46} bottom={310} up="load" along="deflection" />
      <Line
        points={[
          { x: 56, y: 310 },
          { x: 110, y: 262 },
          { x: 330, y: 80 },
        ]}
        width={2.4}
      />
      <Line
        points={[
          { x: 330, y: 80 },
          { x: 106, y: 310 },
        ]}
        width={1.6}
        dash="9 5"
      />
      <Line
        points={[
          { x: 114, y: 310 },
          { x: 340, y: 84 },
        ]}
        width={1.6}
        tone="sound-line"
      />
      <Distance from={{ x: 56, y: 330 }} to={{ x: 106, y: 330 }} tone="chalk" />
      <Say x={56} y={354} tone="chalk" strong>
        set
      </Say>
      <Say x={182} y={180} anchor="end">
        first climb
      </Say>
      <Say x={262} y={200} tone="sound-line">
        repeat climb:
      </Say>
      <Say x={262} y={222} tone="sound-line">
        comes back
      </Say>
      <Distance from={{ x: 60, y: 64 }} to={{ x: 330, y: 64 }} />
      <Say x={196} y={56} anchor="middle">
        <Letter sub="full">δ</Letter>
      </Say>
    </Board>
  )
}

export const permanentSetTopic: Topic = {
  slug: 'permanent-set',
  title: 'Permanent set and the repeat climb',
  question: 'Did it come back to where it started?',
  answer:
    'A spring comes back; steel that yielded doesn’t, nor does a joint that slipped into place. What is left after release and recovery is the set. If it can be seen at all, the load goes on once more: bedding-in happens once, yielding goes on.',
  formulas: [
    {
      gives: 'Permanent set of a point, or of the net',
      say: 'set equals delta after release and recovery, from the datum',
      maths: (
        <>
          <Q sub="set">δ</Q> = <Q sub="after">r</Q> − <Q sub="0">r</Q>
        </>
      ),
    },
    {
      gives: 'The most that may stay',
      say: 'limit equals the larger of p times delta full, and 2 times q',
      maths: (
        <>
          <Q sub="max">δ</Q> = max( <Q>p</Q> · <Q sub="full">δ</Q> , 2 <Q>q</Q> )
        </>
      ),
    },
    {
      gives: 'Can be seen: repeat the climb',
      say: 'the size of the set is more than its U',
      maths: (
        <>
          | <Q sub="set">δ</Q> | &gt; <Q>U</Q>
        </>
      ),
    },
    {
      gives: 'Was bedding-in: the second set, from the datum after the first release, vanishes',
      say: 'the size of the second set is at most its U',
      maths: (
        <>
          | <Q sub="set 2">δ</Q> | ≤ <Q>U</Q>
        </>
      ),
    },
  ],
  symbols: [
    {
      sign: <Q sub="set">δ</Q>,
      say: 'delta set',
      meaning: 'what is left, in the datum’s contact condition, temperature noted',
      unit: 'mm, in',
    },
    { sign: <Q sub="full">δ</Q>, say: 'delta full', meaning: 'deflection at full load', unit: 'mm, in' },
    { sign: <Q>p</Q>, say: 'p', meaning: 'share of it that the protocol lets stay', unit: '%' },
    { sign: <Q>q</Q>, say: 'q', meaning: 'one step of the indicator', unit: 'mm, in' },
    { sign: <Q>U</Q>, say: 'U', meaning: 'expanded uncertainty of the set', unit: 'mm, in' },
  ],
  Drawing,
  drawing: { title: 'Up, down, and up again', note: 'The second climb counts from the datum after the first release.' },
  example() {
    const full = deflectionsOf(FULL).net
    const first = deflectionsOf(SET).net
    const second = deflectionsOf(SECOND_SET, SET).net
    const { U } = netUncertainty(2)
    const limit = setLimit({ fraction: MOST_SET, fullDeflection: full, increment: toSI(INDICATOR_STEP) })
    const coarse = indicatorTooCoarse({ fraction: MOST_SET, fullDeflection: full, increment: toSI(COARSE) })
    return {
      given: [
        ['Net at full load', mm(full)],
        ['Net after release', mm(first)],
        ['Net after the repeat climb, from there', mm(second, 4)],
        ['One step', asTyped(INDICATOR_STEP)],
      ],
      steps: [
        { what: 'Set', sum: 'net after release and recovery, less the datum', value: mm(first) },
        {
          what: 'The most that may stay',
          sum: `the larger of ${percent(MOST_SET, 0)} of ${mm(full)} and 2 × ${asTyped(INDICATOR_STEP)}`,
          value: mm(limit, 4),
        },
        {
          what: 'Can it be seen',
          sum: `${mm(first)} against U ${mm(U, 4)}`,
          value: setIsResolved({ set: first, U }) ? 'seen: repeat the climb' : 'not seen',
        },
        {
          what: 'Second set',
          sum: `${mm(second, 4)} against U ${mm(U, 4)}`,
          value: secondSetVanishes({ set: second, U }) ? 'vanishes: bedding-in' : 'stays: the frame yields',
        },
        {
          what: `With an indicator that reads by ${asTyped(COARSE)}`,
          sum: `2 × ${COARSE.text} = ${formatNumber(2 * Number(COARSE.text), 2)} mm against ${percent(MOST_SET, 0)} of ${mm(full)}`,
          value: coarse ? 'too coarse' : 'fine enough',
          note: coarse ? 'The plan asks for a finer indicator.' : undefined,
        },
        {
          what: 'What ASME ASP-2010 allows at most',
          sum: '0.125 in increase of the opening; the shop’s own tighter limit applies as well',
          value: mm(ASP_PERMANENT_INCREASE_LIMIT),
        },
      ],
      so: 'A second set that stays means that the frame yields: the test is rejected. Read the set in the datum’s contact condition, and note the temperature; a warmed frame is longer.',
    }
  },
  usedIn: [
    { where: 'Run: after release and recovery' },
    { where: 'Record: permanent set, and whether a climb was repeated', to: paths.proofTests.href() },
    { where: 'Protocol: the most set allowed, and when a climb is repeated', to: paths.protocols.href() },
  ],
  sources: [
    'Seen or not seen: JCGM 106:2012, clause 8.',
    'Increase of the opening of 0.125 in (3.18 mm): ASME ASP-2010, 3-4.1.1 and 3-4.1.3.',
    'The share of 5 %, two steps, and the repeat climb: common practice, no source.',
  ],
  cautions: [],
}
