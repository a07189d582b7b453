import { render, screen } from '@testing-library/react'
import { describe, expect, it } from 'vitest'
import { CHANGE_RULES } from '#shared/press/changes'
import { CHANGE_KINDS, type PressChange } from '#shared/press/entries'
import { ACCEPTED, CLEARED, pressAfter } from '../../../../../tests/factories/press-states'
import { ids } from '../../../../../tests/factories/test-press'
import { ChangeEffect } from './change-effect'

const cleared = pressAfter(...ACCEPTED, CLEARED)
const jointId = (number: number): string => cleared.joints.find((joint) => joint.number === number)?.id ?? ''

function told(change: PressChange['change'], jointIds: readonly string[] = [], state = cleared): string {
  const { unmount } = render(<ChangeEffect state={state} change={change} jointIds={jointIds} />)
  const text = screen.getByRole('status').textContent
  unmount()
  return text
}

describe('what a change does is said before it is entered', () => {
  it('quotes the numbered rule of each kind, and names what falls back and what becomes of the clearance', () => {
    for (const change of CHANGE_KINDS) {
      const rule = CHANGE_RULES.find((one) => one.change === change)
      expect(told(change)).toContain(`Rule ${rule?.id}: ${rule?.text}`)
    }
    expect(told('overload')).toContain('Every joint, 1 to 8, falls back to unexamined.The clearance ends with it.')
    expect(told('long stop')).toContain('Every joint, 1 to 8, falls back to unexamined.The clearance waits')
    expect(told('painted')).toContain('No joint falls back.The clearance stands as it is.')
  })

  it('a repair, a modification or a knock reaches the joints named and their neighbours, or all when none is named', () => {
    for (const change of ['repair', 'modification', 'knock'] as const) {
      expect(told(change, [jointId(7)])).toContain('Joints 5, 7 and 8 fall back to unexamined.The clearance ends')
      expect(told(change)).toContain('Every joint')
    }
  })

  it('a move reaches what can work loose, and the clearance waits', () => {
    const loose = cleared.joints.filter((joint) => joint.kind !== 'weld').map((joint) => joint.number)
    expect(loose.length).toBeGreaterThan(0)
    const text = told('moved')
    expect(text).toContain('The clearance waits: the press is not used until these joints are accepted again.')
    expect(text).not.toContain('Every joint')
  })

  it('promises no end of a clearance where there is none', () => {
    expect(told('overload', [], pressAfter())).toContain('No clearance is in force, so none ends with it.')
    const under = pressAfter(...ACCEPTED, CLEARED, { kind: 'test-opened', payload: { proofTestId: ids.test, number: 'PT-0044' } })
    expect(told('moved', [], under)).toContain('The clearance stays suspended.')
  })
})
