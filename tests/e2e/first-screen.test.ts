import { gzipSync } from 'node:zlib'
import { expect, it } from 'vitest'
import { newPage } from '../support/browser'

const MOST_KILOBYTES = 170

it('somebody who is signed out fetches the code of the sign-in alone, and no more than the budget', async () => {
  const page = await newPage()
  const scripts: { name: string; bytes: Promise<number> }[] = []
  page.on('response', (response) => {
    const { pathname } = new URL(response.url())
    if (pathname.endsWith('.js')) scripts.push({ name: pathname, bytes: response.body().then((body) => gzipSync(body).length) })
  })
  await page.goto('/presses?status=cleared', { waitUntil: 'networkidle' })
  expect(new URL(page.url()).searchParams.get('next')).toBe('/presses?status=cleared')
  await page.getByRole('button', { name: 'Sign in' }).waitFor()
  expect(scripts.map(({ name }) => name).filter((name) => name.includes('presses'))).toEqual([])
  const sizes = await Promise.all(scripts.map(({ bytes }) => bytes))
  expect(sizes.length).toBeGreaterThan(3)
  expect(sizes.reduce((sum, bytes) => sum + bytes, 0) / 1000).toBeLessThanOrEqual(MOST_KILOBYTES)
})
