import { render, screen } from '@testing-library/react'
import { describe, expect, it } from 'vitest'
import { Dial } from './dial'

const gauge = {
  code: 'G-02',
  fullScale: 15_000,
  unit: 'psi',
  minor: 100,
  target: { text: '5 900', value: 5900 },
  window: { from: 5796, to: 6210 },
  limitFrom: { value: 10_000, label: "ram's limit" },
}

/** Degrees that the needle is turned from upright. */
function needle(container: HTMLElement): number {
  const turned = container.querySelector<SVGGElement>('[style*="rotate"]')
  return Number(/rotate\((-?[\d.]+)deg\)/.exec(turned?.getAttribute('style') ?? '')?.[1])
}

describe('the dial', () => {
  it('says what to pump to, what was typed, and whose limit comes first', () => {
    render(<Dial {...gauge} value={5900} />)
    expect(screen.getByRole('img')).toHaveAccessibleName(
      "Gauge G-02, 5900 psi typed, pump to 5 900 psi, between 5796 and 6210 psi, ram's limit at 10000 psi",
    )
  })

  it('turns its needle in proportion to the full scale', () => {
    const { container, rerender } = render(<Dial {...gauge} value={7500} />)
    expect(needle(container)).toBeCloseTo(0)
    rerender(<Dial {...gauge} value={15_000} />)
    expect(needle(container)).toBeCloseTo(135)
    rerender(<Dial {...gauge} value={null} />)
    expect(needle(container)).toBeCloseTo(-135)
  })

  it('says how much one tick is', () => {
    const { container } = render(<Dial {...gauge} value={null} />)
    expect(container.textContent).toContain('one tick100 psi')
  })
})
