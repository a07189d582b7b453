import { fullestForce } from '#shared/proof-test/budget'
import { clearanceArithmetic, energyText, inPrint } from '#shared/proof-test/record'
import { formatForce } from '#shared/units'
import { checkText, engineerText } from '#shared/proof-test/check-record'
import { HowLinks } from '../../../components/how-link'
import { forceInstrumentText, indicatorsText, ramText, toolingText } from '../fact-words'
import type { RecordView } from '../record-view'

type Fact = readonly [name: string, value: string]

function factsOf(record: RecordView): Fact[] {
  const { opened, evaluation, state } = record
  const { pumpHand } = opened.people
  const fullest = fullestForce(evaluation)
  const arithmetic = clearanceArithmetic(opened, evaluation)
  const confirmed = state.loadPathConfirmed
  const rule = opened.protocol.content.decisionRule === 'simple' ? 'Simple acceptance' : 'Guard band of U'
  const rams = opened.press.rams.map((ram): Fact => [opened.press.rams.length > 1 ? ram.name : 'Ram', ramText(ram)])
  const read = opened.forceInstrumentIds.flatMap((id): Fact[] => {
    const instrument = opened.instruments.find((candidate) => candidate.id === id)
    return instrument ? [[instrument.details.kind === 'load-cell' ? 'Load cell' : 'Gauge', forceInstrumentText(instrument)]] : []
  })
  const indicators = indicatorsText(opened)
  const tooling = toolingText(opened)
  return [
    ...(arithmetic ? [['Load', arithmetic] as const] : []),
    ...(fullest && fullest.force.pressure !== null
      ? [
          [
            'Delivered',
            `At least ${formatForce(fullest.force.deliveredAtLeast, opened.forceUnit)} at ${fullest.percent} %, after ${opened.protocol.content.frictionPercent} % for seal friction`,
          ] as const,
        ]
      : []),
    [
      'Load path',
      confirmed ? `${state.joints.length} joints, none missing: ${record.nameOf(confirmed.by)}` : 'Not confirmed whole by the witness',
    ],
    ['Check', checkText(opened)],
    ...(opened.engineer ? [['Engineer', engineerText(opened.engineer)] as const] : []),
    ['Pump hand', pumpHand.relation ? `${pumpHand.name}, ${pumpHand.relation}` : pumpHand.name],
    ...rams,
    ...read,
    ...(tooling ? [['Tooling', tooling] as const] : []),
    ...(indicators ? [['Indicators', indicators] as const] : []),
    ['Relief', state.setUp?.reliefSet ? `Set to ${state.setUp.reliefSet.text} ${state.setUp.reliefSet.unit}` : 'No setting noted'],
    ['Rule', `${rule}, k\u00a0=\u00a02.${opened.repeats ? ` Repeats ${opened.repeats.number}` : ''}`],
    ...(evaluation.energy ? [['Energy', energyText(evaluation.energy)] as const] : []),
    ['Rated', inPrint(opened.press.ratedLoad)],
    ...(opened.instrumentOverride ? [['Calibration', `Used out of date: ${opened.instrumentOverride}`] as const] : []),
  ]
}

/** What the figures rest on, a line each. */
export function RecordFacts({ record }: { record: RecordView }) {
  return (
    <div>
      <dl className="font-condensed">
        {factsOf(record).map(([name, value]) => (
          <div key={name} className="grid grid-cols-[6rem_1fr] gap-x-2 border-b border-hairline py-0.5">
            <dt className="text-graphite">{name}</dt>
            <dd className="min-w-0">{value}</dd>
          </div>
        ))}
      </dl>
      <HowLinks
        className="mt-1 font-condensed"
        topics={[
          ['clearance', 'load'],
          ['ram-force', 'delivered'],
          ['gauge', 'gauge'],
          ['uncertainty', 'its ±'],
          ['stored-energy', 'energy'],
        ]}
      />
    </div>
  )
}
