import { expectedAtStage } from '#shared/proof-test/can-tell'
import type { Opened } from '#shared/proof-test/entries'
import { lengthText } from '#shared/proof-test/figures'
import { secondsWords } from '#shared/proof-test/protocol-words'
import { formatForce, groupDigits, unitLabel } from '#shared/units'
import { HowLinks } from '../../../components/how-link'
import { Mark } from '../../../components/marks'
import { Sheet } from '../../../components/plate'
import { setPercent } from '../../../components/typeset'
import { capital } from '../../../lib/words'
import { plannedStages, type PlannedStage } from '../preview'

const head =
  'border-b border-hairline pt-4 pr-2 pb-1 tablet:pr-4 text-left align-bottom font-condensed text-14 font-medium text-graphite last:pr-0'
const cell = 'h-12 pr-2 last:pr-0 tablet:pr-4'

function StageRow({ stage, opened }: { stage: PlannedStage; opened: Opened }) {
  const { target, holdSeconds, U } = stage
  const band = expectedAtStage(opened, target.percent)
  const expected = band && `moves ${lengthText(opened, band.low, { unit: false })} to ${lengthText(opened, band.high)}`
  const window = `${groupDigits(target.window.fromText)} to ${groupDigits(target.window.toText)}`
  return (
    <tr className="border-b border-hairline last:border-b-0">
      <th scope="row" className={`${cell} text-left font-semibold whitespace-nowrap`}>
        {target.percent}
        {'\u202f'}%
        {target.percent > 100 && <span className="block text-14 font-normal text-graphite max-tablet:whitespace-normal">second climb</span>}
      </th>
      <td className={cell}>
        <span className="whitespace-nowrap">{formatForce(target.force, opened.forceUnit)}</span>
        {opened.forceUnit !== 'kN' && (
          <span className="block text-14 whitespace-nowrap text-graphite">{formatForce(target.force, 'kN')}</span>
        )}
      </td>
      <td className={`${cell} whitespace-nowrap`}>{groupDigits(target.exactText)}</td>
      <td className={`${cell} whitespace-nowrap`}>
        <span className="text-18 font-semibold">{groupDigits(target.text)}</span>
        <span className="block text-14 whitespace-normal text-graphite tablet:hidden">{window}</span>
        {expected && <span className="block w-20 text-14 whitespace-normal text-graphite tablet:hidden">{expected}</span>}
      </td>
      <td className={`${cell} whitespace-nowrap max-tablet:hidden`}>
        {window}
        {expected && <span className="block text-14 text-graphite">{expected}</span>}
      </td>
      <td className={`${cell} whitespace-nowrap max-tablet:hidden`}>{U === null ? '—' : `± ${formatForce(U, opened.forceUnit)}`}</td>
      <td className={`${cell} whitespace-nowrap max-tablet:hidden`}>{secondsWords(holdSeconds)}</td>
    </tr>
  )
}

/** What to pump to at each stage: exact, rounded down to what can be read, and the readings that count as reached. */
export function Targets({ opened }: { opened: Opened }) {
  const stages = plannedStages(opened)
  const [first] = stages
  if (first === undefined) return null
  const expected = expectedAtStage(opened, 100)
  const unit = unitLabel(first.target.unit, { plural: true })
  const warnings = [...new Set(stages.flatMap((stage) => stage.warnings))]
  return (
    <>
      <Sheet>
        <table className="w-full border-collapse">
          <caption className="sr-only">What to pump to at each stage</caption>
          <thead>
            <tr>
              <th scope="col" className={head}>
                Stage
              </th>
              <th scope="col" className={head}>
                Load
              </th>
              <th scope="col" className={head}>
                Exact, {unit}
              </th>
              <th scope="col" className={head}>
                Pump to, {unit}
              </th>
              <th scope="col" className={`${head} max-tablet:hidden`}>
                Counts as reached
              </th>
              <th scope="col" className={`${head} max-tablet:hidden`}>
                Known to
              </th>
              <th scope="col" className={`${head} max-tablet:hidden`}>
                Held
              </th>
            </tr>
          </thead>
          <tbody>
            {stages.map((stage) => (
              <StageRow key={stage.target.percent} stage={stage} opened={opened} />
            ))}
          </tbody>
        </table>
      </Sheet>
      <HowLinks
        beside
        className="mt-2"
        topics={[
          ['ram-force', 'what to pump to'],
          ['uncertainty', 'known to'],
          ['gauge', 'what this gauge can tell'],
        ]}
      />
      {expected && (
        <p className="mt-3">
          {capital(opened.net?.label ?? opened.points[0]?.label ?? 'The first point')}: expected to move{' '}
          {lengthText(opened, expected.low, { unit: false })} to {lengthText(opened, expected.high)} at the rated load, by an estimate from
          the sections.
        </p>
      )}
      {warnings.length > 0 && (
        <ul className="mt-3 grid gap-1">
          {warnings.map((warning) => (
            <li key={warning} className="flex items-start gap-3">
              <span className="mt-0.5">
                <Mark name="undecided" size={20} />
              </span>
              {setPercent(warning)}
            </li>
          ))}
        </ul>
      )}
    </>
  )
}
