import { CAUTIONS } from '#shared/cautions'
import { beamStiffness, checkBeam, deflectionOf, simplySupported } from '#shared/structure/beams'
import { DEFLECTION_SPREAD } from '#shared/structure/expected-deflection'
import { DEFAULT_FACTORS, type CheckedFinding } from '#shared/structure/factors'
import { strengthOf } from '#shared/structure/materials'
import type { BeamStrength } from '#shared/structure/member-data'
import { sectionProperties } from '#shared/structure/sections'
import { formatNumber, toSI } from '#shared/units'
import { paths } from '../../../paths'
import { Arrow, Board, Letter, Line, Say } from '../drawing-kit'
import { asTyped, deflectionsOf, FULL, kN, mm, percent, RATED } from '../example-press'
import { Each, Over, Q, Up } from '../maths'
import type { Topic } from '../topic'

/** The bed of the example: two flats on edge, side by side. */
const HEIGHT = { text: '100', unit: 'mm' } as const
const WIDTH = { text: '50', unit: 'mm' } as const
const SPAN = { text: '900', unit: 'mm' } as const
const PIECES = 2
const BED: BeamStrength = {
  role: 'beam',
  section: { shape: 'flat', height: HEIGHT, width: WIDTH, sideBySide: PIECES, plates: [] },
  material: { grade: 'S355JR' },
  support: 'both ends',
  span: SPAN,
  ramOffset: null,
  hole: null,
  loadShare: null,
}

function finding(check: 'bending' | 'shear'): CheckedFinding & { utilisation: number } {
  const found = checkBeam(BED, toSI(RATED), DEFAULT_FACTORS).find((one): one is CheckedFinding => one.check === check && 'demand' in one)
  if (found === undefined) throw new RangeError(`The example’s bed has no figure for ${check}.`)
  return { ...found, utilisation: found.demand / found.capacity }
}

/** The way of the force round the frame, and the moment it makes in the bed. */
function Drawing() {
  const loop = [
    { x: 216, y: 118 },
    { x: 216, y: 86 },
    { x: 116, y: 86 },
    { x: 116, y: 252 },
    { x: 216, y: 252 },
    { x: 216, y: 226 },
  ]
  const mirrored = loop.map(({ x, y }) => ({ x: 432 - x, y }))
  return (
    <Board
      label="The force runs from the ram through the head beam, down both uprights and through the pins into the bed: a closed loop. Below, the bending moment of the bed, largest in the middle."
      height={430}
    >
      <Line
        points={[
          { x: 96, y: 66 },
          { x: 336, y: 66 },
          { x: 336, y: 104 },
          { x: 96, y: 104 },
        ]}
        closed
      />
      <Line
        points={[
          { x: 104, y: 104 },
          { x: 104, y: 282 },
          { x: 128, y: 282 },
          { x: 128, y: 104 },
        ]}
      />
      <Line
        points={[
          { x: 304, y: 104 },
          { x: 304, y: 282 },
          { x: 328, y: 282 },
          { x: 328, y: 104 },
        ]}
      />
      <Line
        points={[
          { x: 92, y: 234 },
          { x: 340, y: 234 },
          { x: 340, y: 270 },
          { x: 92, y: 270 },
        ]}
        closed
      />
      <Line
        points={[
          { x: 198, y: 104 },
          { x: 198, y: 158 },
          { x: 234, y: 158 },
          { x: 234, y: 104 },
        ]}
      />
      <Line
        points={[
          { x: 206, y: 158 },
          { x: 206, y: 234 },
          { x: 226, y: 234 },
          { x: 226, y: 158 },
        ]}
      />
      {[116, 316].map((x) => (
        <circle key={x} cx={x} cy={252} r={7} fill="var(--dye)" stroke="var(--scribe)" strokeWidth={1.6} />
      ))}
      <Line points={loop} tone="chalk" width={2} dash="7 5" />
      <Line points={mirrored} tone="chalk" width={2} dash="7 5" />
      <Arrow from={{ x: 116, y: 150 }} to={{ x: 116, y: 196 }} tone="chalk" width={2} />
      <Arrow from={{ x: 316, y: 150 }} to={{ x: 316, y: 196 }} tone="chalk" width={2} />
      <Say x={86} y={184} anchor="end" tone="chalk">
        <Letter>P</Letter>/2
      </Say>
      <Say x={346} y={184} tone="chalk">
        <Letter>P</Letter>/2
      </Say>
      <Say x={216} y={48} anchor="middle">
        head beam
      </Say>
      <Say x={352} y={260}>
        bed
      </Say>
      <Line
        points={[
          { x: 116, y: 330 },
          { x: 216, y: 400 },
          { x: 316, y: 330 },
        ]}
        closed
        fill="var(--thin-dye)"
      />
      <Say x={216} y={362} anchor="middle" tone="scribe" onShape>
        <Letter>M</Letter>
      </Say>
      <Say x={228} y={416}>
        <Letter>P</Letter>·<Letter>L</Letter>/4
      </Say>
      <Line
        points={[
          { x: 116, y: 304 },
          { x: 316, y: 304 },
        ]}
        tone="faint-scribe"
        width={1.2}
      />
      <Say x={328} y={310}>
        <Letter>L</Letter>
      </Say>
    </Board>
  )
}

export const loadPathTopic: Topic = {
  slug: 'load-path',
  title: 'Load path check, an estimate',
  question: 'Which member comes nearest to its limit, and how far should the frame open?',
  answer:
    'First, is the way of the force closed: from the ram’s face round the frame to the bed’s face, with no gap and nothing merely tacked. Then each member and joint on one basis: what it must carry against what the stated factor lets it carry. It is an estimate of what was entered, and prints NOT CHECKED for all the rest.',
  formulas: [
    {
      gives: 'Beam on two supports, ram in the middle',
      say: 'M equals P times L over 4; sigma equals M over S',
      maths: (
        <>
          <Each>
            <Q>M</Q> ={' '}
            <Over
              top={
                <>
                  <Q>P</Q> · <Q>L</Q>
                </>
              }
              under="4"
            />
          </Each>
          <Each>
            <Q>σ</Q> = <Over top={<Q>M</Q>} under={<Q>S</Q>} />
          </Each>
        </>
      ),
    },
    {
      gives: 'Its deflection, bending and shear',
      say: 'delta equals P times L cubed over 48 E I, plus P times L over 4 G A s',
      maths: (
        <>
          <Q>δ</Q> ={' '}
          <Over
            top={
              <>
                <Q>P</Q> · <Q>L</Q>
                <Up>3</Up>
              </>
            }
            under={
              <>
                48 · <Q>E</Q> · <Q>I</Q>
              </>
            }
          />{' '}
          +{' '}
          <Over
            top={
              <>
                <Q>P</Q> · <Q>L</Q>
              </>
            }
            under={
              <>
                4 · <Q>G</Q> · <Q sub="s">A</Q>
              </>
            }
          />
        </>
      ),
    },
    {
      gives: 'Tie or upright',
      say: 'sigma equals P over A net; elongation equals P times L over E A',
      maths: (
        <>
          <Each>
            <Q>σ</Q> = <Over top={<Q>P</Q>} under={<Q sub="net">A</Q>} />
          </Each>
          <Each>
            <Q>δ</Q> ={' '}
            <Over
              top={
                <>
                  <Q>P</Q> · <Q>L</Q>
                </>
              }
              under={
                <>
                  <Q>E</Q> · <Q>A</Q>
                </>
              }
            />
          </Each>
        </>
      ),
    },
    {
      gives: 'Pin, n planes',
      say: 'tau equals P over n times pi d squared over 4',
      maths: (
        <>
          <Q>τ</Q> ={' '}
          <Over
            top={<Q>P</Q>}
            under={
              <>
                <Q>n</Q> · π · <Q>d</Q>
                <Up>2</Up> / 4
              </>
            }
          />
        </>
      ),
    },
    {
      gives: 'Fillet weld on its throat',
      say: 'the force it may carry equals 0.30 times F E X X, times a, times l',
      maths: (
        <>
          <Q sub="may">P</Q> = {DEFAULT_FACTORS.weldOfElectrode} · <Q sub="EXX">F</Q> · <Q>a</Q> · <Q>l</Q>
        </>
      ),
    },
    {
      gives: 'Utilisation, the same for all',
      say: 'utilisation equals what it must carry over the factor times the strength of what is there',
      maths: (
        <>
          utilisation = <Over top="must carry" under={<>factor · strength</>} />
        </>
      ),
    },
  ],
  symbols: [
    { sign: <Q>P</Q>, say: 'P', meaning: 'the part of the press’s force that goes through it', unit: 'N, kN' },
    { sign: <Q>L</Q>, say: 'L', meaning: 'span between supports, or length that is stretched', unit: 'mm' },
    { sign: <Q>M</Q>, say: 'M', meaning: 'bending moment', unit: 'kN·m' },
    {
      sign: (
        <>
          <Q>S</Q>, <Q>I</Q>
        </>
      ),
      say: 'S and I',
      meaning: 'section modulus and second moment of area, from the dimensions entered',
      unit: 'cm³, cm⁴',
    },
    {
      sign: (
        <>
          <Q>A</Q>, <Q sub="s">A</Q>
        </>
      ),
      say: 'A and A s',
      meaning: 'area of the section, and the part of it that carries shear strain',
      unit: 'mm²',
    },
    {
      sign: (
        <>
          <Q>E</Q>, <Q>G</Q>
        </>
      ),
      say: 'E and G',
      meaning: 'moduli of the steel',
      unit: 'GPa',
    },
    {
      sign: (
        <>
          <Q>a</Q>, <Q>l</Q>
        </>
      ),
      say: 'a and l',
      meaning: 'throat and length of the weld',
      unit: 'mm',
    },
    { sign: <Q sub="EXX">F</Q>, say: 'F E X X', meaning: 'tensile strength of the filler', unit: 'MPa' },
  ],
  Drawing,
  drawing: {
    title: 'The way of the force, and the bed’s moment',
    note: 'Buckling, a web crushed under the ram, fatigue, cold and shock are in none of it.',
  },
  example() {
    const force = toSI(RATED)
    const span = toSI(SPAN)
    const section = sectionProperties(BED.section)
    const steel = strengthOf(BED.material, section.thickness)
    const { moment } = simplySupported({ force, span, at: span / 2 })
    const bending = finding('bending')
    const shear = finding('shear')
    const { bending: bent, shear: sheared } = deflectionOf({ force, span, at: span / 2 }, beamStiffness(BED), span / 2)
    const expected = bent + sheared
    const MPa = (pascal: number) => `${formatNumber(pascal / 1e6, 1)} MPa`
    const newtonMetres = (value: number) => `${formatNumber(value / 1000, 2)} kN·m`
    return {
      given: [
        ['Bed', `${PIECES} flats ${HEIGHT.text} × ${asTyped(WIDTH)}, on edge`],
        ['Between its pins', asTyped(SPAN)],
        ['Steel', `${steel.name}, yield ${formatNumber(steel.yield / 1e6, 0)} MPa at that thickness`],
        ['Rated load', asTyped(RATED)],
      ],
      steps: [
        {
          what: 'Section modulus',
          sum: `${PIECES} × ${WIDTH.text} × ${HEIGHT.text}² ÷ 6`,
          value: `${formatNumber(section.sectionModulus * 1e6, 1)} cm³`,
        },
        { what: 'Moment', sum: `${asTyped(RATED)} × ${formatNumber(span, 1)} m ÷ 4`, value: newtonMetres(moment) },
        {
          what: 'Stress',
          sum: `${newtonMetres(moment)} ÷ ${formatNumber(section.sectionModulus * 1e6, 1)} cm³`,
          value: MPa(moment / section.sectionModulus),
        },
        {
          what: 'Used in bending',
          sum: `${newtonMetres(bending.demand)} of ${newtonMetres(bending.capacity)}, which is ${DEFAULT_FACTORS.ofYield} of yield`,
          value: percent(bending.utilisation, 0),
        },
        {
          what: 'Used in shear',
          sum: `${kN(shear.demand, 1)} of ${kN(shear.capacity, 1)}, which is ${DEFAULT_FACTORS.shearOfYield} of yield`,
          value: percent(shear.utilisation, 0),
        },
        {
          what: 'Expected to bend',
          sum: `${mm(bent)} by its moment, ${mm(sheared)} by shear`,
          value: mm(expected),
          note: `The band is ${percent(DEFLECTION_SPREAD, 0)} either way: ${mm(expected * (1 - DEFLECTION_SPREAD), 2)} to ${mm(expected * (1 + DEFLECTION_SPREAD), 2)}.`,
        },
        { what: 'Was read at full load', sum: 'net of the bed, slack included', value: mm(deflectionsOf(FULL).net) },
      ],
      so: 'Past 100 % no load goes on until the member is made stronger, the rated load is lowered, or a named engineer’s document for it is attached. Under 100 % it is still an estimate of what was entered.',
    }
  },
  usedIn: [
    { where: 'Press form: sections, pins, welds and bolts', to: paths.newPress.href() },
    { where: 'Plan: whether a load must wait, and the band of the first stage', to: paths.planProofTest.href() },
    { where: 'Run and record: the expected band, hatched' },
  ],
  sources: [
    'Beams: elementary beam theory, as in Roark’s Formulas, table 8.1, from memory; shear by Timoshenko.',
    'Ties: Hooke’s law. Pins: t₁/2 + g + t₂/4, the usual lug analysis (Melconian and Hoblit, 1953, from memory).',
    'Yields: EN 10025-2, table 7 and the ASTM standards named in each result.',
    'Welds: 0.30 of the filler’s tensile strength on the throat, Blodgett, Lincoln D412 (1991). Bearing: AISC 360, J7.',
    'Factors of 0.5 and 0.4 of yield, and the band of a quarter: common practice, no source.',
  ],
  cautions: ['An estimate, not a design approval.', ...CAUTIONS],
}
