import { render, screen } from '@testing-library/react'
import { describe, expect, it } from 'vitest'
import { JointBalloon, Mark } from './marks'

describe('marks', () => {
  it.each([
    ['open', 'Joint 3, open'],
    ['tacked', 'Joint 3, tacked'],
    ['finished', 'Joint 3, finished, not examined'],
    ['accepted', 'Joint 3, accepted'],
    ['rejected', 'Joint 3, rejected'],
  ] as const)('say that a joint is %s', (state, name) => {
    render(<JointBalloon number={3} state={state} />)
    expect(screen.getByRole('img')).toHaveAccessibleName(name)
  })

  it('draw every state of a joint in another outline', () => {
    const outlines = (['open', 'tacked', 'finished', 'accepted', 'rejected'] as const).map((state) => {
      const { container, unmount } = render(<JointBalloon state={state} decorative />)
      const drawn = [...container.querySelectorAll('path')].map((part) => part.getAttribute('d')).join(' ')
      unmount()
      return drawn
    })
    expect(new Set(outlines).size).toBe(5)
  })

  it('are silent beside their own word', () => {
    render(<Mark name="within" />)
    expect(screen.queryByRole('img')).toBeNull()
  })

  it('have a name where they stand alone', () => {
    render(<Mark name="stop" label="Do not use" />)
    expect(screen.getByRole('img', { name: 'Do not use' })).toBeInTheDocument()
  })
})
