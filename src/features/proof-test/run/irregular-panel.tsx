import type { ReactElement } from 'react'
import { PROOF_TEST_RULES } from '#shared/proof-test/decide'
import { VerdictBanner } from '../../../components/run/verdict-banner'
import type { Run } from '../use-run'
import { BenchScroll } from './head-band'
import { ReleasePlate } from './release'
import { Into } from './slots'

/** What arrived meanwhile goes against an interlock: under load only stop and release are left. */
export function IrregularPanel({ run }: { run: Run }): ReactElement {
  return (
    <>
      <Into slot="over">
        <VerdictBanner
          decision="wait"
          title="Release"
          instruction="Something was written that an interlock forbids."
          caution="Go no further. Open the release valve slowly."
        />
      </Into>
      <BenchScroll>
        <ul className="border-t border-hairline">
          {run.irregular.map((id) => (
            <li key={id} className="border-b border-hairline py-2 text-18">
              {PROOF_TEST_RULES.find((rule) => rule.id === id)?.text} <span className="text-graphite">Rule {id}.</span>
            </li>
          ))}
        </ul>
        <p className="mt-3 text-18">It stands in the record, marked. This test can no longer be concluded as accepted.</p>
      </BenchScroll>
      <Into slot="action">
        <ReleasePlate run={run} note="load is off" />
      </Into>
    </>
  )
}
