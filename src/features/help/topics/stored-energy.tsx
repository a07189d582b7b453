import { CAUTIONS } from '#shared/cautions'
import { OIL_BULK_MODULUS, storedEnergy } from '#shared/structure/stored-energy'
import { formatNumber, formatQuantity, STANDARD_GRAVITY, toSI, toUnit, type Typed } from '#shared/units'
import { paths } from '../../../paths'
import { Axes, Board, Distance, Letter, Line, Say } from '../drawing-kit'
import { asTyped, forceAt, FULL, kN } from '../example-press'
import { Over, Q, Up } from '../maths'
import type { Topic } from '../topic'

/** How much further head and bed stand apart at full load: more than the bed alone bends. */
const OPENING: Typed<'mm'> = { text: '3.1', unit: 'mm' }
/** Under pressure in ram, hose and pump, litres. */
const OIL_LITRES = 0.35

const worked = () =>
  storedEnergy({ force: forceAt(FULL.gauge), opening: toSI(OPENING), pressure: toSI(FULL.gauge), oilVolume: OIL_LITRES / 1000 })

function Drawing() {
  const { massDroppedOneMetre } = worked()
  return (
    <Board
      label="The energy in the frame is the area under the line from nothing to full load. It is the same as a weight dropped one metre."
      height={360}
    >
      <Axes left={40} right={262} top={60} bottom={290} up="load" along="opening" />
      <Line
        points={[
          { x: 40, y: 290 },
          { x: 236, y: 96 },
          { x: 236, y: 290 },
        ]}
        closed
        fill="var(--thin-dye)"
      />
      <Say x={184} y={236} anchor="middle" tone="scribe" strong onShape>
        ½ <Letter>F</Letter> <Letter>δ</Letter>
      </Say>
      <Say x={226} y={90} anchor="end">
        <Letter>F</Letter>
      </Say>
      <Line
        points={[
          { x: 328, y: 92 },
          { x: 392, y: 92 },
          { x: 392, y: 146 },
          { x: 328, y: 146 },
        ]}
        closed
        tone="chalk"
      />
      <Say x={360} y={126} anchor="middle" tone="chalk" strong>
        {formatNumber(massDroppedOneMetre, 0)} kg
      </Say>
      <Line
        points={[
          { x: 328, y: 290 },
          { x: 392, y: 290 },
        ]}
        width={2.4}
      />
      <Distance from={{ x: 360, y: 148 }} to={{ x: 360, y: 288 }} />
      <Say x={372} y={226}>
        1 m
      </Say>
    </Board>
  )
}

export const storedEnergyTopic: Topic = {
  slug: 'stored-energy',
  title: 'Stored energy',
  question: 'What flies when something lets go?',
  answer:
    'A loaded frame is a drawn spring, and so is the oil that is pressed together. When a joint parts, all of it comes out at once. Said as a weight dropped one metre it is easier to stand back from.',
  formulas: [
    {
      gives: 'In the frame',
      say: 'E frame equals one half of F times delta',
      maths: (
        <>
          <Q sub="frame">E</Q> = <Over top="1" under="2" /> · <Q>F</Q> · <Q>δ</Q>
        </>
      ),
    },
    {
      gives: 'In the oil',
      say: 'E oil equals one half of P squared times V over beta',
      maths: (
        <>
          <Q sub="oil">E</Q> = <Over top="1" under="2" /> ·{' '}
          <Over
            top={
              <>
                <Q>P</Q>
                <Up>2</Up> · <Q>V</Q>
              </>
            }
            under={<Q>β</Q>}
          />
        </>
      ),
    },
    {
      gives: 'The mass that brings the same, falling one metre',
      say: 'm equals E over g times one metre',
      maths: (
        <>
          <Q>m</Q> ={' '}
          <Over
            top={
              <>
                <Q sub="frame">E</Q> + <Q sub="oil">E</Q>
              </>
            }
            under={
              <>
                <Q>g</Q> · 1 m
              </>
            }
          />
        </>
      ),
    },
  ],
  symbols: [
    { sign: <Q>E</Q>, say: 'E', meaning: 'energy given back at once', unit: 'J, ft·lbf' },
    { sign: <Q>F</Q>, say: 'F', meaning: 'force at that moment', unit: 'N' },
    { sign: <Q>δ</Q>, say: 'delta', meaning: 'how much further head and bed stand apart; where only the net is measured, that', unit: 'm' },
    { sign: <Q>P</Q>, say: 'P', meaning: 'pressure of the oil', unit: 'Pa' },
    { sign: <Q>V</Q>, say: 'V', meaning: 'oil under pressure: ram, hose, pump', unit: 'm³' },
    { sign: <Q>β</Q>, say: 'beta', meaning: 'bulk modulus of the oil, without air in it', unit: 'Pa' },
    { sign: <Q>g</Q>, say: 'g', meaning: 'standard gravity', unit: 'm/s²' },
  ],
  Drawing,
  drawing: { title: 'A drawn spring', note: 'At least this much: air in the oil makes it softer, and it stores more.' },
  example() {
    const force = forceAt(FULL.gauge)
    const { frame, oil, total, massDroppedOneMetre } = worked()
    const joule = (value: number) => formatQuantity(value, 'J', 0)
    return {
      given: [
        ['Full load', kN(force)],
        ['Opening of the frame', asTyped(OPENING)],
        ['Gauge', asTyped(FULL.gauge)],
        ['Oil under pressure', `${OIL_LITRES} l`],
      ],
      steps: [
        { what: 'In the frame', sum: `½ × ${kN(force)} × ${asTyped(OPENING)}`, value: joule(frame) },
        {
          what: 'In the oil',
          sum: `½ × (${formatNumber(toUnit(toSI(FULL.gauge), 'MPa'), 1)} MPa)² × ${OIL_LITRES} l ÷ ${formatNumber(OIL_BULK_MODULUS / 1e6, 0)} MPa`,
          value: joule(oil),
        },
        {
          what: 'Together',
          sum: `${joule(frame)} + ${joule(oil)}, or ${formatQuantity(total, 'ft-lbf', 0)}`,
          value: joule(total),
        },
        {
          what: 'Dropped one metre',
          sum: `${joule(total)} ÷ (${STANDARD_GRAVITY} m/s² × 1 m)`,
          value: formatQuantity(massDroppedOneMetre, 'kg', 0),
        },
      ],
      so: 'Read it before full load goes on, and look where it would go: nobody stands in line with pins, ram or tooling.',
    }
  },
  usedIn: [
    { where: 'Run: before full load' },
    { where: 'Record: energy at full load, of the movement that was measured', to: paths.proofTests.href() },
  ],
  sources: [
    'Work of a linear spring and of a compressed liquid: elementary mechanics.',
    'Bulk modulus of mineral oil of 1.7 GPa: common practice, from memory, no source.',
    'Standard gravity: 3rd CGPM (1901); NIST SP 811, B.8.',
  ],
  cautions: CAUTIONS,
}
