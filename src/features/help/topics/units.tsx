import { convert, formatForce, formatNumber, formatQuantity, toSI, unitLabel, type ForceUnit } from '#shared/units'
import { paths } from '../../../paths'
import { Board, Line, Say, scaleTo } from '../drawing-kit'
import { percent } from '../example-press'
import { Each, Q } from '../maths'
import type { Topic } from '../topic'

const MARKED = '12'
/** Full scale of a gauge in psi. */
const DIAL = 10_000
const TONS = ['short-ton', 'metric-ton-force', 'long-ton'] as const satisfies readonly ForceUnit[]
const MADE_OF: Record<(typeof TONS)[number], { count: string; of: string; newton: () => number }> = {
  'short-ton': { count: '2000', of: 'lbf', newton: () => toSI({ text: '2000', unit: 'lbf' }) },
  'metric-ton-force': { count: '1000', of: 'kgf', newton: () => toSI({ text: '1', unit: 'metric-ton-force' }) },
  'long-ton': { count: '2240', of: 'lbf', newton: () => toSI({ text: '2240', unit: 'lbf' }) },
}

/** The same figure on three jacks. */
function Drawing() {
  const along = scaleTo(0, 120e3, 0, 340)
  return (
    <Board
      label={`A jack marked ${MARKED} may carry ${TONS.map((ton) => `${formatForce(toSI({ text: MARKED, unit: ton }), 'kN')} in ${unitLabel(ton, { plural: true })}`).join(', ')}.`}
      height={330}
    >
      {TONS.map((ton, index) => {
        const y = 56 + index * 92
        const newton = toSI({ text: MARKED, unit: ton })
        return (
          <g key={ton}>
            <Say x={30} y={y} tone="scribe">
              {MARKED} {unitLabel(ton, { plural: true })}
            </Say>
            <Line
              points={[
                { x: 30, y: y + 12 },
                { x: 30 + along(newton), y: y + 12 },
                { x: 30 + along(newton), y: y + 44 },
                { x: 30, y: y + 44 },
              ]}
              closed
              fill="var(--thin-dye)"
            />
            <Say x={42} y={y + 35} tone="scribe" strong onShape>
              {formatForce(newton, 'kN')}
            </Say>
          </g>
        )
      })}
      <Line
        points={[
          { x: 30 + along(toSI({ text: MARKED, unit: 'short-ton' })), y: 40 },
          { x: 30 + along(toSI({ text: MARKED, unit: 'short-ton' })), y: 300 },
        ]}
        tone="chalk"
        dash="7 5"
      />
      <Say x={30 + along(toSI({ text: MARKED, unit: 'short-ton' })) - 8} y={316} anchor="end" tone="chalk">
        until it is known, the smallest
      </Say>
    </Board>
  )
}

export const unitsTopic: Topic = {
  slug: 'units',
  title: 'The three tons, and units',
  question: 'Which ton is it?',
  answer:
    'Three different forces are called a ton, and the largest is 12 % more than the smallest. The word never stands alone here: short ton, long ton or metric ton-force. Until it is known which one a jack is marked in, the smallest is taken.',
  formulas: [
    { gives: 'Short ton', say: 'one short ton is 2000 pounds-force', maths: <>1 short ton = 2 000 lbf</> },
    { gives: 'Long ton', say: 'one long ton is 2240 pounds-force', maths: <>1 long ton = 2 240 lbf</> },
    { gives: 'Metric ton-force', say: 'one metric ton-force is 1000 kilograms-force', maths: <>1 metric ton-force = 1 000 kgf</> },
    {
      gives: 'A pound-force and a kilogram-force in newtons',
      say: 'one pound-force is 0.45359237 kilograms times g n; one kilogram-force is 1 kilogram times g n; g n is 9.80665 metres per second squared',
      maths: (
        <>
          <Each>
            1 lbf = 0.45359237 kg · <Q sub="n">g</Q>
          </Each>
          <Each>
            1 kgf = 1 kg · <Q sub="n">g</Q>
          </Each>
        </>
      ),
    },
    {
      gives: 'A pound per square inch',
      say: 'one psi is one pound-force over the square of 0.0254 metres',
      maths: <>1 psi = 1 lbf / (0.0254 m)²</>,
    },
  ],
  symbols: [
    { sign: 'lbf', say: 'pound-force', meaning: 'weight of one pound at standard gravity', unit: 'N' },
    { sign: 'kgf', say: 'kilogram-force', meaning: 'weight of one kilogram at standard gravity', unit: 'N' },
    { sign: <Q sub="n">g</Q>, say: 'g n', meaning: 'standard gravity, 9.80665', unit: 'm/s²' },
    {
      sign: 'bar, MPa, psi',
      say: 'bar, megapascal, pounds per square inch',
      meaning: 'pressure: 1 MPa is 10 bar, and 1 newton on each mm²',
      unit: 'Pa',
    },
    { sign: 'J, ft·lbf', say: 'joule, foot pound-force', meaning: 'energy: one newton over one metre; one lbf over one foot', unit: 'J' },
  ],
  Drawing,
  drawing: {
    title: `Three jacks marked ${MARKED}`,
    note: 'A number is kept as it was typed, with its unit; everything is worked out in newtons, pascals and metres.',
  },
  example() {
    const newton = (ton: ForceUnit) => toSI({ text: MARKED, unit: ton })
    const ratio = newton('long-ton') / newton('short-ton') - 1
    const psi = convert(DIAL, 'psi', 'bar')
    return {
      given: [['Marked on the jack', MARKED]],
      steps: [
        ...TONS.map((ton) => ({
          what: `As ${unitLabel(ton, { plural: true })}`,
          sum: `${MARKED} × ${MADE_OF[ton].count} ${MADE_OF[ton].of}; one is ${formatNumber(MADE_OF[ton].newton(), 3)} N`,
          value: formatQuantity(newton(ton), 'kN', 2),
        })),
        {
          what: 'Long over short',
          sum: `${formatNumber(newton('long-ton'), 0)} ÷ ${formatNumber(newton('short-ton'), 0)} − 1`,
          value: percent(ratio),
        },
        {
          what: `A gauge of ${formatNumber(DIAL, 0)} psi in bar`,
          sum: `${formatNumber(DIAL, 0)} × ${formatNumber(toSI({ text: '1', unit: 'psi' }), 3)} Pa ÷ ${formatNumber(toSI({ text: '1', unit: 'bar' }), 0)} Pa`,
          value: `${formatNumber(psi, 2)}\u00a0bar`,
        },
      ],
      so: 'Read what stands on the jack in full, or ask its maker. Where bore and rated pressure are known, the press form says when the ton doesn’t fit them, and never proposes a larger one than marked.',
    }
  },
  usedIn: [
    { where: 'Every field of force: a ton is asked for by name' },
    { where: 'Press form: rated load and the cross-check of each ram', to: paths.newPress.href() },
    { where: 'Shop settings: the units that are read', to: paths.settings.href() },
  ],
  sources: [
    'Exact by definition: 1 in = 0.0254 m, 1 lb = 0.45359237 kg, g = 9.80665 m/s² (3rd CGPM, 1901); as in NIST SP 811 (2008), appendix B.8.',
  ],
  cautions: [],
}
