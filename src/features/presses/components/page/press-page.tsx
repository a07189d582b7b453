import { useState } from 'react'
import type { PressState } from '#shared/press/state'
import { loadPathOf } from '#shared/press/load-path'
import { mayItBeUsed } from '#shared/press/may-it-be-used'
import { AttachmentStrip } from '../../../../components/attachments/attachment-strip'
import { Button, ButtonLink } from '../../../../components/button'
import { drawnPress, jointState } from '../../../../components/instruments/drawn-press'
import { PressPlate } from '../../../../components/instruments/press-plate'
import { PageHeading, Section, inset } from '../../../../components/page'
import { useFiles } from '../../../../lib/attachment-held'
import type { Placed } from '../../../../lib/attachment-places'
import { classNames } from '../../../../lib/class-names'
import { calendarDate } from '../../../../lib/dates'
import { useCan, useShop } from '../../../../lib/here'
import { useTitle } from '../../../../lib/use-title'
import { paths } from '../../../../paths'
import { useAppendToPress } from '../../api/append-to-press'
import { frameWords } from '../words'
import { Answer, EndsAtOnce } from './answer'
import { ChangeForm, WithdrawForm } from './change-form'
import { gathered, History } from './history'
import { JointActions } from './joint-actions'
import { Joints } from './joints'
import { LedgerFile } from './ledger-file'
import { LoadPathSection } from './load-path-section'
import { ofJoint, shownOf } from './press-photos'
import { Train } from './train'

type PressPageProps = { state: PressState; people: Readonly<Record<string, string>>; photos?: readonly Placed[] }
type Open = 'change' | 'withdraw' | null

function Actions({ state, open, onOpen }: { state: PressState; open: Open; onOpen: (open: Open) => void }) {
  const can = useCan()
  const shop = useShop()
  const cleared = state.clearance.is === 'cleared'
  const test = state.underTest
  const plan = can('proof-test:open') && !test
  return (
    <div className="grid content-start gap-2.5">
      {plan && !cleared && (
        <ButtonLink kind={open === null ? 'next' : 'plain'} wide to={paths.planProofTest.href({ shop: shop.id, press: state.id })}>
          Plan a proof test
        </ButtonLink>
      )}
      {test && (
        <ButtonLink kind="next" wide to={paths.proofTest.href(test.proofTestId)}>
          Open {test.number}
        </ButtonLink>
      )}
      {open === null && (
        <Button kind={cleared ? 'next' : 'plain'} wide onClick={() => onOpen('change')}>
          Report a change
        </Button>
      )}
      {plan && cleared && (
        <ButtonLink wide to={paths.planProofTest.href({ shop: shop.id, press: state.id })}>
          Plan a proof test
        </ButtonLink>
      )}
      {cleared && open === null && can('press:withdraw') && (
        <Button wide onClick={() => onOpen('withdraw')}>
          Withdraw it from use
        </Button>
      )}
    </div>
  )
}

/** One press: may it be used, to what and until when; its joints, its train and what happened to it. */
export function PressPage({ state, people, photos = [] }: PressPageProps) {
  const { description } = state
  const name = description ? [description.name, description.whatFor].filter(Boolean).join(', ') : 'This press'
  useTitle(name)
  const can = useCan()
  const shop = useShop()
  const [open, setOpen] = useState<Open>(null)
  const [selectedId, setSelectedId] = useState<string | null>(null)
  const append = useAppendToPress(state.id, state.headSeq, open ?? 'joint')
  const joints = state.joints.filter((joint) => !joint.retired).sort((a, b) => a.number - b.number)
  const answer = mayItBeUsed(state, calendarDate(new Date()))
  const path = loadPathOf(description?.members ?? [], joints)
  const form = { send: append.mutate, busy: append.isPending, onDone: () => setOpen(null) }
  const files = useFiles('presses', state.id, photos.length)
  const selected = joints.find((joint) => joint.id === selectedId)
  return (
    <div className="grid grow content-start desktop:grid-cols-[minmax(22rem,37.5%)_minmax(0,1fr)] desktop:grid-rows-[auto_1fr]">
      <div className={classNames(inset, 'pt-6 pb-4 desktop:col-start-2 desktop:px-8')}>
        <PageHeading className="text-22! tablet:text-26!">May I use {name}?</PageHeading>
        <div className="mt-3 border-b border-ink pb-3">
          <Answer answer={answer} rated={description?.ratedLoad} />
        </div>
        <div className="grid gap-x-8 gap-y-4 pt-3 tablet:grid-cols-[minmax(0,1fr)_19rem]">
          <div>
            {answer.answer === 'cleared' ? (
              <EndsAtOnce load={answer.clearance.load} buildPauseDays={shop.buildPauseDays} />
            ) : (
              <p className="text-graphite">
                Whoever loads it before that loads a frame that nobody answers for. Say so to whoever uses it.
              </p>
            )}
          </div>
          <Actions state={state} open={open} onOpen={setOpen} />
        </div>
        {open === 'change' && (
          <Section title="Report a change" className="mt-6 border-t-2 border-ink pt-4">
            <ChangeForm pressId={state.id} joints={joints} cleared={answer.answer === 'cleared'} {...form} />
          </Section>
        )}
        {open === 'withdraw' && (
          <Section title="Withdraw it from use" className="mt-6 border-t-2 border-ink pt-4">
            <WithdrawForm {...form} />
          </Section>
        )}
      </div>
      <div className="ground-dye desktop:col-start-1 desktop:row-span-2 desktop:row-start-1">
        <PressPlate
          press={description && drawnPress(description)}
          joints={joints.map((joint) => ({
            id: joint.id,
            number: joint.number,
            name: joint.name,
            state: jointState(joint),
            place: joint.place,
          }))}
          selectedId={selectedId}
          onSelect={(id) => setSelectedId(id === selectedId ? null : id)}
        >
          {!path.closed && <p>{path.gap}</p>}
        </PressPlate>
      </div>
      <div className={classNames(inset, 'pt-4 pb-8 desktop:col-start-2 desktop:px-8 desktop:pt-0')}>
        <div className="grid gap-x-6 gap-y-6 desktop:grid-cols-[minmax(0,500fr)_minmax(0,212fr)]">
          <Section title="Joints">
            <Joints joints={joints} selectedId={selectedId} onSelect={setSelectedId}>
              <AttachmentStrip className="mt-2" files={files} shown={shownOf(ofJoint(photos, selectedId), state, people)} />
              {selected && can('press:record') && !state.underTest && (
                <JointActions key={selected.id} pressId={state.id} joint={selected} joints={joints} send={append.mutate} busy={append.isPending} />
              )}
              {selected && state.underTest && (
                <p>It is walked down in {state.underTest.number}: work and examinations are entered there.</p>
              )}
            </Joints>
          </Section>
          <Section title="What happened">
            <History events={gathered(state.history)} people={people} photos={photos} files={files} />
            {can('record:export') && <LedgerFile pressId={state.id} />}
          </Section>
        </div>
        {description && (
          <Section title="Frame and train" note={frameWords[description.kind]} className="mt-6">
            <Train description={description} />
            <div className="mt-4 flex flex-wrap gap-3">
              {can('press:describe') && !state.underTest && (
                <ButtonLink size="line" to={paths.editPress.href(state.id)}>
                  Change what is written here
                </ButtonLink>
              )}
              <ButtonLink size="line" to={paths.proofTests.href({ shop: shop.id, press: state.id })}>
                Its proof tests
              </ButtonLink>
            </div>
          </Section>
        )}
        {description && (
          <LoadPathSection
            description={description}
            joints={joints}
            forceUnit={shop.forceUnit}
            lengthUnit={shop.lengthUnit}
            editTo={can('press:describe') && !state.underTest ? paths.editPress.href(state.id) : null}
          />
        )}
      </div>
    </div>
  )
}
