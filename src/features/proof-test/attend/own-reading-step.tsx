import { useEffect, type ReactElement } from 'react'
import type { Opened, Position } from '#shared/proof-test/entries'
import { Keypad } from '../../../components/run/keypad'
import { rowSources } from '../row-model'
import { OwnReading } from '../run/own-reading'
import { Into } from '../run/slots'
import { useRow } from '../use-row'
import type { Run } from '../use-run'

/** The witness reads the gauge on the own phone, and sees nothing of the lead's until it is in. */
export function OwnReadingStep({ run, opened, at }: { run: Run; opened: Opened; at: Position }): ReactElement {
  const sources = rowSources(opened, 'force')
  const row = useRow({
    draftKey: `${run.testId}.own.${at.leg}.${at.stage}.${at.attempt}`,
    sources,
    surprise: () => null,
    onEnter: ({ readings }) => run.record({ kind: 'independent-read', payload: { at, readings, notTaken: null, where: 'own device' } }),
  })
  const { mark, draft } = row
  useEffect(() => {
    if (draft.mark === null) mark()
  })
  return (
    <Into slot="bench">
      <h1 className="text-22">Read the gauge yourself</h1>
      <p className="mb-2 text-16 text-graphite">The lead’s figure stays hidden until yours is in.</p>
      <OwnReading row={row} sources={sources} name={run.me.name} />
      <div className="mt-2">
        <Keypad
          onKey={row.key}
          onBackspace={row.backspace}
          onEnter={row.enter}
          enterLabel={row.last ? 'Enter my reading' : 'Enter'}
          size="phone"
        />
      </div>
    </Into>
  )
}
