import { useEffect, useMemo, useState } from 'react'
import type { PressState } from '#shared/press/state'
import { loadPathOf } from '#shared/press/load-path'
import { mayItBeUsed, tagToTakeOff } from '#shared/press/may-it-be-used'
import { AttachmentStrip } from '../../../../components/attachments/attachment-strip'
import { ButtonLink } from '../../../../components/button'
import { drawnPress, holeInUse, jointState, looseParts } from '#shared/drawing/drawn-press'
import { PressPlate } from '../../../../components/instruments/press-plate'
import { PageHeading, Section, inset } from '../../../../components/page'
import { useFiles } from '../../../../lib/attachment-held'
import type { Placed } from '../../../../lib/attachment-places'
import { classNames } from '../../../../lib/class-names'
import { calendarDate } from '../../../../lib/dates'
import { useCan, useShop, useUser } from '../../../../lib/here'
import { bringIntoView, useAnchor } from '../../../../lib/use-anchor'
import { useTitle } from '../../../../lib/use-title'
import { paths } from '../../../../paths'
import { useAppendToPress } from '../../api/append-to-press'
import { frameWords } from '../words'
import { Actions, type OpenForm } from './actions'
import { Answer, EndsAtOnce } from './answer'
import { ChangeForm } from './change-form'
import { ClearanceFacts } from './clearance-facts'
import { gathered, History, toldUntil } from './history'
import { JointsPart } from './joints-part'
import { readKeptChange } from '../../kept-change'
import { LedgerFile } from './ledger-file'
import { LoadPathSection } from './load-path-section'
import { ofJoint, shownOf } from './press-photos'
import { RepairOpenForm } from './repair-forms'
import { pointedOut, Repairs, toExamine } from './repairs'
import { Softening } from './softening'
import { TagPlate } from './tag-plate'
import { Train } from './train'
import { useJointsMeant } from './use-joints-meant'
import { usePressWalk } from './use-press-walk'
import { useSpotting } from './use-spotting'
import { WithdrawForm } from './withdraw-form'

type PressPageProps = { state: PressState; people: Readonly<Record<string, string>>; photos?: readonly Placed[] }

const part = 'mt-6 scroll-mt-4'
const formPart = 'mt-6 border-t-2 border-ink pt-4'

/** The bed hole that the press is, or was last, cleared with. */
function holeCleared({ clearance }: PressState): number | null {
  const given = clearance.is === 'none' ? null : clearance.is === 'withdrawn' ? clearance.last : clearance.clearance
  return holeInUse(given?.bedHoles[0])
}

/** One press: may it be used, to what and until when; what it waits for, its joints, its train and what happened to it. */
export function PressPage({ state, people, photos = [] }: PressPageProps) {
  const { description } = state
  const name = description ? [description.name, description.whatFor].filter(Boolean).join(', ') : 'This press'
  useTitle(name)
  useAnchor()
  const can = useCan()
  const shop = useShop()
  const user = useUser()
  const [begun] = useState(() => (can('press:change-report') ? readKeptChange(state.id, user.id) : undefined))
  const [open, setOpen] = useState<OpenForm>(begun ? 'change' : null)
  const meant = useJointsMeant(open === 'change' || open === 'repair', begun?.jointIds)
  const append = useAppendToPress(state.id, state.headSeq, open ?? 'joint')
  const joints = state.joints.filter((joint) => !joint.retired).sort((a, b) => a.number - b.number)
  const today = calendarDate(new Date())
  const answer = mayItBeUsed(state, today)
  const tagHangs = tagToTakeOff(state, today)
  const path = loadPathOf(description?.members ?? [], joints)
  const drawn = useMemo(() => description && drawnPress(description, holeCleared(state)), [description, state])
  const loose = useMemo(() => looseParts(description, joints), [description, joints])
  const choose = (next: OpenForm) => {
    meant.clear()
    setOpen(next)
  }
  const sending = { send: append.mutate, busy: append.isPending }
  useEffect(() => {
    // The part stands higher while its form is open: whoever opened it goes along.
    if (open === 'repair') bringIntoView('repairs')
  }, [open])
  const leave = () => choose(null)
  const done = () => {
    leave()
    // What was entered may have changed the answer: that is read first.
    bringIntoView('answer')
  }
  const form = { ...sending, onDone: done, onLeave: leave }
  const files = useFiles('presses', state.id, photos.length)
  const walk = usePressWalk(state.id, description?.kind ?? 'h-frame', joints)
  const { spotting, placing } = useSpotting()
  const repairsFirst = open === 'repair' || state.repairs.some((repair) => !repair.closed || toExamine(state, repair) !== null)
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
    <div className="grid grow grid-cols-[minmax(0,1fr)] content-start desktop:grid-cols-[minmax(22rem,37.5%)_minmax(0,1fr)] desktop:grid-rows-[auto_1fr]">
      <div id="answer" tabIndex={-1} className={classNames(inset, 'pt-6 pb-4 outline-none desktop:col-start-2 desktop:px-8')}>
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
      <div className="ground-dye desktop:col-start-1 desktop:row-span-2 desktop:row-start-1 print:bg-[#fff]">
        <PressPlate
          press={drawn}
          joints={joints.map((joint) => ({
            id: joint.id,
            number: joint.number,
            name: joint.name,
            state: jointState(joint),
            place: joint.place,
          }))}
          loose={loose}
          placing={placing}
          selectedId={meant.selectedId ?? (meant.choosing ? null : (walk.walked?.toCome[0]?.id ?? null))}
          markedIds={
            meant.choosing
              ? meant.chosen
              : pointedOut(
                  state,
                  state.repairs.find((repair) => repair.id === meant.repairId && !repair.closed),
                )
          }
          onSelect={meant.tap}
        >
          {!path.closed && <p>{path.gap}</p>}
          {placing && <p role="status">Tap the cross where the joint stands.</p>}
          {meant.choosing && (
            <p role="status">{meant.chosen.length === 0 ? 'Tap the joints that are meant.' : `${meant.chosen.length} marked.`}</p>
          )}
        </PressPlate>
      </div>
      <div className={classNames(inset, 'pt-4 pb-8 desktop:col-start-2 desktop:px-8 desktop:pt-0')}>
        {repairsFirst && <div className="mb-6">{repairs}</div>}
        <div className="grid gap-x-6 gap-y-6 desktop:grid-cols-[minmax(0,500fr)_minmax(0,212fr)]">
          <div id="joints" tabIndex={-1} className="scroll-mt-4 outline-none">
            <JointsPart {...{ state, joints, walk, spotting, ...sending }} selectedId={meant.selectedId} onSelect={meant.select}>
              <AttachmentStrip className="mt-2" files={files} shown={shownOf(ofJoint(photos, meant.selectedId), state, people)} />
            </JointsPart>
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
        {!repairsFirst && <div className={part}>{repairs}</div>}
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
