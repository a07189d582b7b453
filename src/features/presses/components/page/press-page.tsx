import { useState } from 'react'
import type { PressState } from '#shared/press/state'
import { loadPathOf } from '#shared/press/load-path'
import { mayItBeUsed, tagToTakeOff } from '#shared/press/may-it-be-used'
import { AttachmentStrip } from '../../../../components/attachments/attachment-strip'
import { ButtonLink } from '../../../../components/button'
import { drawnPress, jointState } from '#shared/drawing/drawn-press'
import { PressPlate } from '../../../../components/instruments/press-plate'
import { PageHeading, Section, inset } from '../../../../components/page'
import { useFiles } from '../../../../lib/attachment-held'
import type { Placed } from '../../../../lib/attachment-places'
import { classNames } from '../../../../lib/class-names'
import { calendarDate } from '../../../../lib/dates'
import { useCan, useShop } from '../../../../lib/here'
import { useAnchor } from '../../../../lib/use-anchor'
import { useTitle } from '../../../../lib/use-title'
import { paths } from '../../../../paths'
import { useAppendToPress } from '../../api/append-to-press'
import { frameWords } from '../words'
import { Actions, type OpenForm } from './actions'
import { Answer, EndsAtOnce } from './answer'
import { ChangeForm } from './change-form'
import { ClearanceFacts } from './clearance-facts'
import { gathered, History, toldUntil } from './history'
import { JointActions } from './joint-actions'
import { Joints } from './joints'
import { LedgerFile } from './ledger-file'
import { LoadPathSection } from './load-path-section'
import { ofJoint, shownOf } from './press-photos'
import { RepairOpenForm } from './repair-forms'
import { pointedOut, Repairs } from './repairs'
import { Softening } from './softening'
import { TagPlate } from './tag-plate'
import { Train } from './train'
import { useJointsMeant } from './use-joints-meant'
import { WithdrawForm } from './withdraw-form'

type PressPageProps = { state: PressState; people: Readonly<Record<string, string>>; photos?: readonly Placed[] }

const part = 'mt-6 scroll-mt-4'
const formPart = 'mt-6 border-t-2 border-ink pt-4'

/** One press: may it be used, to what and until when; what it waits for, its joints, its train and what happened to it. */
export function PressPage({ state, people, photos = [] }: PressPageProps) {
  const { description } = state
  const name = description ? [description.name, description.whatFor].filter(Boolean).join(', ') : 'This press'
  useTitle(name)
  useAnchor()
  const can = useCan()
  const shop = useShop()
  const [open, setOpen] = useState<OpenForm>(null)
  const meant = useJointsMeant(open === 'change' || open === 'repair')
  const append = useAppendToPress(state.id, state.headSeq, open ?? 'joint')
  const joints = state.joints.filter((joint) => !joint.retired).sort((a, b) => a.number - b.number)
  const today = calendarDate(new Date())
  const answer = mayItBeUsed(state, today)
  const tagHangs = tagToTakeOff(state, today)
  const path = loadPathOf(description?.members ?? [], joints)
  const choose = (next: OpenForm) => {
    meant.clear()
    setOpen(next)
  }
  const sending = { send: append.mutate, busy: append.isPending }
  const form = { ...sending, onDone: () => choose(null) }
  const files = useFiles('presses', state.id, photos.length)
  const selected = joints.find((joint) => joint.id === meant.selectedId)
  const openRepairs = state.repairs.some((repair) => !repair.closed)
  const repairs = (
    <Repairs
      shown={{ state, people, photos, files }}
      pointedId={meant.repairId}
      onPoint={meant.pointAt}
      onOpen={open === null && can('press:change-report') ? () => choose('repair') : null}
      {...sending}
    >
      {open === 'repair' && (
        <div className="mt-4 border-t-2 border-ink pt-4">
          <RepairOpenForm state={state} chosen={meant.chosen} onToggle={meant.toggle} {...form} />
        </div>
      )}
    </Repairs>
  )
  return (
    <div className="grid grow content-start desktop:grid-cols-[minmax(22rem,37.5%)_minmax(0,1fr)] desktop:grid-rows-[auto_1fr]">
      <div className={classNames(inset, 'pt-6 pb-4 desktop:col-start-2 desktop:px-8')}>
        {tagHangs && can('press:tag-off') && (
          <TagPlate why={answer.answer === 'do not use' ? answer.why : ''} send={append.mutate} busy={append.isPending} />
        )}
        <PageHeading className="text-22! tablet:text-26!">May I use {name}?</PageHeading>
        <div className="mt-3 border-b border-ink pb-3">
          <Answer answer={answer} state={state} today={today} />
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
          <Actions state={state} mayUse={answer.answer === 'cleared'} tagHangs={tagHangs} open={open} onOpen={choose} />
        </div>
        {open === 'change' && (
          <Section title="Report a change" className={formPart}>
            <ChangeForm state={state} chosen={meant.chosen} onToggle={meant.toggle} {...form} />
          </Section>
        )}
        {open === 'withdraw' && (
          <Section title="Withdraw it from use" className={formPart}>
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
          selectedId={meant.selectedId}
          markedIds={
            meant.choosing
              ? meant.chosen
              : pointedOut(
                  state,
                  state.repairs.find((repair) => repair.id === meant.repairId),
                )
          }
          onSelect={meant.tap}
        >
          {!path.closed && <p>{path.gap}</p>}
          {meant.choosing && (
            <p role="status">{meant.chosen.length === 0 ? 'Tap the joints that are meant.' : `${meant.chosen.length} marked.`}</p>
          )}
        </PressPlate>
      </div>
      <div className={classNames(inset, 'pt-4 pb-8 desktop:col-start-2 desktop:px-8 desktop:pt-0')}>
        {(openRepairs || open === 'repair') && <div className="mb-6">{repairs}</div>}
        <div className="grid gap-x-6 gap-y-6 desktop:grid-cols-[minmax(0,500fr)_minmax(0,212fr)]">
          <div id="joints" tabIndex={-1} className="scroll-mt-4">
            <Section title="Joints">
              <Joints joints={joints} selectedId={meant.selectedId} onSelect={meant.select}>
                <AttachmentStrip className="mt-2" files={files} shown={shownOf(ofJoint(photos, meant.selectedId), state, people)} />
                {selected && can('press:record') && !state.underTest && (
                  <JointActions
                    key={selected.id}
                    pressId={state.id}
                    joint={selected}
                    joints={joints}
                    send={append.mutate}
                    busy={append.isPending}
                  />
                )}
                {selected && state.underTest && (
                  <p>It is walked down in {state.underTest.number}: work and examinations are entered there.</p>
                )}
              </Joints>
            </Section>
          </div>
          <Section title="What happened">
            <History events={gathered(toldUntil(state, today))} people={people} photos={photos} files={files} />
            {can('record:export') && <LedgerFile pressId={state.id} />}
          </Section>
        </div>
        {answer.answer === 'cleared' && (
          <Section title="The whole clearance" className={part}>
            <ClearanceFacts clearance={answer.clearance} forceUnit={shop.forceUnit} />
          </Section>
        )}
        {!openRepairs && open !== 'repair' && <div className={part}>{repairs}</div>}
        <Softening pressId={state.id} className={part} />
        {description && (
          <Section title="Frame and train" note={frameWords[description.kind]} className={part}>
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
