import { render, screen, within } from '@testing-library/react'
import { MemoryRouter } from 'react-router-dom'
import { describe, expect, test } from 'vitest'
import { HELP_TOPICS, type HelpTopic } from '../../lib/help-topics'
import { TopicPage } from './components/topic-page'
import { TOPICS } from './topics'

/**
 * The worked examples as they stand on the page, against the same sums done here with a pocket calculator's
 * arithmetic: nothing of the program is used but the page itself.
 */
function open(slug: HelpTopic): (what: string) => string {
  const topic = TOPICS.find((one) => one.slug === slug)
  if (topic === undefined) throw new Error(`There is no page ${slug}.`)
  render(
    <MemoryRouter>
      <TopicPage topic={topic} before={undefined} after={undefined} />
    </MemoryRouter>,
  )
  return (what) => {
    const line = screen.getByRole('listitem', { name: (name) => plain(name) === plain(what) })
    return plain(within(line).getByText((_, element) => element?.tagName === 'STRONG').textContent)
  }
}

/** Without the narrow spaces between thousands, and with plain spaces and minus signs. */
const plain = (text: string): string => text.replaceAll('\u202f', '').replaceAll('\u00a0', ' ').replaceAll('\u2212', '-')

const AREA = (Math.PI * 50 ** 2) / 4
const WEIGHT = 20 * 9.80665
/** Force in N at a reading in bar: a tenth of a newton on each mm² for each bar, springs off, weight on. */
const forceAt = (bar: number): number => (bar / 10) * AREA - 200 + WEIGHT
/** Net deflection in mm, read from the page's rows: the middle less the mean of the pins. */
const NET = [0, 0.34 - (0.062 + 0.058) / 2, 0.62 - (0.121 + 0.119) / 2, 0.91 - (0.183 + 0.181) / 2, 1.2 - (0.243 + 0.241) / 2]
const FORCE = [0, 125, 250, 380, 505].map(forceAt)
const at = (list: readonly number[], index: number): number => list[index] ?? Number.NaN
const stiffness = (step: number): number => (at(FORCE, step) - at(FORCE, step - 1)) / (at(NET, step) - at(NET, step - 1))
/** Standard uncertainties in N: the gauge's 7 bar, half of its 5 bar step. */
const U_GAUGE = (0.7 * AREA) / Math.sqrt(3)
const U_STEP = (0.25 * AREA) / Math.sqrt(3)
const uForce = (bar: number): number =>
  Math.sqrt(U_GAUGE ** 2 + U_STEP ** 2 + ((bar / 10) * AREA * (0.1 / 50)) ** 2 / 3 + 60 ** 2 / 3 + 9.80665 ** 2 / 3)
/** One reading of an indicator in mm, squared: its limit of 0.003 and half of its step of 0.001. */
const U_INDICATOR_2 = (0.003 ** 2 + 0.0005 ** 2) / 3
const U_NET = Math.sqrt(1.5 * U_INDICATOR_2)
const U_SET = 2 * Math.sqrt(2) * U_NET

describe('the worked example comes out as by hand', () => {
  test('for ram force and target pressure', () => {
    const shown = open('ram-force')
    expect(shown('Area of the piston')).toBe(`${AREA.toFixed(1)} mm²`)
    expect(shown('Weight that comes down')).toBe('196.1 N')
    expect(shown('Target pressure, exact')).toBe(`${(((75_000 + 200 - WEIGHT) / AREA) * 10).toFixed(1)} bar`)
    expect(shown('Pump to')).toBe('380 bar')
    expect(shown('Force at that reading')).toBe(`${(forceAt(380) / 1000).toFixed(2)} kN`)
    expect(shown('Delivered at least')).toBe(`${((forceAt(380) / 1000) * 0.95).toFixed(2)} kN`)
    // 25 kN ask for 127.3 bar; by 50 bar that is 100, and 19.6 kN are less than 25 − 2 %.
    expect(shown('With a gauge that reads by 50 bar, at 25 %')).toBe('100 bar')
    expect(screen.getByText(/less than the 24\.5/)).toBeInTheDocument()
  })

  test('for gauge classes and scale', () => {
    const shown = open('gauge')
    expect(shown('Class 1, at any reading')).toBe('± 7.0 bar')
    expect(shown('Grade A at 125 bar')).toBe('± 14.0 bar')
    expect(shown('Grade A at 505 bar')).toBe('± 7.0 bar')
    expect(shown('Does the scale suit full load')).toBe('72%')
    // Half of 7 % of 100 kN is 3.5 kN, and U is under 2 kN.
    expect(2 * uForce(505)).toBeLessThan(3500)
    expect(shown('Can it tell that full load is reached')).toBe('it can')
  })

  test('for the uncertainty of a force', () => {
    const shown = open('uncertainty')
    expect(shown('Gauge')).toBe(`${U_GAUGE.toFixed(0)} N`)
    expect(shown('Half a step')).toBe(`${U_STEP.toFixed(0)} N`)
    expect(shown('Bore')).toBe(`${((50.5 * AREA * 0.002) / Math.sqrt(3)).toFixed(0)} N`)
    expect(shown('Springs')).toBe(`${(60 / Math.sqrt(3)).toFixed(0)} N`)
    expect(shown('Weight')).toBe(`${(9.80665 / Math.sqrt(3)).toFixed(0)} N`)
    expect(shown('Together')).toBe(`${uForce(505).toFixed(0)} N`)
    expect(shown('As shown')).toBe(`${(forceAt(505) / 1000).toFixed(1)} kN ± ${((2 * uForce(505)) / 1000).toFixed(1)}`)
  })

  test('for deflection and net', () => {
    const shown = open('deflection')
    expect(shown('Middle')).toBe('1.200 mm')
    expect(shown('Left pin')).toBe('0.243 mm')
    expect(shown('Right pin')).toBe('0.241 mm')
    expect(shown('Left less right')).toBe('0.002 mm')
    expect(shown('Net')).toBe('0.958 mm')
    expect(shown('U of one point')).toBe(`± ${(2 * Math.sqrt(2 * U_INDICATOR_2)).toFixed(4)} mm`)
    expect(shown('U of the net')).toBe(`± ${U_SET.toFixed(4)} mm`)
  })

  test('for the line and its prediction', () => {
    const shown = open('line')
    const [forces, nets] = [FORCE.slice(0, 4), NET.slice(0, 4)]
    // The sums of the two normal equations, not the centred form that the program uses.
    const sum = (list: readonly number[]): number => list.reduce((total, value) => total + value, 0)
    const products = sum(forces.map((force, index) => force * at(nets, index)))
    const squares = sum(forces.map((force) => force ** 2))
    const slope = (4 * products - sum(forces) * sum(nets)) / (4 * squares - sum(forces) ** 2)
    const slack = (sum(nets) - slope * sum(forces)) / 4
    const expected = slack + slope * at(FORCE, 4)
    const mean = sum(forces) / 4
    const spread = squares - 4 * mean ** 2
    const uReading2 = U_NET ** 2 + (slope * U_STEP) ** 2
    const weights2 = sum(forces.map((force) => (0.25 + ((at(FORCE, 4) - mean) * (force - mean)) / spread) ** 2))
    const half = Math.sqrt(4 * (weights2 + 1) * uReading2 + (0.05 * expected) ** 2)
    const left = sum(forces.map((force, index) => (at(nets, index) - slack - slope * force) ** 2))
    const total = sum(nets.map((net) => (net - sum(nets) / 4) ** 2))
    expect(shown('Slope')).toBe(`${(slope * 1e6).toFixed(2)} µm/kN`)
    expect(shown('Stiffness')).toBe(`${(1 / slope / 1000).toFixed(1)} kN/mm`)
    expect(shown('Slack')).toBe(`${slack.toFixed(3)} mm`)
    expect(shown('How straight')).toBe((1 - left / total).toFixed(4))
    expect(shown('Expected at full load')).toBe(`${expected.toFixed(3)} mm`)
    expect(shown('Give or take')).toBe(`± ${half.toFixed(3)} mm`)
    expect(shown('Was read')).toBe('0.958 mm')
    expect(Math.abs(0.958 - expected)).toBeLessThan(half)
    expect(screen.getByText(/Inside the band/)).toBeInTheDocument()
  })

  test('for softening, with the shared reading counted once', () => {
    const shown = open('softening')
    expect(shown('Step from datum to 25 %')).toBe(`${(stiffness(1) / 1000).toFixed(1)} kN/mm`)
    expect(shown('Step from 25 % to 50 %')).toBe(`${(stiffness(2) / 1000).toFixed(1)} kN/mm`)
    expect(shown('Step from 50 % to 75 %')).toBe(`${(stiffness(3) / 1000).toFixed(1)} kN/mm`)
    expect(shown('Step from 75 % to 100 %')).toBe(`${(stiffness(4) / 1000).toFixed(1)} kN/mm`)
    expect(Math.max(stiffness(1), stiffness(2))).toBeLessThan(stiffness(3))
    expect(shown('Softening of the last step')).toBe(`${((1 - stiffness(4) / stiffness(3)) * 100).toFixed(1)}%`)
    // Each reading moved by its own u, the change of the softening squared and added: no derivative is written down.
    const softening = (forces: readonly number[], nets: readonly number[]): number => {
      const step = (index: number) => (at(forces, index) - at(forces, index - 1)) / (at(nets, index) - at(nets, index - 1))
      return 1 - step(4) / step(3)
    }
    const moved = (list: readonly number[], index: number, by: number) => list.map((value, place) => (place === index ? value + by : value))
    const change = (index: number, force: number, net: number): number =>
      (softening(moved(FORCE, index, force), moved(NET, index, net)) - softening(moved(FORCE, index, -force), moved(NET, index, -net))) / 2
    const small = 1e-3
    const variance = [2, 3, 4].reduce(
      (total, index) => total + (change(index, U_STEP * small, 0) / small) ** 2 + (change(index, 0, U_NET * small) / small) ** 2,
      0,
    )
    expect(shown('Its uncertainty')).toBe(`± ${(2 * Math.sqrt(variance) * 100).toFixed(1)}%`)
  })

  test('for pressure loss and creep', () => {
    const shown = open('hold')
    expect(shown('Pressure lost')).toBe(`${((5 / 505) * 100).toFixed(2)}%`)
    expect(shown('Its uncertainty')).toBe(`± ${(((2 * Math.SQRT2 * 5) / Math.sqrt(12) / 505) * 100).toFixed(2)}%`)
    expect(shown('Had it been topped up at 490 bar')).toBe(`${((20 / 505) * 100).toFixed(2)}%`)
    const back = (0.5 * AREA) / stiffness(4)
    const netEnd = 1.193 - (0.242 + 0.24) / 2
    expect(shown('Sprung back as the force fell')).toBe(`${back.toFixed(4)} mm`)
    expect(shown('Creep')).toBe(`${(netEnd - 0.958 + back).toFixed(4)} mm`)
    const u = Math.sqrt(U_NET ** 2 + (U_STEP / stiffness(4)) ** 2)
    expect(shown('Uncertainty of the creep')).toBe(`± ${(2 * Math.SQRT2 * u).toFixed(4)} mm`)
    expect(shown('The most it may be')).toBe(`${(0.02 * 0.958).toFixed(4)} mm`)
  })

  test('for the permanent set and the repeat climb', () => {
    const shown = open('permanent-set')
    expect(shown('Set')).toBe(`${(0.023 - (0.004 + 0.002) / 2).toFixed(3)} mm`)
    expect(shown('The most that may stay')).toBe(`${(0.05 * 0.958).toFixed(4)} mm`)
    expect(0.02).toBeGreaterThan(U_SET)
    expect(shown('Can it be seen')).toBe('seen: repeat the climb')
    expect(0.002 - 0.001 / 2).toBeLessThan(U_SET)
    expect(shown('Second set')).toBe('vanishes: bedding-in')
    expect(shown('With an indicator that reads by 0.05 mm')).toBe('too coarse')
    expect(shown('What ASME ASP-2010 allows at most')).toBe('3.175 mm')
  })

  test('for the decision rule', () => {
    const shown = open('decision-rule')
    const limit = 0.05 * 0.958
    expect(shown('The set as read')).toBe('within')
    expect(shown('Half of U under the limit')).toBe('within')
    expect(shown('Half of U over the limit')).toBe('undecided')
    expect(shown('One and a half U over the limit')).toBe('beyond')
    const under = screen.getByRole('listitem', { name: 'Half of U under the limit' })
    expect(plain(under.textContent)).toContain(`${(limit - U_SET / 2).toFixed(4)} mm: from ${(limit - 1.5 * U_SET).toFixed(4)} mm`)
    expect(under).toHaveTextContent('by a guard band undecided')
  })

  test('for the load path check', () => {
    const shown = open('load-path')
    const modulus = (2 * 50 * 100 ** 2) / 6
    const inertia = (2 * 50 * 100 ** 3) / 12
    const moment = (100_000 * 900) / 4
    expect(shown('Section modulus')).toBe(`${(modulus / 1000).toFixed(1)} cm³`)
    expect(shown('Moment')).toBe('22.50 kN·m')
    expect(shown('Stress')).toBe(`${(moment / modulus).toFixed(1)} MPa`)
    // S355JR from 40 to 63 mm thick: 335 MPa (EN 10025-2, table 7).
    expect(shown('Used in bending')).toBe(`${((moment / modulus / (0.5 * 335)) * 100).toFixed(0)}%`)
    expect(shown('Used in shear')).toBe(`${((50_000 / ((2 / 3) * 2 * 50 * 100) / (0.4 * 335)) * 100).toFixed(0)}%`)
    const bent = (100_000 * 900 ** 3) / (48 * 210_000 * inertia)
    const sheared = (100_000 * 900) / (4 * (210_000 / 2.6) * (5 / 6) * 2 * 50 * 100)
    expect(shown('Expected to bend')).toBe(`${(bent + sheared).toFixed(3)} mm`)
    expect(screen.getByText(/The band is/)).toHaveTextContent(`${((bent + sheared) * 0.75).toFixed(2)} mm`)
  })

  test('for stored energy', () => {
    const shown = open('stored-energy')
    const frame = (forceAt(505) * 0.0031) / 2
    const oil = (50.5e6 ** 2 * 0.35e-3) / (2 * 1.7e9)
    expect(shown('In the frame')).toBe(`${frame.toFixed(0)} J`)
    expect(shown('In the oil')).toBe(`${oil.toFixed(0)} J`)
    expect(shown('Together')).toBe(`${(frame + oil).toFixed(0)} J`)
    expect(shown('Dropped one metre')).toBe(`${((frame + oil) / 9.80665).toFixed(0)} kg`)
  })

  test('for the clearance load', () => {
    const shown = open('clearance')
    const [force, U] = [forceAt(500), 2 * uForce(500)]
    const cleared = Math.floor((force - U) / 100) / 10
    expect(shown('Lowest force')).toBe(`${(force / 1000).toFixed(2)} kN`)
    expect(shown('Its uncertainty')).toBe(`± ${(U / 1000).toFixed(2)} kN`)
    expect(shown('Cleared up to')).toBe(`${cleared.toFixed(1)} kN`)
    expect(shown('Gauge not past')).toBe(`${Math.floor((((cleared * 1000 + 200 - WEIGHT) / AREA) * 10) / 5) * 5} bar`)
    expect(shown('With a margin of 1.25')).toBe(`${(Math.floor((force - U) / 1.25 / 100) / 10).toFixed(1)} kN`)
  })

  test('for the three tons', () => {
    const shown = open('units')
    const POUND = 0.45359237 * 9.80665
    expect(shown('As short tons')).toBe(`${(12 * 2 * POUND).toFixed(2)} kN`)
    expect(shown('As long tons')).toBe(`${(12 * 2.24 * POUND).toFixed(2)} kN`)
    expect(shown('As metric tons-force')).toBe(`${(12 * 9.80665).toFixed(2)} kN`)
    expect(shown('Long over short')).toBe('12.0%')
    expect(shown('A gauge of 10000 psi in bar')).toBe(`${((10_000 * POUND) / 0.0254 ** 2 / 1e5).toFixed(2)} bar`)
  })
})

describe.each(TOPICS)('the page “$title”', (topic) => {
  test('names where its formula comes from, by standard and section or as common practice', () => {
    expect(topic.sources.length).toBeGreaterThan(0)
    for (const source of topic.sources) {
      expect(source).toMatch(/common practice|JCGM|ILAC|NIST|EN \d|ASME|UFC|CFR|theory|mechanics|Hooke|Lincoln|CGPM|makers/)
    }
  })

  test('reads out every formula and sign in words, and says in its drawing what is drawn', () => {
    open(topic.slug)
    expect(screen.getAllByRole('math').map((formula) => formula.getAttribute('aria-label'))).toEqual(topic.formulas.map(({ say }) => say))
    expect(screen.getByRole('img').getAttribute('aria-label')?.length).toBeGreaterThan(40)
    for (const { say } of topic.symbols) expect(screen.getByRole('rowheader', { name: say })).toBeInTheDocument()
    expect(document.body).not.toHaveTextContent(/\bNaN|undefined|Infinity|∞/)
    expect(document.body).not.toHaveTextContent(/\bsafe\b|\bapproved\b/i)
  })
})

test('every page has an address, and cautions stand where a force is decided', () => {
  expect(TOPICS.map(({ slug }) => slug)).toEqual([...HELP_TOPICS])
  const withCautions = TOPICS.filter(({ cautions }) => cautions.length > 0).map(({ slug }) => slug)
  expect(withCautions).toEqual(['ram-force', 'load-path', 'stored-energy', 'clearance'])
})
