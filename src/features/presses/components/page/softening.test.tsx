import { QueryClientProvider } from '@tanstack/react-query'
import { render, screen, within } from '@testing-library/react'
import { MemoryRouter } from 'react-router-dom'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { ClimbHistory } from '#shared/api/press-history'
import { climbHistory } from '../../../../../tests/factories/climb-history'
import { testId } from '../../../../../tests/factories/ledger-builder'
import { ids } from '../../../../../tests/factories/test-press'
import { HereContext, type Here } from '../../../../lib/here'
import { createQueryClient } from '../../../../lib/query-client'
import { Softening } from './softening'

const climb = (number: string, on: string, change: Partial<ClimbHistory> = {}): ClimbHistory =>
  climbHistory(number, { proofTestId: testId(0x7, Number(number.slice(-4))), on: `${on}T10:00:00.000Z`, ...change })

function show(climbs: readonly ClimbHistory[]) {
  vi.stubGlobal('fetch', () => Promise.resolve(new Response(JSON.stringify({ climbs }))))
  const shop: Here['shop'] = {
    id: ids.shop,
    name: 'Hollin Bridge',
    role: 'crew',
    forceUnit: 'short-ton',
    pressureUnit: 'psi',
    lengthUnit: 'mm',
    buildPauseDays: 30,
    walkDownHours: 12,
  }
  const here: Here = { user: { id: ids.lead, name: 'Marit Sandoval', email: '' }, shops: [shop], shop, adopt: () => undefined }
  render(
    <MemoryRouter>
      <QueryClientProvider client={createQueryClient(() => undefined)}>
        <HereContext value={here}>
          <Softening pressId={ids.press} className="" />
        </HereContext>
      </QueryClientProvider>
    </MemoryRouter>,
  )
}

const drawn = () => document.querySelectorAll('.recharts-surface')

describe('stiffness, set and pressure loss over the tests', { timeout: 30_000 }, () => {
  afterEach(() => vi.unstubAllGlobals())

  it('draws three panels on one axis of dates, says the change in words, and lists every figure for those who can’t see them', async () => {
    show([
      climb('PT-0002', '2024-09-03'),
      climb('PT-0005', '2025-03-02', { result: 'rejected', stiffness: 55e6, set: 0.06e-3 }),
      climb('PT-0006', '2025-03-20', { repeats: 'PT-0005', stiffness: 57e6 }),
      climb('PT-0006', '2025-03-20', { climb: 1, stiffness: 57.5e6 }),
    ])
    expect(
      await screen.findByText(/^5\.0\s% softer at PT-0006 than at PT-0002; what the two tests can tell is ±1\.1\s%\.$/),
    ).toBeInTheDocument()
    await vi.waitFor(() => expect(drawn()).toHaveLength(3), { timeout: 15_000 })
    // A bar of uncertainty for each first climb of a test, in the panel of stiffness alone.
    expect(document.querySelectorAll('.recharts-errorBar')).toHaveLength(3)
    const rows = within(screen.getByRole('table')).getAllByRole('row').slice(1)
    expect(rows.map((row) => row.textContent)).toEqual([
      expect.stringMatching(/^PT-00023 Sep 2024, accepted/),
      expect.stringMatching(/^PT-00052 Mar 2025, rejected.*55\.0\s± 0\.5\skN\/mm/),
      expect.stringMatching(/^PT-000620 Mar 2025, accepted, repeats PT-0005/),
      expect.stringMatching(/^PT-0006, repeat climb/),
    ])
  })

  it('shows each position by itself, and draws nothing over one test alone', async () => {
    show([climb('PT-0007', '2025-03-02', { leg: 'Ram far left' }), climb('PT-0007', '2025-03-02', { leg: 'Ram far right' })])
    expect(await screen.findByText('One line only: the next test tells whether it is getting softer.')).toBeInTheDocument()
    expect(screen.getByRole('radio', { name: 'Ram far left' })).toBeChecked()
    expect(drawn()).toHaveLength(0)
  })
})
