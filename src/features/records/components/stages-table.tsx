import type { ReactNode } from 'react'
import type { ClimbEvaluation } from '#shared/proof-test/evaluate-climb'
import { leadInstrument } from '#shared/proof-test/force'
import { repeatHeading, shownStages, type ShownStage } from '#shared/proof-test/record-stages'
import { unitLabel } from '#shared/units'
import { Mark } from '../../../components/marks'
import { clockTime } from '../../../lib/dates'
import { useMedia } from '../../../lib/use-media'
import type { RecordView } from '../record-view'
import { Reading } from './reading'

interface Heads {
  pressure: string
  length: string
  stiffness: string
  net: string
}

function headsOf({ opened }: RecordView): Heads {
  const gauge = leadInstrument(opened)?.details
  const pressure = gauge && gauge.kind !== 'indicator' ? unitLabel(gauge.increment.unit) : ''
  return {
    pressure,
    length: unitLabel(opened.lengthUnit),
    stiffness: opened.lengthUnit === 'in' ? 'lbf/in' : 'kN/mm',
    net: opened.net ? 'Net' : (opened.points[0]?.label ?? 'Net'),
  }
}

function Head({ words, unit, left = false }: { words: string; unit?: string; left?: boolean }) {
  return (
    <th scope="col" className={`pb-1 align-bottom font-medium ${left ? 'pr-2 text-left wide:pr-3' : 'pl-1.5 text-right wide:pl-3'}`}>
      {words}
      {unit !== undefined && unit !== '' && <span className="block">{unit}</span>}
    </th>
  )
}

function Cell({ children, strong = false }: { children: ReactNode; strong?: boolean }) {
  return <td className={`py-1.5 pl-1.5 text-right wide:pl-3 ${strong ? 'font-semibold' : ''}`}>{children}</td>
}

function StageLine({ stage }: { stage: ShownStage }) {
  return (
    <tr className="border-b border-hairline">
      <th scope="row" className="py-1.5 wide:w-28 pr-3 text-left font-semibold whitespace-nowrap">
        {stage.name}
      </th>
      <td className="py-1.5">{stage.at !== null && clockTime(stage.at)}</td>
      <Cell>{stage.target}</Cell>
      <Cell>
        <Reading reading={stage.start} />
      </Cell>
      <Cell>
        <Reading reading={stage.end} />
      </Cell>
      {stage.points.map(({ id, reading }) => (
        <Cell key={id}>
          <Reading reading={reading} />
        </Cell>
      ))}
      <Cell strong>{stage.net}</Cell>
      <td className="py-1.5 pl-1.5 text-right whitespace-nowrap wide:pl-3">
        {stage.force && stage.target !== null && (
          <>
            <span className="font-semibold">{stage.force.kN}</span> ± {stage.force.U}
          </>
        )}
      </td>
      <Cell>{stage.step}</Cell>
      <td className="py-1.5 pl-1.5 text-right whitespace-nowrap wide:pl-3">{stage.softening}</td>
      <Cell>{stage.creep}</Cell>
      <td className="py-1.5 pl-3 wide:pl-6">
        {stage.decision && (
          <span className="flex items-center gap-1.5 whitespace-nowrap">
            <Mark name={stage.decision.mark} size={18} />
            {stage.decision.words}
          </span>
        )}
      </td>
    </tr>
  )
}

function Table({ record, climb }: { record: RecordView; climb: ClimbEvaluation }) {
  const { pressure, length, stiffness, net } = headsOf(record)
  return (
    <div className="overflow-x-auto print:overflow-visible">
      <table className="w-full border-collapse max-wide:font-condensed print:text-[12px] print:leading-4">
        <thead>
          <tr className="border-b border-rule font-condensed text-14 text-graphite">
            <Head words="Stage" left />
            <Head words="Reached" left />
            <Head words="Target" unit={pressure} />
            <Head words="Hold start" unit={pressure} />
            <Head words="Hold end" unit={pressure} />
            {record.opened.points.map(({ id, label }) => (
              <Head key={id} words={label} unit={length} />
            ))}
            <Head words={net} unit={length} />
            <Head words="Force" unit="kN" />
            <Head words="Step" unit={stiffness} />
            <Head words="Softening" />
            <Head words="Creep" unit={length} />
            <th scope="col" className="pb-1 pl-3 wide:pl-6 text-left align-bottom font-medium">
              Decision
            </th>
          </tr>
        </thead>
        <tbody>
          {shownStages(record, climb).map((stage) => (
            <StageLine key={stage.key} stage={stage} />
          ))}
        </tbody>
      </table>
    </div>
  )
}

function Pair({ name, children }: { name: string; children: ReactNode }) {
  return (
    <div className="flex justify-between gap-2">
      <dt className="text-graphite">{name}</dt>
      <dd className="text-right whitespace-nowrap">{children}</dd>
    </div>
  )
}

/** The same where a table has no room: a block for each stage, each figure beside its name. */
function StageBlock({ stage, heads }: { stage: ShownStage; heads: Heads }) {
  return (
    <li className="border-b border-hairline py-2">
      <div className="flex items-center justify-between gap-3">
        <p className="text-18 font-semibold">
          {stage.name} <span className="font-normal text-graphite">{stage.at !== null && clockTime(stage.at)}</span>
        </p>
        {stage.decision && (
          <p className="flex items-center gap-2">
            <Mark name={stage.decision.mark} size={18} />
            {stage.decision.words}
          </p>
        )}
      </div>
      <dl className="grid grid-cols-2 gap-x-6 tablet:grid-cols-4">
        {stage.force && stage.target !== null && (
          <div className="col-span-2 flex justify-between gap-3">
            <dt className="text-graphite">Force</dt>
            <dd>
              <span className="font-semibold">{stage.force.own}</span>, {stage.force.kN} ± {stage.force.U} kN
            </dd>
          </div>
        )}
        {stage.target !== null && <Pair name="Target">{stage.target}</Pair>}
        {stage.start && (
          <Pair name={stage.target === null ? 'Gauge' : 'Hold start'}>
            <Reading reading={stage.start} />
          </Pair>
        )}
        {stage.end && (
          <Pair name="Hold end">
            <Reading reading={stage.end} />
          </Pair>
        )}
        {stage.points.map(({ id, label, reading }) => (
          <Pair key={id} name={label}>
            <Reading reading={reading} />
          </Pair>
        ))}
        {stage.net !== null && (
          <Pair name={`${heads.net}, ${heads.length}`}>
            <span className="font-semibold">{stage.net}</span>
          </Pair>
        )}
        {stage.step !== null && <Pair name={heads.stiffness}>{stage.step}</Pair>}
        {stage.softening !== null && <Pair name="Softening">{stage.softening}</Pair>}
        {stage.creep !== null && <Pair name={`Creep, ${heads.length}`}>{stage.creep}</Pair>}
      </dl>
    </li>
  )
}

function Climb({ record, climb }: { record: RecordView; climb: ClimbEvaluation }) {
  const narrow = useMedia('(max-width: 1023.98px)')
  if (!narrow) return <Table record={record} climb={climb} />
  const heads = headsOf(record)
  return (
    <ol>
      {shownStages(record, climb).map((stage) => (
        <StageBlock key={stage.key} stage={stage} heads={heads} />
      ))}
    </ol>
  )
}

/** Every stage as it was read, each leg and climb under its own heading. */
export function StagesAsRead({ record }: { record: RecordView }) {
  const { evaluation, opened } = record
  const several = opened.legs.length > 1
  return (
    <section className="pt-5">
      <h2 className="pb-1 text-20">Stages as read</h2>
      {evaluation.climbs.length === 0 && <p className="text-graphite">No load was put on yet.</p>}
      {evaluation.climbs.map((climb) => (
        <div key={`${climb.leg} ${climb.climb}`} className="pb-3">
          {several && climb.climb === 0 && <h3 className="pt-2 text-18">{opened.legs[climb.leg]?.label}</h3>}
          {climb.climb > 0 && (
            <h3 className="pt-2 pb-1 text-16">
              {repeatHeading(record, climb)}
              <span className="font-normal text-graphite"> from the datum taken after the first set</span>
            </h3>
          )}
          <Climb record={record} climb={climb} />
        </div>
      ))}
    </section>
  )
}
