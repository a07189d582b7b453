import { CAUTIONS } from '#shared/cautions'
import { deliveredAtLeast, pistonArea } from '#shared/hydraulics/ram'
import { readableTarget } from '#shared/hydraulics/target'
import { formatNumber, formatQuantity, STANDARD_GRAVITY, toSI, toUnit, weightOf } from '#shared/units'
import { CentreLine, Hair, Hatched, Outline } from '../../../components/instruments/drafting'
import { paths } from '../../../paths'
import { Arrow, Board, Distance, Letter, Line, Say } from '../drawing-kit'
import {
  asTyped,
  BORE,
  CARRIED,
  GAUGE_STEP,
  kN,
  percent,
  PROTOCOL,
  ramOfExample,
  RATED,
  SPRINGS,
  STAGE_OVER,
  STAGE_UNDER,
} from '../example-press'
import { Over, Q, Sum, Up } from '../maths'
import type { Topic } from '../topic'

const STAGE_PERCENT = 75
const FRICTION = PROTOCOL.frictionPercent / 100

/** A ram cut open: oil over the piston, springs under it, what hangs on the rod. */
function Drawing() {
  const coils = Array.from({ length: 7 }, (_, index) => ({ x: index % 2 === 0 ? 136 : 178, y: 218 + index * 12 }))
  return (
    <Board
      label="A ram cut open. Oil at pressure P pushes on the piston of bore d. Springs pull back, the weight of what hangs on the rod adds, and the force F goes into the stack."
      height={430}
    >
      <Outline>
        <path d="M118 70H314V330H250V314H182V330H118Z" />
        <path d="M132 84H300V316H250M182 316H132V84" />
        <path d="M132 168H300V204H132Z" fill="var(--thin-dye)" />
        <path d="M190 204V360H242V204" fill="var(--thin-dye)" />
        <path d="M172 360H260V384H172Z" />
      </Outline>
      <Hatched left={118} right={132} top={70} bottom={330} />
      <Hatched left={300} right={314} top={70} bottom={330} />
      <Hair d="M132 178H300M132 194H300" />
      <CentreLine d="M216 44V416" />
      <Line points={[{ x: 157, y: 206 }, ...coils, { x: 157, y: 306 }]} tone="faint-scribe" width={1.4} />
      {[152, 184, 248, 280].map((x) => (
        <Arrow key={x} from={{ x, y: 104 }} to={{ x, y: 162 }} tone="scribe" />
      ))}
      <Say x={216} y={138} anchor="middle" tone="scribe" strong size={22}>
        <Letter>P</Letter>
      </Say>
      <Distance from={{ x: 132, y: 48 }} to={{ x: 300, y: 48 }} />
      <Say x={216} y={38} anchor="middle">
        <Letter>d</Letter>, the bore
      </Say>
      <Arrow from={{ x: 112, y: 278 }} to={{ x: 112, y: 222 }} tone="faint-scribe" />
      <Say x={102} y={244} anchor="end">
        <Letter sub="ret">F</Letter>
      </Say>
      <Say x={102} y={266} anchor="end">
        springs
      </Say>
      <Arrow from={{ x: 276, y: 344 }} to={{ x: 276, y: 386 }} tone="faint-scribe" />
      <Say x={288} y={370}>
        <Letter>W</Letter>, the weight
      </Say>
      <Arrow from={{ x: 216, y: 384 }} to={{ x: 216, y: 426 }} tone="chalk" width={3} head={14} />
      <Say x={204} y={414} anchor="end" tone="chalk" strong size={22}>
        <Letter>F</Letter>
      </Say>
      <Say x={326} y={190}>
        piston,
      </Say>
      <Say x={326} y={211}>
        area <Letter>A</Letter>
      </Say>
    </Board>
  )
}

export const ramForceTopic: Topic = {
  slug: 'ram-force',
  title: 'Ram force and target pressure',
  question: 'How hard does the ram push, and what must the gauge read?',
  answer:
    'The oil pushes on the whole face of the piston: pressure times area. Springs that pull the ram back take some of it away, and whatever comes down with the ram adds its weight. Turned round, the same sum says what to pump to.',
  formulas: [
    {
      gives: 'Area of a round piston',
      say: 'A equals pi times d squared over 4',
      maths: (
        <>
          <Q>A</Q> ={' '}
          <Over
            top={
              <>
                π · <Q>d</Q>
                <Up>2</Up>
              </>
            }
            under="4"
          />
        </>
      ),
    },
    {
      gives: 'Force of all rams together',
      say: 'F equals the sum over all rams of: P times A, less the rod-side pressure times the rod-side area, less the pull of the springs, plus the weight carried',
      maths: (
        <>
          <Q>F</Q> = <Sum over="rams" />( <Q>P</Q> · <Q>A</Q> − <Q sub="rod">P</Q> · <Q sub="rod">A</Q> − <Q sub="ret">F</Q> + <Q>W</Q> )
        </>
      ),
    },
    {
      gives: 'Target pressure of a stage',
      say: 'P t equals s times F rated, plus the pull of the springs, less the weight, all over A',
      maths: (
        <>
          <Q sub="t">P</Q> ={' '}
          <Over
            top={
              <>
                <Q>s</Q> · <Q sub="rated">F</Q> + <Q sub="ret">F</Q> − <Q>W</Q>
              </>
            }
            under={<Q>A</Q>}
          />
        </>
      ),
    },
  ],
  symbols: [
    { sign: <Q>F</Q>, say: 'F', meaning: 'force of the ram on the stack', unit: 'N, kN' },
    { sign: <Q>P</Q>, say: 'P', meaning: 'pressure on the piston, read on the ram’s side of every valve', unit: 'Pa, bar, psi' },
    { sign: <Q>A</Q>, say: 'A', meaning: 'area of the piston, or the effective area the maker states', unit: 'mm²' },
    { sign: <Q>d</Q>, say: 'd', meaning: 'bore: the piston’s diameter', unit: 'mm, in' },
    {
      sign: (
        <>
          <Q sub="rod">P</Q>, <Q sub="rod">A</Q>
        </>
      ),
      say: 'P rod and A rod',
      meaning: 'pressure and area on the rod side of a double-acting ram; no pressure when that side is vented',
      unit: 'Pa, mm²',
    },
    { sign: <Q sub="ret">F</Q>, say: 'F ret', meaning: 'pull of the return springs at that extension', unit: 'N' },
    {
      sign: <Q>W</Q>,
      say: 'W',
      meaning: 'weight that moves with the ram: positive coming down, negative when the ram lifts it',
      unit: 'N',
    },
    { sign: <Q>s</Q>, say: 's', meaning: 'the stage, as a share of the rated load', unit: 'none' },
  ],
  Drawing,
  drawing: {
    title: 'Ram, cut open',
    note: 'Rams on one manifold share the pressure, and their areas add. Isolated rams have a gauge each.',
  },
  example() {
    const ram = ramOfExample()
    const area = pistonArea(toSI(BORE))
    const weight = weightOf(toSI(CARRIED))
    const load = (toSI(RATED) * STAGE_PERCENT) / 100
    const ask = { force: load, rams: [ram], lowerTolerance: STAGE_UNDER, upperTolerance: STAGE_OVER, capPressure: Infinity }
    const target = readableTarget({ ...ask, increment: toSI(GAUGE_STEP) })
    const coarse = { text: '50', unit: 'bar' } as const
    const byCoarse = readableTarget({ ...ask, force: toSI(RATED) / 4, increment: toSI(coarse) })
    const inMPa = (pascal: number) => formatQuantity(pascal, 'MPa', 3)
    const square = formatQuantity(area, 'mm2', 1)
    return {
      given: [
        ['Rated load', asTyped(RATED)],
        ['Bore', asTyped(BORE)],
        ['Pull of the springs', asTyped(SPRINGS)],
        ['Comes down with the ram', asTyped(CARRIED)],
        ['One step of the gauge', asTyped(GAUGE_STEP)],
        ['Stage', percent(STAGE_PERCENT / 100, 0)],
      ],
      steps: [
        { what: 'Area of the piston', sum: `π × ${BORE.text}² ÷ 4`, value: square },
        { what: 'Weight that comes down', sum: `${CARRIED.text} kg × ${STANDARD_GRAVITY} m/s²`, value: formatQuantity(weight, 'N', 1) },
        { what: 'Load of the stage', sum: `${percent(STAGE_PERCENT / 100, 0)} of ${asTyped(RATED)}`, value: kN(load) },
        {
          what: 'Target pressure, exact',
          sum: `(${formatNumber(load, 0)} + ${SPRINGS.text} − ${formatNumber(weight, 1)}) N ÷ ${square} = ${inMPa(target.exact)}`,
          value: formatQuantity(target.exact, 'bar', 1),
          note: 'One MPa is one newton on each square millimetre, and ten bar.',
        },
        {
          what: 'Pump to',
          sum: `rounded down to a step of ${asTyped(GAUGE_STEP)}`,
          value: formatQuantity(target.readable, 'bar', 0),
        },
        {
          what: 'Force at that reading',
          sum: `${formatNumber(toUnit(target.readable, 'MPa'), 1)} N/mm² × ${square} − ${SPRINGS.text} N + ${formatNumber(weight, 1)} N`,
          value: kN(target.force),
        },
        {
          what: 'Delivered at least',
          sum: `${kN(target.force)} × (1 − ${FRICTION}), when seals take ${percent(FRICTION, 0)}`,
          value: kN(deliveredAtLeast(target.force, FRICTION)),
        },
        {
          what: 'With a gauge that reads by 50 bar, at 25 %',
          sum: byCoarse.sentence ?? '',
          value: formatQuantity(byCoarse.readable, 'bar', 0),
        },
      ],
      so: 'Pump to the reading, from below, and never bleed back an overshoot. Where rounding down falls under the stage’s tolerance the plan says so, and offers the next value that can be read when nothing in the train is passed by it.',
    }
  },
  usedIn: [
    { where: 'Plan of a proof test: what to pump to at each stage', to: paths.planProofTest.href() },
    { where: 'Run: the dial’s arc and the live tonnage, worked out from every reading' },
    { where: 'Record: the force of each row', to: paths.proofTests.href() },
    { where: 'Press form: whether bore, rated pressure and rated capacity belong together', to: paths.newPress.href() },
  ],
  sources: [
    'Force: F = p·π·d²/4, as cylinder makers print it; with springs and weight by statics.',
    'Standard gravity 9.80665 m/s²: 3rd CGPM (1901); NIST SP 811, B.8.',
    'Seal friction of 0 to 5 %, and a ratio of rated capacity to rated pressure times area of 0.97 to 1.03: common practice, no source.',
  ],
  cautions: CAUTIONS,
}
