import { useState, type ReactElement } from 'react'
import type { Attachment } from '#shared/ledger/envelope'
import { EXAMINATION_METHODS, type ExaminationMethod } from '#shared/press/model'
import type { JointState } from '#shared/proof-test/state'
import { Button } from '../../../components/button'
import { CheckRow } from '../../../components/check-row'
import { TextField } from '../../../components/field'
import { JointBalloon } from '../../../components/marks'
import { RadioRow } from '../../../components/radio-row'
import { ActionPlate } from '../../../components/run/plates'
import { capital } from '../../../lib/words'
import { useDraft } from '../drafts'
import { jointMark, jointSays, type Occasion } from '../joint-words'
import type { Run } from '../use-run'
import { EntryPhotos, JointPhotos, photosToEnter } from './entry-photos'
import { Into } from './slots'
import { RejectedJoint } from './walk-down-notes'

interface JointPanelProps {
  run: Run
  joint: JointState
  occasion: Occasion
  pressId: string
  onDone: () => void
}

interface Looked {
  method: ExaminationMethod | ''
  remark: string
  cold: boolean
  photos: Attachment[]
}

const LOOKED: Looked = { method: '', remark: '', cold: false, photos: [] }

/** One joint being examined: how, what was found, and what to say about it. */
export function JointPanel({ run, joint, occasion, pressId, onDone }: JointPanelProps): ReactElement {
  const { id, number, name, kind, detail } = joint.joint
  const [looked, change] = useDraft<Looked>(`${run.testId}.examined.${occasion}.${id}`, LOOKED)
  const [asked, setAsked] = useState(false)
  const weld = kind === 'weld'
  const noMethod = asked && looked.method === '' ? 'Say how it was examined.' : undefined
  const notCold =
    asked && weld && occasion === 'before load' && !looked.cold ? 'Let it cool until a bare hand can lie on it, then tick this.' : undefined
  const write = (result: 'accepted' | 'rejected'): void => {
    setAsked(true)
    const needsCold = weld && occasion === 'before load' && result === 'accepted'
    if (looked.method === '' || (needsCold && !looked.cold)) return
    const payload = { occasion, jointId: id, method: looked.method, result, remark: looked.remark.trim(), cold: looked.cold }
    run.record({ kind: 'joint-examined', payload, attachments: photosToEnter(run, looked.photos) })
    onDone()
  }
  return (
    <section aria-labelledby={`joint-${id}`}>
      <div className="flex items-start gap-4">
        <JointBalloon number={number} state={jointMark(joint, occasion)} size={48} decorative />
        <div className="min-w-0">
          <h2 id={`joint-${id}`} className="text-22 tablet:text-26">
            Joint {number}: {name}
          </h2>
          <p className="text-graphite">
            {[capital(kind), detail].filter((part) => part !== '').join(', ')}. {jointSays(joint, occasion)}.
          </p>
          <RejectedJoint joint={joint} occasion={occasion} pressId={pressId} />
        </div>
      </div>
      <RadioRow
        className="mt-2"
        name={`method-${id}`}
        label="Examined by"
        message={noMethod}
        value={looked.method}
        choices={EXAMINATION_METHODS.map((method) => ({ value: method, label: capital(method) }))}
        onChange={(event) => change({ method: EXAMINATION_METHODS.find((one) => one === event.target.value) ?? '' })}
      />
      {weld && occasion === 'before load' && (
        <div className="mt-2">
          <CheckRow
            label="Cooled, and 12 hours since welding"
            checked={looked.cold}
            message={notCold}
            onChange={(event) => change({ cold: event.target.checked })}
          />
        </div>
      )}
      <div className="mt-2 grid items-end gap-3 tablet:grid-cols-[minmax(0,1fr)_auto]">
        <TextField
          label="Remark"
          optional
          value={looked.remark}
          maxLength={500}
          onChange={(event) => change({ remark: event.target.value })}
        />
        <Button className="desktop:min-h-14" note="opens a repair" onClick={() => write('rejected')}>
          Joint {number} is rejected
        </Button>
      </div>
      <EntryPhotos className="mt-3" run={run} chosen={looked.photos} onChange={(photos) => change({ photos })} />
      <JointPhotos run={run} jointId={id} number={number} />
      <Into slot="action">
        <ActionPlate
          title={`Joint ${number} is accepted`}
          note={looked.method === '' ? 'say how it was examined' : `examined: ${looked.method}`}
          onPress={() => write('accepted')}
        />
      </Into>
    </section>
  )
}
