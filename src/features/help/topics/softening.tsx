import { stepStiffness } from '#shared/statistics/softening'
import { formatNumber } from '#shared/units'
import { paths } from '../../../paths'
import { Axes, Board, Line, Say, scaleTo, Whisker } from '../drawing-kit'
import { climb, MOST_SOFTENING, percent, perMillimetre, STAGES } from '../example-press'
import { Over, Q, Root, Sum, Tall, Up } from '../maths'
import type { Topic } from '../topic'

const names = ['datum', ...STAGES.map(({ what }) => what)]

function worked() {
  const points = climb()
  const steps = stepStiffness(points)
  const last = steps.at(-1)
  const reference = last?.reference === null || last === undefined ? undefined : steps[last.reference]
  if (last === undefined || last.softening === null || last.U === null || reference === undefined) {
    throw new RangeError('The example’s climb has no step to compare with.')
  }
  return { points, steps, last: { ...last, softening: last.softening, U: last.U }, reference }
}

/** The same climb with each step's own slope; a frame that goes soft leans over further. */
function Drawing() {
  const { points, last, reference } = worked()
  const right = scaleTo(0, 1.25e-3, 56, 410)
  const up = scaleTo(0, 112e3, 330, 60)
  const place = (force: number, deflection: number) => ({ x: right(deflection), y: up(force) })
  const [from, to] = [points[last.from], points[last.to]]
  const straight = from && to ? place(to.force, from.deflection + (to.force - from.force) / reference.stiffness) : place(0, 0)
  const yielding = from && to ? place(to.force, from.deflection + (to.force - from.force) / (reference.stiffness * 0.6)) : place(0, 0)
  return (
    <Board
      label="Load up, deflection right. Each step between two stages has a stiffness of its own; the last one is compared with the stiffest before it. A frame that goes soft leans over to the right."
      height={370}
    >
      <Axes left={56} right={416} top={46} bottom={330} up="load, kN" along="deflection, mm" />
      {from && <Line points={[place(from.force, from.deflection), yielding]} tone="stop-line" dash="7 5" />}
      <Say x={yielding.x + 4} y={yielding.y - 10} anchor="middle" tone="stop-text">
        goes soft
      </Say>
      {from && <Line points={[place(from.force, from.deflection), straight]} tone="faint-scribe" dash="2 5" width={2} />}
      <Line points={points.map(({ force, deflection }) => place(force, deflection))} width={2.4} />
      {points.map(({ force, deflection }, index) => (
        <g key={force}>
          <Whisker at={place(force, deflection)} half={3} />
          <Say x={place(force, deflection).x - 14} y={place(force, deflection).y - 4} anchor="end">
            {index === 0 ? '' : names[index]}
          </Say>
        </g>
      ))}
      <Say x={right(0.62e-3)} y={up(55e3)} tone="scribe">
        stiffest step
      </Say>
      <Say x={right(0.2e-3) + 14} y={up(12e3)}>
        soft from slack
      </Say>
    </Board>
  )
}

export const softeningTopic: Topic = {
  slug: 'softening',
  title: 'Softening',
  question: 'Is something beginning to give?',
  answer:
    'Between two stages the frame has a stiffness: so many kN for each millimetre. When a step is softer than the stiffest one before it, something has begun to yield, slip or open. The first step is soft from slack, so it is no measure once a later one is stiffer.',
  formulas: [
    {
      gives: 'Stiffness of a step',
      say: 'K i equals delta F i over delta delta i',
      maths: (
        <>
          <Q sub="i">K</Q> ={' '}
          <Over
            top={
              <>
                Δ<Q sub="i">F</Q>
              </>
            }
            under={
              <>
                Δ<Q sub="i">δ</Q>
              </>
            }
          />
        </>
      ),
    },
    {
      gives: 'Softening of a step',
      say: 'softening i equals 1 less K i over the largest of K 1 to K i minus 1',
      maths: (
        <>
          <Q sub="i">s</Q> = 1 −{' '}
          <Over
            top={<Q sub="i">K</Q>}
            under={
              <>
                max( <Q sub="1">K</Q> … <Q sub="i−1">K</Q> )
              </>
            }
          />
        </>
      ),
    },
    {
      gives: 'Its uncertainty: each reading counted once, with its sign',
      say: 'U equals 2 times the square root of the sum over readings j of: d s by d F j times u F, squared, plus d s by d delta j times u delta, squared',
      maths: (
        <>
          <Q>U</Q> = 2{' '}
          <Root>
            <Sum over="j" />
            <Tall>
              <Over
                top={
                  <>
                    ∂<Q>s</Q>
                  </>
                }
                under={
                  <>
                    ∂<Q sub="j">F</Q>
                  </>
                }
              />{' '}
              <Q sub="F">u</Q>
            </Tall>
            <Up>2</Up> +{' '}
            <Tall>
              <Over
                top={
                  <>
                    ∂<Q>s</Q>
                  </>
                }
                under={
                  <>
                    ∂<Q sub="j">δ</Q>
                  </>
                }
              />{' '}
              <Q sub="δ">u</Q>
            </Tall>
            <Up>2</Up>
          </Root>
        </>
      ),
    },
  ],
  symbols: [
    { sign: <Q sub="i">K</Q>, say: 'K i', meaning: 'stiffness of the i-th step', unit: 'kN/mm' },
    {
      sign: (
        <>
          Δ<Q sub="i">F</Q>
        </>
      ),
      say: 'delta F i',
      meaning: 'rise of the force in that step',
      unit: 'kN',
    },
    {
      sign: (
        <>
          Δ<Q sub="i">δ</Q>
        </>
      ),
      say: 'delta delta i',
      meaning: 'growth of the deflection in that step',
      unit: 'mm',
    },
    { sign: <Q sub="i">s</Q>, say: 's i', meaning: 'softening: 0 when as stiff as the stiffest before, 1 when nothing resists', unit: '%' },
    {
      sign: (
        <>
          <Q sub="F">u</Q>, <Q sub="δ">u</Q>
        </>
      ),
      say: 'u F and u delta',
      meaning: 'what differs from reading to reading; the gauge’s gain and the bore are the same in both steps and cancel',
      unit: 'kN, mm',
    },
  ],
  Drawing,
  drawing: {
    title: 'Each step has its own slope',
    note: 'Dotted: where full load would lie had the last step been as stiff as the stiffest one.',
  },
  example() {
    const { points, steps, last, reference } = worked()
    const between = (index: number) => `${names[index] ?? ''} to ${names[index + 1] ?? ''}`
    const quotient = (index: number) => {
      const [a, b] = [points[index], points[index + 1]]
      if (!a || !b) return ''
      return `${formatNumber((b.force - a.force) / 1000, 2)} kN ÷ ${formatNumber((b.deflection - a.deflection) * 1000, 3)} mm`
    }
    return {
      given: points.map((point, index) => [
        names[index] ?? '',
        `${formatNumber(point.force / 1000, 2)} kN, ${formatNumber(point.deflection * 1000, 3)} mm`,
      ]),
      steps: [
        ...steps.map((step, index) => ({
          what: `Step from ${between(index)}`,
          sum: quotient(index),
          value: perMillimetre(step.stiffness),
        })),
        {
          what: 'Softening of the last step',
          sum: `1 − ${formatNumber(last.stiffness / 1e6, 1)} ÷ ${formatNumber(reference.stiffness / 1e6, 1)}, against ${between(reference.from)}`,
          value: percent(last.softening),
        },
        {
          what: 'Its uncertainty',
          sum: 'the reading that both steps share is counted once',
          value: `± ${percent(last.U)}`,
          note: `The shipped limit is ${percent(MOST_SOFTENING, 0)}.`,
        },
      ],
      so: 'Beyond the limit by more than its uncertainty: stop. With the limit inside the uncertainty nobody can tell: read again, then release.',
    }
  },
  usedIn: [
    { where: 'Run: the verdict after each stage' },
    { where: 'Record: softening of each step, and the worst of them', to: paths.proofTests.href() },
    { where: 'Protocol: the most softening allowed', to: paths.protocols.href() },
  ],
  sources: [
    'Uncertainty with what is common to both steps: JCGM 100:2008 (GUM), 5.1.2 and 5.2.2.',
    'Softening against the stiffest step so far, and its limit of 15 %: common practice, no source.',
  ],
  cautions: [],
}
