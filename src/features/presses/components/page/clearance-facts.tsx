import type { ReactNode } from 'react'
import type { Clearance } from '#shared/press/entries'
import { typedWords } from '#shared/instruments/words'
import { formatForce, type ForceUnit } from '#shared/units'
import { TextLink } from '../../../../components/button'
import { longDate } from '../../../../lib/dates'
import { paths } from '../../../../paths'
import { Dashes } from './dashes'

type Fact = readonly [name: string, value: ReactNode]

const list = (words: readonly string[], nothing: string): string => (words.length > 0 ? words.join(', ') : nothing)

function factsOf(clearance: Clearance, forceUnit: ForceUnit): Fact[] {
  const { gaugePressure, gaugeCode, toolingLimitNewton, staticLoads, proofTestId, number } = clearance
  return [
    ['Test behind it', <TextLink to={paths.proofTest.href(proofTestId)}>{number}</TextLink>],
    ...(clearance.protocol ? [['Protocol', clearance.protocol] as const] : []),
    ['Static loads', `${staticLoads}, to the full load and back`],
    ['Gauge', `${gaugeCode || 'load cell'}${gaugePressure ? `, not past ${typedWords(gaugePressure)}` : ''}`],
    ['Bed hole', clearance.bedHoles.join(', ')],
    ['Ram', clearance.ramPositions.join(', ')],
    [
      'Tooling',
      `${list(clearance.tooling, 'none named')}${toolingLimitNewton ? `; the lowest is rated ${formatForce(toolingLimitNewton, forceUnit)}` : ''}`,
    ],
    ['Due', `Examined and tested again by ${longDate(clearance.until)}`],
    ['Not measured', list(clearance.notMeasured, 'no member was left out')],
  ]
}

/** The whole clearance, as DOMAIN asks for it: what it was proven with and what it holds under. */
export function ClearanceFacts({ clearance, forceUnit }: { clearance: Clearance; forceUnit: ForceUnit }) {
  const { conditions = [] } = clearance
  return (
    <>
      <dl className="grid gap-x-8 border-t border-hairline desktop:grid-cols-2">
        {factsOf(clearance, forceUnit).map(([name, value]) => (
          <div key={name} className="grid grid-cols-[7.5rem_minmax(0,1fr)] gap-x-3 border-b border-hairline py-1.5">
            <dt className="text-graphite">{name}</dt>
            <dd className="font-medium">{value}</dd>
          </div>
        ))}
      </dl>
      {conditions.length > 0 && (
        <div className="mt-3">
          <p className="font-semibold">It holds</p>
          <Dashes sentences={conditions} />
        </div>
      )}
      <p className="mt-3 text-graphite">
        One static load says nothing of fatigue, cold, other bed holes, members that were not measured or faces that nobody examined.
      </p>
    </>
  )
}
