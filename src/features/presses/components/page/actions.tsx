import type { PressState } from '#shared/press/state'
import { Button, ButtonAnchor, ButtonLink } from '../../../../components/button'
import { useCan, useShop } from '../../../../lib/here'
import { paths } from '../../../../paths'

export type OpenForm = 'change' | 'withdraw' | 'repair' | null

type Next = 'tag' | 'test' | 'repair' | 'joints' | 'plan' | 'change'

const openRepair = (state: PressState) => state.repairs.find((repair) => !repair.closed && repair.from !== 'joint')

/** The one thing to do next: its button is chalk, the others wait. */
function nextOf(state: PressState, tagHangs: boolean, mayUse: boolean): Next {
  if (tagHangs) return 'tag'
  if (state.underTest) return 'test'
  if (openRepair(state)) return 'repair'
  if (state.clearance.is === 'suspended' && state.clearance.until === 'the joints are accepted') return 'joints'
  return mayUse ? 'change' : 'plan'
}

type ActionsProps = {
  state: PressState
  /** Whether it may be used today: what is due is a change, not a test. */
  mayUse: boolean
  tagHangs: boolean
  open: OpenForm
  onOpen: (open: OpenForm) => void
}

function PlanButton({ state, chalk }: { state: PressState; chalk: boolean }) {
  const shop = useShop()
  const repeats = state.toRepeat
  const repair = openRepair(state)
  if (repair) {
    return (
      <Button wide disabled note="the repair is closed first">
        {repeats ? `Plan the test that repeats ${repeats.number}` : 'Plan a proof test'}
      </Button>
    )
  }
  return (
    <ButtonLink
      kind={chalk ? 'next' : 'plain'}
      wide
      to={paths.planProofTest.href({ shop: shop.id, press: state.id, repeats: repeats?.proofTestId })}
    >
      {repeats ? `Plan the test that repeats ${repeats.number}` : 'Plan a proof test'}
    </ButtonLink>
  )
}

/** What may be done with a press now, the next thing first. */
export function Actions({ state, mayUse, tagHangs, open, onOpen }: ActionsProps) {
  const can = useCan()
  const test = state.underTest
  const next = open === null ? nextOf(state, tagHangs, mayUse) : null
  const holds = state.clearance.is === 'cleared' || state.clearance.is === 'suspended'
  const plan = can('proof-test:open') && !test
  return (
    <div className="grid content-start gap-2.5">
      {test && (
        <ButtonLink kind={next === 'test' ? 'next' : 'plain'} wide to={paths.proofTest.href(test.proofTestId)}>
          Open {test.number}
        </ButtonLink>
      )}
      {next === 'repair' && (
        <ButtonAnchor kind="next" wide href="#repairs">
          To the open repair
        </ButtonAnchor>
      )}
      {next === 'joints' && (
        <ButtonAnchor kind={can('press:record') ? 'next' : 'plain'} wide href="#joints">
          To the joints
        </ButtonAnchor>
      )}
      {plan && !mayUse && <PlanButton state={state} chalk={next === 'plan'} />}
      {open === null && can('press:change-report') && (
        <Button kind={next === 'change' || (next === 'plan' && !plan) ? 'next' : 'plain'} wide onClick={() => onOpen('change')}>
          Report a change
        </Button>
      )}
      <ButtonLink wide to={paths.pressTag.href(state.id)}>
        {mayUse ? 'Print the tag' : 'Print a do-not-use tag'}
      </ButtonLink>
      {plan && mayUse && <PlanButton state={state} chalk={false} />}
      {holds && !test && open === null && can('press:withdraw') && (
        <Button wide onClick={() => onOpen('withdraw')}>
          Withdraw it from use
        </Button>
      )}
    </div>
  )
}
