import { judge, type DecisionRule, type Verdict } from '#shared/statistics/decision-rule'
import { setLimit } from '#shared/statistics/permanent-set'
import { toSI } from '#shared/units'
import { MarkShape } from '../../../components/marks'
import { paths } from '../../../paths'
import { Board, Line, Say, scaleTo, Whisker } from '../drawing-kit'
import { deflectionsOf, FULL, INDICATOR_STEP, mm, MOST_SET, netUncertainty, SET } from '../example-press'
import { Q } from '../maths'
import type { Topic } from '../topic'

/** The set's limit and uncertainty, and values about it: as read, and so far beside the limit as shares of U. */
function worked() {
  const limit = setLimit({ fraction: MOST_SET, fullDeflection: deflectionsOf(FULL).net, increment: toSI(INDICATOR_STEP) })
  const { U } = netUncertainty(2)
  const values = [deflectionsOf(SET).net, limit - U / 2, limit + U / 2, limit + 1.5 * U]
  const by = (value: number, rule: DecisionRule): Verdict => judge({ value, U, limit: { max: limit }, rule })
  return { limit, U, values, by }
}

function Drawing() {
  const { limit, U, values, by } = worked()
  const up = scaleTo(0, limit + 2.6 * U, 330, 40)
  return (
    <Board
      label="Four values with their uncertainty against one limit: well under it, just under it, just over it, and beyond it by more than the uncertainty."
      height={430}
    >
      <Line
        points={[
          { x: 40, y: up(0) },
          { x: 416, y: up(0) },
        ]}
        tone="faint-scribe"
        width={1.2}
      />
      <Line
        points={[
          { x: 40, y: up(limit) },
          { x: 416, y: up(limit) },
        ]}
        tone="stop-line"
        width={3}
      />
      <Say x={40} y={up(limit) - 10} tone="stop-text" strong>
        limit
      </Say>
      <Line
        points={[
          { x: 40, y: up(limit - U) },
          { x: 416, y: up(limit - U) },
        ]}
        tone="faint-scribe"
        dash="7 5"
        width={1.2}
      />
      <Say x={40} y={up(limit - U) + 22}>
        limit − U
      </Say>
      {values.map((value, index) => {
        const x = 150 + index * 82
        return (
          <g key={value}>
            <Whisker at={{ x, y: up(value) }} half={up(0) - up(U)} upright />
            {(['simple', 'guard-band'] as const).map((rule, line) => (
              <MarkShape key={rule} name={by(value, rule)} x={x} y={364 + line * 40} size={26} tone="dye" />
            ))}
          </g>
        )
      })}
      <Say x={16} y={370}>
        simple
      </Say>
      <Say x={16} y={410}>
        guard band
      </Say>
    </Board>
  )
}

export const decisionRuleTopic: Topic = {
  slug: 'decision-rule',
  title: 'Decision rule',
  question: 'When is a value within its limit, when beyond it, and when can nobody tell?',
  answer:
    'A value read just under a limit may really lie above it. The protocol says beforehand which rule holds: simple acceptance takes the reading at its word; a guard band asks that reading and uncertainty together stay under. Beyond is beyond only when the uncertainty can’t explain it.',
  formulas: [
    {
      gives: 'Within, by simple acceptance',
      say: 'x is at most L',
      maths: (
        <>
          <Q>x</Q> ≤ <Q>L</Q>
        </>
      ),
    },
    {
      gives: 'Within, by a guard band of U',
      say: 'x plus U is at most L',
      maths: (
        <>
          <Q>x</Q> + <Q>U</Q> ≤ <Q>L</Q>
        </>
      ),
    },
    {
      gives: 'Beyond, by either rule',
      say: 'x less U is more than L',
      maths: (
        <>
          <Q>x</Q> − <Q>U</Q> &gt; <Q>L</Q>
        </>
      ),
    },
    { gives: 'Undecided', say: 'everything between within and beyond', maths: 'neither within nor beyond' },
  ],
  symbols: [
    { sign: <Q>x</Q>, say: 'x', meaning: 'the value: a set, a softening, a loss', unit: 'its own' },
    { sign: <Q>U</Q>, say: 'U', meaning: 'its expanded uncertainty, k = 2', unit: 'as x' },
    { sign: <Q>L</Q>, say: 'L', meaning: 'the most it may be; for a least value the same, mirrored', unit: 'as x' },
  ],
  Drawing,
  drawing: { title: 'One limit, four readings', note: 'Ring with a tick: within. Half-filled square: undecided. Octagon: beyond.' },
  example() {
    const { limit, U, values, by } = worked()
    const [asRead = 0, under = 0, over = 0, beyond = 0] = values
    const line = (what: string, value: number) => ({
      what,
      sum: `${mm(value, 4)}: from ${mm(value - U, 4)} to ${mm(value + U, 4)}; by a guard band ${by(value, 'guard-band')}`,
      value: by(value, 'simple'),
    })
    return {
      given: [
        ['Limit of the permanent set', mm(limit, 4)],
        ['U of the set', mm(U, 4)],
      ],
      steps: [
        line('The set as read', asRead),
        line('Half of U under the limit', under),
        line('Half of U over the limit', over),
        line('One and a half U over the limit', beyond),
      ],
      so: 'Beyond on a limit that stops: stop. Undecided under load: wait, read again, then release; nobody goes on with a reason. Where the instruments can’t tell a limit at all, the plan says so before anything is loaded.',
    }
  },
  usedIn: [
    { where: 'Run: go on, wait or stop after each stage' },
    { where: 'Record: each criterion with value, limit and verdict', to: paths.proofTests.href() },
    { where: 'Protocol: which of the two rules holds', to: paths.protocols.href() },
  ],
  sources: ['JCGM 106:2012, clause 8.', 'ILAC-G8:09/2019, 4.2: simple acceptance and guard bands.'],
  cautions: [],
}
