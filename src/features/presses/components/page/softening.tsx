import { useQuery } from '@tanstack/react-query'
import { lazy, Suspense, useState } from 'react'
import type { ClimbHistory } from '#shared/api/press-history'
import type { LengthUnit } from '#shared/units'
import { ButtonLink, TextLink } from '../../../../components/button'
import { Mark } from '../../../../components/marks'
import { NothingHere } from '../../../../components/nothing-here'
import { Section } from '../../../../components/page'
import { RadioRow } from '../../../../components/radio-row'
import { SkeletonRows } from '../../../../components/skeleton'
import { shortDate } from '../../../../lib/dates'
import { useCan, useShop } from '../../../../lib/here'
import { pressHistoryQuery } from '../../../../lib/press-history'
import { sayWhatFailed } from '../../../../lib/problem'
import { paths } from '../../../../paths'
import { changeWords, firstClimbs, limitWords, rowOf, seriesOf, stiffnessChange, type Series } from './softening-figures'

// The drawing library is a chunk of its own, fetched when somebody scrolls to a press that has tests.
const SofteningCharts = lazy(() => import('./softening-charts').then((module) => ({ default: module.SofteningCharts })))

const RESULT: Record<NonNullable<ClimbHistory['result']>, string> = { accepted: 'accepted', rejected: 'rejected', abandoned: 'abandoned' }

/** On the phone each figure says what it is; from the tablet on its column does. */
function Cell({ name, children }: { name: string; children: string }) {
  return (
    <td className="max-tablet:grid max-tablet:grid-cols-[8.5rem_minmax(0,1fr)] tablet:py-2 tablet:pr-3">
      <span className="text-graphite tablet:hidden">{name}</span>
      <span>{children}</span>
    </td>
  )
}

function Table({ series, length }: { series: Series; length: LengthUnit }) {
  return (
    <div className="mt-3">
      <table className="w-full text-left max-tablet:block">
        <caption className="sr-only">
          {series.label}: {series.climbs[0]?.of}
        </caption>
        <thead className="max-tablet:hidden">
          <tr className="border-y border-ink text-14 text-graphite max-desktop:text-16">
            <th scope="col" className="py-1.5 pr-3 font-normal">
              Test
            </th>
            <th scope="col" className="pr-3 font-normal">
              Stiffness
            </th>
            <th scope="col" className="pr-3 font-normal">
              Permanent set
            </th>
            <th scope="col" className="font-normal">
              Pressure loss
            </th>
          </tr>
        </thead>
        <tbody className="max-tablet:block max-tablet:border-t max-tablet:border-ink">
          {series.climbs.map((climb) => {
            const row = rowOf(climb, length)
            return (
              <tr
                key={`${climb.proofTestId} ${climb.climb}`}
                className="border-b border-hairline align-top max-tablet:block max-tablet:py-2"
              >
                <th scope="row" className="font-medium max-tablet:block tablet:py-2 tablet:pr-3">
                  <TextLink to={paths.proofTest.href(climb.proofTestId)}>{climb.number}</TextLink>
                  {climb.climb > 0 && <span className="font-normal">, repeat climb</span>}
                  <span className="block font-normal text-graphite">
                    {shortDate(climb.on)}
                    {climb.result && `, ${RESULT[climb.result]}`}
                    {climb.repeats !== null && `, repeats ${climb.repeats}`}
                  </span>
                </th>
                <Cell name="Stiffness">{row.stiffness}</Cell>
                <Cell name="Permanent set">{row.set}</Cell>
                <Cell name="Pressure loss">{row.loss}</Cell>
              </tr>
            )
          })}
        </tbody>
      </table>
    </div>
  )
}

function InWords({ climbs }: { climbs: readonly ClimbHistory[] }) {
  const change = stiffnessChange(climbs)
  return (
    <div className="flex items-start gap-3">
      <Mark
        name={change === null ? 'not-read' : change.says === 'softer' ? 'wait' : change.says === 'stiffer' ? 'within' : 'undecided'}
        size={26}
        className="mt-0.5 shrink-0"
      />
      <div className="max-w-prose">
        <p className="text-18 font-semibold">
          {change === null ? 'One line only: the next test tells whether it is getting softer.' : changeWords(change)}
        </p>
        <p className="text-graphite">
          {change?.says === 'softer' && 'Look for what has given at the next walk-down: pins, welds and bed first. '}
          {limitWords(climbs).join(' ')} The ± tells how the readings scatter about their lines; another gauge or ram adds its own.
        </p>
      </div>
    </div>
  )
}

function Nothing({ pressId }: { pressId: string }) {
  const can = useCan()
  const shop = useShop()
  return (
    <NothingHere
      what="No test of this press has been read yet."
      next="Each proof test adds its stiffness, its set and its pressure loss here, and they are compared with the first."
      action={
        can('proof-test:open') && (
          <ButtonLink size="line" to={paths.planProofTest.href({ shop: shop.id, press: pressId })}>
            Plan a proof test
          </ButtonLink>
        )
      }
    />
  )
}

function Shown({ series }: { series: readonly Series[] }) {
  const { lengthUnit } = useShop()
  const [key, setKey] = useState(series[0]?.key)
  const shown = series.find((one) => one.key === key) ?? series[0]
  if (!shown) return null
  const climbs = firstClimbs(shown)
  return (
    <>
      {series.length > 1 && (
        <RadioRow
          label="Position"
          name="leg"
          className="mb-4"
          choices={series.map((one) => ({ value: one.key, label: one.label }))}
          value={shown.key}
          onChange={(event) => setKey(event.target.value)}
        />
      )}
      <InWords climbs={climbs} />
      {climbs.length > 1 && (
        <div className="ground-dye mt-3 max-tablet:-mx-4">
          <Suspense fallback={<div className="h-[37rem]" />}>
            <SofteningCharts climbs={climbs} lengthUnit={lengthUnit} />
          </Suspense>
        </div>
      )}
      <Table series={shown} length={lengthUnit} />
    </>
  )
}

/** Stiffness, set and pressure loss of one press over all its tests: is it getting softer? */
export function Softening({ pressId, className }: { pressId: string; className: string }) {
  const history = useQuery(pressHistoryQuery(pressId))
  const climbs = history.data?.climbs
  return (
    <Section title="Is it getting softer?" className={className}>
      {climbs === undefined &&
        (history.error ? <p className="text-graphite">{sayWhatFailed(history.error)}</p> : <SkeletonRows rows={3} />)}
      {climbs?.length === 0 && <Nothing pressId={pressId} />}
      {climbs !== undefined && climbs.length > 0 && <Shown series={seriesOf(climbs)} />}
    </Section>
  )
}
