import type { ReactNode } from 'react'
import type { Clearance } from '#shared/press/entries'
import { clearedKilonewtons } from '#shared/press/clearance-words'
import type { ClearanceState, MayItBeUsed, PressState } from '#shared/press/state'
import { typedWords } from '#shared/instruments/words'
import { groupDigits, unitLabel, type TypedForce } from '#shared/units'
import { HowLink } from '../../../../components/how-link'
import { Mark } from '../../../../components/marks'
import { setPercent } from '../../../../components/typeset'
import { longDate } from '../../../../lib/dates'
import { Dashes } from './dashes'

const loads = (count: number): string => (count === 1 ? 'one static load' : `${count} static loads`)
const list = (words: readonly string[]): string => words.join(', ')

function Aside({ children }: { children: ReactNode }) {
  return <div className="border-rule max-tablet:border-t max-tablet:pt-3 tablet:border-l tablet:pl-5">{children}</div>
}

function ClearedTo({ clearance, rated }: { clearance: Clearance; rated: TypedForce | undefined }) {
  const { load } = clearance
  return (
    <>
      <div className="grid gap-x-8 gap-y-4 tablet:grid-cols-[minmax(0,1fr)_19rem] desktop:grid-cols-[minmax(0,1fr)_15rem] wide:grid-cols-[minmax(0,1fr)_19rem]">
        <div className="flex items-center gap-5">
          <Mark name="within" size={70} className="shrink-0 max-tablet:size-14" />
          <p>
            <span className="block text-26 font-semibold">Cleared up to</span>
            <span className="flex flex-wrap items-center gap-x-4">
              <span className="text-76 font-semibold tracking-tight tablet:text-104 desktop:text-76 wide:text-104">
                {groupDigits(load.text)}
              </span>{' '}
              <span className="w-min text-26/[30px] font-semibold tablet:text-34/[37px] desktop:text-26/[30px] wide:text-34/[37px]">
                {unitLabel(load.unit, { plural: true })}
              </span>
            </span>
          </p>
        </div>
        <Aside>
          <p>
            <strong className="font-semibold">{clearedKilonewtons(load)}</strong>
            {rated && `, rated ${typedWords(rated)}`}
          </p>
          {clearance.gaugePressure && (
            <p className="font-semibold">
              Gauge {clearance.gaugeCode} not past {typedWords(clearance.gaugePressure)}
            </p>
          )}
          <p>
            Bed hole {list(clearance.bedHoles)}, ram {list(clearance.ramPositions)}
          </p>
          <p className="text-graphite">No other bed hole was tested.</p>
          <p className="text-22 font-semibold">Until {longDate(clearance.until)}</p>
          <HowLink topic="clearance" of="the load" />
        </Aside>
      </div>
      <p className="mt-3">
        Cleared by {clearance.clearedBy} on {longDate(clearance.clearedOn)} after {loads(clearance.staticLoads)}.
        {clearance.notMeasured.length > 0 && <span className="text-graphite"> Not measured: {list(clearance.notMeasured)}.</span>}
      </p>
    </>
  )
}

const upTo = (clearance: Clearance): string => `${typedWords(clearance.load)}, until ${longDate(clearance.until)}`

/** What a suspension waits for, and what comes of it; what a withdrawal took away. */
function standing(clearance: ClearanceState, today: string): string | null {
  if (clearance.is === 'withdrawn') {
    const before = clearance.last ? ` Before that it was cleared up to ${upTo(clearance.last)}.` : ''
    return `Withdrawn on ${longDate(clearance.at)}.${before}`
  }
  if (clearance.is === 'cleared') return `It was cleared up to ${upTo(clearance.clearance)}.`
  if (clearance.is !== 'suspended' || !clearance.clearance) return null
  switch (clearance.until) {
    case 'the joints are accepted':
      return clearance.clearance.until < today
        ? `Suspended until every joint is accepted again; its day, ${longDate(clearance.clearance.until)}, has gone by meanwhile, so it wants a proof test as well.`
        : `Suspended until every joint is accepted again. Then it is cleared as before: up to ${upTo(clearance.clearance)}.`
    case 'somebody looked into it':
      return `Suspended until somebody has looked into it: test it again, or withdraw the clearance up to ${upTo(clearance.clearance)}.`
    case 'the test is over':
      return null
  }
}

type NotToBeUsedProps = { title: string; why: string; standing: string | null; missing: readonly string[] }

function NotToBeUsed({ title, why, standing: stands, missing }: NotToBeUsedProps) {
  return (
    <div className="flex items-start gap-5">
      <Mark name={title === 'Under test' ? 'under-way' : 'stop'} size={70} className="mt-1 shrink-0 max-tablet:size-14" />
      <div className="min-w-0">
        <p className="text-46 font-semibold tablet:text-54">{title}</p>
        <p className="text-20 font-semibold">{setPercent(why)}</p>
        {stands !== null && <p className="mt-1 text-graphite">{stands}</p>}
        {missing.length > 0 && (
          <>
            <p className="mt-3 font-semibold">What is missing</p>
            <Dashes sentences={missing.map(setPercent)} />
          </>
        )}
      </div>
    </div>
  )
}

type AnswerProps = { answer: MayItBeUsed; state: Pick<PressState, 'clearance' | 'description'>; today: string }

/** May it be used: the load with its unit, or what stands against it. Never a bare yes. */
export function Answer({ answer, state, today }: AnswerProps) {
  switch (answer.answer) {
    case 'cleared':
      return <ClearedTo clearance={answer.clearance} rated={state.description?.ratedLoad} />
    case 'under test':
      return (
        <NotToBeUsed
          title="Under test"
          why={answer.why}
          standing={null}
          missing={['Nobody uses it before the test is concluded and countersigned.']}
        />
      )
    case 'do not use':
      return <NotToBeUsed title="Do not use" why={answer.why} standing={standing(state.clearance, today)} missing={answer.missing} />
  }
}

/** What ends a clearance the moment it happens. */
export function EndsAtOnce({ load, buildPauseDays }: { load: TypedForce; buildPauseDays: number }) {
  return (
    <>
      <p className="font-semibold">It ends at once if</p>
      <Dashes
        sentences={[
          'a weld, pin or member is changed or repaired',
          `it is loaded past ${typedWords(load)}, or knocked`,
          'a joint cracks, moves or leaks',
          'its ram or gauge is another one',
        ]}
      />
      <p className="mt-1 text-graphite">It waits for its joints when it was moved, or stood unused for {buildPauseDays} days.</p>
    </>
  )
}
