import type { ReactElement } from 'react'
import type { JointState } from '#shared/proof-test/state'
import { ButtonLink } from '../../../components/button'
import { Mark } from '../../../components/marks'
import { useShop } from '../../../lib/here'
import { paths } from '../../../paths'
import { examinationOf, type Occasion } from '../joint-words'

/** A build that stood still for longer than the shop allows is walked down as if it were new. */
export function StoodStill({ days }: { days: number | null }): ReactElement | null {
  const { buildPauseDays } = useShop()
  if (days === null || days <= buildPauseDays) return null
  return (
    <div className="mb-3 flex gap-4 border-y-2 border-ink py-3">
      <Mark name="wait" size={28} className="mt-0.5 shrink-0" />
      <div className="min-w-0">
        <h2 className="text-20">It stood still for {days} days. Walk it down as if it were new.</h2>
        <p className="mt-1">
          The shop’s limit is {buildPauseDays} days without work. In a long pause welds are left half made and nobody remembers which, rust
          and frost get into them, and somebody may have leaned on the frame or borrowed a pin. No earlier examination counts: look at every
          joint, also those that look finished.
        </p>
      </div>
    </div>
  )
}

interface RejectedProps {
  joint: JointState
  occasion: Occasion
  pressId: string
}

/** A rejected joint opens a repair on its press; here is the way there. */
export function RejectedJoint({ joint, occasion, pressId }: RejectedProps): ReactElement | null {
  if (examinationOf(joint, occasion)?.result !== 'rejected') return null
  return (
    <div className="mt-2 flex flex-wrap items-center gap-3">
      <p>It opened a repair on the press. It is over when the joint is examined again and accepted.</p>
      <ButtonLink size="line" to={`${paths.press.href(pressId)}#repairs`}>
        See the repair
      </ButtonLink>
    </div>
  )
}
