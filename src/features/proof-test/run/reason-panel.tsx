import { useEffect, useRef, useState, type ReactElement } from 'react'
import { Button } from '../../../components/button'
import { TextArea } from '../../../components/field'
import { Mark } from '../../../components/marks'
import { ActionPlate } from '../../../components/run/plates'
import { setPercent } from '../../../components/typeset'
import type { Asking, Run } from '../use-run'
import { BenchScroll } from './head-band'
import { Into } from './slots'

/** A rule speaks against it: one may go on with a reason, which prints. It lies in the bench, never over Stop. */
export function ReasonPanel({ run, asking }: { run: Run; asking: Asking }): ReactElement {
  const [reason, setReason] = useState('')
  const [asked, setAsked] = useState(false)
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => heading.current?.focus({ preventScroll: true }), [])
  const short = reason.trim().length < 3
  return (
    <>
      <BenchScroll>
        <div className="flex gap-4">
          <Mark name="wait" size={32} />
          <div className="min-w-0">
            <h1 ref={heading} tabIndex={-1} className="text-22 tablet:text-26">
              This needs a reason.
            </h1>
            <ul className="mt-1">
              {asking.findings.map((finding) => (
                <li key={finding.rule} className="text-18">
                  {setPercent(finding.says)} <span className="text-graphite">Rule {finding.rule}.</span>
                </li>
              ))}
            </ul>
          </div>
        </div>
        <TextArea
          className="mt-4"
          label="Your reason"
          hint="It prints in the record."
          maxLength={500}
          value={reason}
          message={asked && short ? 'Say why in a few words.' : undefined}
          onChange={(event) => setReason(event.target.value)}
        />
        <Button className="mt-3 min-h-14" onClick={run.leave}>
          Leave it
        </Button>
      </BenchScroll>
      <Into slot="action">
        <ActionPlate
          title="Go on for this reason"
          onPress={() => {
            setAsked(true)
            if (!short) run.giveReason(reason.trim())
          }}
        />
      </Into>
    </>
  )
}
