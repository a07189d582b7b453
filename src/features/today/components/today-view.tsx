import type { ReactNode } from 'react'
import { Mark, type MarkName } from '../../../components/marks'
import { NothingHere } from '../../../components/nothing-here'
import { RuledList, RuledRow } from '../../../components/ruled-list'
import { SkeletonRows } from '../../../components/skeleton'
import { classNames } from '../../../lib/class-names'
import { useTitle } from '../../../lib/use-title'
import { Calendar, type CalendarEvent } from './calendar'
import { UnderWayPlate, type UnderWay } from './under-way-plate'

/** Something that waits for this person. */
export type Need = {
  id: string
  mark: MarkName
  title: string
  note: string
  /** "Now", "waiting 9 days", "in 9 days". */
  due: string
  urgency: 'now' | 'late' | 'later'
  to: string
}

/** A press and whether it may be used. */
export type PressUse = {
  id: string
  mark: MarkName
  name: string
  kind: string
  /** "Cleared up to 11.7 short tons", "do not use". */
  use: string
  note: string
  to: string
}

export type NextStep = { label: string; to: string }

/** Parts that are still being fetched are undefined; parts that are empty say so. */
export type TodayViewProps = {
  underWay: readonly UnderWay[] | undefined
  /** What to do while no test is under way; none for those who may not plan one. */
  plan?: NextStep
  needs: readonly Need[] | undefined
  presses: readonly PressUse[] | undefined
  /** How a first press is entered; none for those who may not. */
  enterPress?: NextStep
  calendar: { today: string; events: readonly CalendarEvent[] } | undefined
}

const numerals = ['No', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine', 'Ten', 'Eleven', 'Twelve']

function needsHeading(count: number): string {
  if (count === 0) return 'Nothing needs you'
  return `${numerals[count] ?? count} ${count === 1 ? 'thing needs' : 'things need'} you`
}

const dueLook = { now: 'font-semibold', late: 'font-semibold text-stop-ink', later: 'font-normal' } as const

function Part({ title, className, children }: { title: string; className?: string; children: ReactNode }) {
  return (
    <section className={classNames('min-w-0', className)}>
      <h2 className="mb-2 text-22 tablet:mb-3 tablet:text-26">{title}</h2>
      {children}
    </section>
  )
}

function Needs({ needs }: { needs: readonly Need[] | undefined }) {
  if (needs === undefined) {
    return (
      <Part title="What needs you">
        <SkeletonRows rows={5} />
      </Part>
    )
  }
  return (
    <Part title={needsHeading(needs.length)}>
      {needs.length === 0 ? (
        <NothingHere what="No signature, calibration or withdrawal waits for you." next="What falls due stands on the scale below." />
      ) : (
        <RuledList>
          {needs.map((need) => (
            <RuledRow
              key={need.id}
              to={need.to}
              mark={<Mark name={need.mark} size={28} />}
              title={need.title}
              note={need.note}
              aside={<span className={dueLook[need.urgency]}>{need.due}</span>}
              asideFrom="tablet"
            />
          ))}
        </RuledList>
      )}
    </Part>
  )
}

function Presses({ presses, mayEnter }: { presses: readonly PressUse[] | undefined; mayEnter: boolean }) {
  return (
    <Part title="Which press may be used">
      {presses === undefined ? (
        <SkeletonRows rows={5} />
      ) : presses.length === 0 ? (
        <NothingHere
          what="No press is entered yet."
          next={mayEnter ? 'Enter its frame, joints and train first.' : 'A lead or the owner enters it.'}
        />
      ) : (
        <RuledList>
          {presses.map((press) => (
            <RuledRow
              key={press.id}
              to={press.to}
              mark={<Mark name={press.mark} size={24} />}
              title={press.name}
              note={press.kind}
              aside={press.use}
              asideNote={press.note}
            />
          ))}
        </RuledList>
      )}
    </Part>
  )
}

/** What is under way, what needs this person and which press may be used, and what the next weeks bring. */
export function TodayView({ underWay, plan, needs, presses, enterPress, calendar }: TodayViewProps) {
  useTitle('Today')
  return (
    <div className="flex grow flex-col">
      <h1 className="sr-only">Today</h1>
      <UnderWayPlate tests={underWay} next={presses?.length === 0 ? enterPress : plan} firstPress={presses?.length === 0} />
      <div className="ground-steel grid grow content-start gap-x-10 gap-y-6 px-4 py-4 tablet:px-6 desktop:grid-cols-[minmax(0,712fr)_minmax(0,480fr)]">
        <Needs needs={needs} />
        <Presses presses={presses} mayEnter={enterPress !== undefined} />
      </div>
      <Calendar calendar={calendar} />
    </div>
  )
}
