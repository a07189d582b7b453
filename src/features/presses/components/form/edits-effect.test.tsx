import { act, render, screen } from '@testing-library/react'
import { beforeEach, describe, expect, it } from 'vitest'
import { ACCEPTED, CLEARED, pressAfter } from '../../../../../tests/factories/press-states'
import { draftOfPress } from './edits'
import { EditsEffectNote } from './edits-effect'
import { usePressForm, type PressForm } from './use-press-form'

const state = pressAfter(...ACCEPTED, CLEARED)
let form: PressForm

function Editing() {
  const { description } = state
  if (!description) throw new Error('The press is entered.')
  const editing = usePressForm('edits-effect', () => draftOfPress(state, description, { length: 'mm', pressure: 'psi' }))
  form = editing.form
  return <EditsEffectNote form={editing.form} state={state} />
}

describe('what saving an edit does, said before it is saved', () => {
  beforeEach(() => {
    localStorage.clear()
    render(<Editing />)
  })

  it('another name or purpose: the clearance stands', () => {
    expect(screen.getByText('Nothing is different from what is written down.')).toBeInTheDocument()
    act(() => form.setValue('description.name', 'Old Hundred'))
    expect(screen.getByRole('status')).toHaveTextContent('The clearance stands: the press itself is what it was.')
  })

  it('another joint: the clearance ends, and the joint is to be examined', () => {
    act(() => form.setValue('joints.2.detail', 'fillet 12 mm'))
    expect(screen.getByRole('status')).toHaveTextContent('The clearance ends with this.')
    expect(screen.getByRole('status')).toHaveTextContent('To be examined: joint 3.')
  })

  it('says nothing of what can’t be read yet', () => {
    act(() => form.setValue('description.ratedLoad.text', 'twelve'))
    expect(screen.getByText(/^Some fields above can’t be read yet\./)).toBeInTheDocument()
    expect(screen.queryByRole('status')).not.toBeInTheDocument()
  })
})
