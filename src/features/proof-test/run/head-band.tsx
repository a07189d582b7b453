import { useEffect, useRef, type ReactElement, type ReactNode } from 'react'
import type { Step } from '#shared/proof-test/steps'
import { useRunShape } from '../../../components/run/run-frame'
import { setPercent } from '../../../components/typeset'
import { Into } from './slots'

const PHASES = ['Walk-down', 'Set-up', 'Seating', 'Datum', 'Climb', 'Set', 'Look again', 'Conclusion'] as const
type Phase = (typeof PHASES)[number]

const PHASE_OF: Record<Step['name'], Phase> = {
  'walk-down': 'Walk-down',
  'set-up': 'Set-up',
  'begin-leg': 'Seating',
  seating: 'Seating',
  'seating-release': 'Seating',
  datum: 'Datum',
  'datum-watch': 'Datum',
  'begin-stage': 'Climb',
  'read-row': 'Climb',
  hold: 'Climb',
  wait: 'Climb',
  'stop-now': 'Climb',
  independent: 'Climb',
  decide: 'Climb',
  release: 'Climb',
  recovery: 'Set',
  'stopped-release': 'Climb',
  'after-walk-down': 'Look again',
  conclude: 'Conclusion',
  sign: 'Conclusion',
  countersign: 'Conclusion',
  sealed: 'Conclusion',
}

/** The steps of a test in their order, with the one at hand marked by shape and weight. */
export function StepTrail({ step, shown = true }: { step: Step; shown?: boolean }): ReactElement {
  const now = PHASES.indexOf(PHASE_OF[step.name])
  return (
    <ol aria-label="Steps of the test" className={shown ? 'mt-2 hidden gap-x-4 font-condensed text-16 tablet:flex' : 'sr-only'}>
      {PHASES.map((phase, index) => (
        <li
          key={phase}
          aria-current={index === now ? 'step' : undefined}
          className={
            index === now
              ? 'border-t-3 border-chalk pt-[3px] font-semibold text-chalk'
              : `border-t pt-[5px] ${index < now ? 'border-scribe text-scribe' : 'border-ghost text-faint-scribe'}`
          }
        >
          {phase}
        </li>
      ))}
    </ol>
  )
}

interface HeadBandProps {
  step: Step
  title: string
  /** Changes when the heading is to take the focus again. */
  focusKey?: string
  /** Lower, over a row that needs the height: the steps are then told, not shown. */
  low?: boolean
  children?: ReactNode
}

/** The heading of a step, on dye over the bench. It takes the focus when the step comes. */
export function HeadBand({ step, title, focusKey, low = false, children }: HeadBandProps): ReactElement {
  const heading = useRef<HTMLHeadingElement>(null)
  const compact = useRunShape() === 'portrait' || low
  useEffect(() => heading.current?.focus({ preventScroll: true }), [focusKey])
  return (
    <Into slot="over">
      <div className={`ground-dye shrink-0 px-4 ${compact ? 'py-[9px]' : 'py-3'}`}>
        <h1 ref={heading} tabIndex={-1} className={compact ? 'text-26' : 'text-26 tablet:text-34'}>
          {setPercent(title)}
        </h1>
        {children !== undefined && <p className="text-18 text-faint-scribe">{children}</p>}
        <StepTrail step={step} shown={!compact} />
      </div>
    </Into>
  )
}

/** The part of the bench that scrolls when there is more than the tablet has room for. */
export function BenchScroll({ children }: { children: ReactNode }): ReactElement {
  return (
    <Into slot="bench">
      <div className="-mx-4 min-h-0 flex-1 overflow-y-auto px-4 pt-3 pb-1">{children}</div>
    </Into>
  )
}
