import type { ReactElement } from 'react'
import type { Opened } from '#shared/proof-test/entries'
import { Mark } from '../../../components/marks'
import { ActionPlate } from '../../../components/run/plates'
import type { Run } from '../use-run'
import { Into } from './slots'

/** The witness says that no joint is missing: on a device of the own, or told to the lead with a reason. */
export function ConfirmLoadPath({ run, opened }: { run: Run; opened: Opened }): ReactElement {
  const { name } = opened.people.witness
  const witness = run.me.part === 'witness'
  const confirm = (): void =>
    run.record({
      kind: 'load-path-confirmed',
      payload: { by: witness ? 'witness' : 'witness, as told to the lead', joints: run.state.joints.length },
    })
  return (
    <div className="flex gap-4">
      <Mark name="within" size={40} />
      <div className="min-w-0">
        <h2 className="text-22 tablet:text-26">Every joint on the list is accepted. Is one missing?</h2>
        <p className="mt-1 text-18">
          {witness
            ? 'Follow the force from the ram round the frame to the bed. Every place where two parts hold together must be on this list.'
            : `${name} follows the force from the ram round the frame to the bed, and confirms on the own screen that every joint is on this list. This goes on by itself when it is confirmed.`}
        </p>
      </div>
      <Into slot="action">
        {witness ? (
          <ActionPlate title="No joint is missing" note={`${run.state.joints.length} joints in the load path`} onPress={confirm} />
        ) : (
          <ActionPlate
            title={`Told to me by ${name}: no joint is missing`}
            note="needs a reason why it is not confirmed in person"
            onPress={confirm}
          />
        )}
      </Into>
    </div>
  )
}
