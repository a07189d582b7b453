import { readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { render, screen } from '@testing-library/react'
import { MemoryRouter } from 'react-router-dom'
import { expect, test } from 'vitest'
import { HowLink, HowLinks } from './how-link'

test('a figure’s link leads to its page and says whose figure it is', () => {
  render(<HowLink topic="clearance" of="the load" />, { wrapper: MemoryRouter })
  const link = screen.getByRole('link', { name: 'How it is worked out: the load' })
  expect(link).toHaveAttribute('href', '/help/clearance')
  expect(link).not.toHaveAttribute('target')
})

test('beside a form help opens in a tab of its own, so that nothing typed is lost', () => {
  render(
    <HowLinks
      beside
      topics={[
        ['hold', 'creep'],
        ['softening', 'softening'],
      ]}
    />,
  )
  const links = screen.getAllByRole('link')
  expect(links.map((link) => link.getAttribute('href'))).toEqual(['/help/hold', '/help/softening'])
  expect(links.map((link) => link.getAttribute('target'))).toEqual(['_blank', '_blank'])
  expect(links[0]).toHaveAccessibleName('creep, in a tab of its own')
})

test('nothing on the run or the witness’s view leads away to help while a press is loaded', () => {
  const sources = ['src/features/proof-test', 'src/components/run'].flatMap((folder) =>
    readdirSync(folder, { recursive: true, encoding: 'utf8' })
      .filter((file) => /\.tsx?$/.test(file))
      .map((file) => readFileSync(join(folder, file), 'utf8')),
  )
  expect(sources.length).toBeGreaterThan(50)
  expect(sources.filter((source) => /how-link|paths\.help/.test(source))).toEqual([])
})
