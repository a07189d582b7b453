import type { ReactNode } from 'react'
import type { PublicTag } from '#shared/api/tags'
import { Mark, type MarkName } from '../../../components/marks'
import { PageHeading, inset } from '../../../components/page'
import { classNames } from '../../../lib/class-names'
import { clockTime, longDate } from '../../../lib/dates'
import { pressWords, shutWords, tagWords, type TagClearance } from '../tag-words'

const column = classNames(inset, 'mx-auto w-full max-w-[880px]')

type PlateProps = { mark: MarkName; name: string; said: ReactNode; tone: 'dye' | 'stop'; children?: ReactNode }

/** The answer, large enough to be read at arm's length, before anything else. */
function AnswerPlate({ mark, name, said, tone, children }: PlateProps) {
  return (
    <div className={classNames(tone === 'dye' ? 'ground-dye' : 'bg-stop text-on-stop', 'print:bg-[#fff]! print:text-[#000]!')}>
      <div className={classNames(column, 'py-6 tablet:py-8')}>
        <p className="text-18 font-semibold tablet:text-20">{name}</p>
        <div className="mt-3 flex items-center gap-4 tablet:gap-6">
          <Mark
            name={mark}
            size={72}
            tone={tone === 'dye' ? 'dye' : 'plate'}
            className="size-14 shrink-0 tablet:size-[72px] print:hidden"
          />
          {said}
        </div>
        {children}
      </div>
    </div>
  )
}

function Facts({ facts }: { facts: readonly (readonly [name: string, value: ReactNode])[] }) {
  return (
    <dl className="grid gap-x-8 tablet:grid-cols-2">
      {facts.map(([name, value]) => (
        <div key={name} className="border-b border-hairline py-2.5">
          <dt className="text-graphite">{name}</dt>
          <dd className="text-20 font-semibold">{value}</dd>
        </div>
      ))}
    </dl>
  )
}

function Cleared({ tag, clearance }: { tag: PublicTag; clearance: TagClearance }) {
  const words = tagWords(clearance, tag.noChangeSince, 'all')
  const [where, tooling, ...print] = words.smallPrint
  return (
    <>
      <AnswerPlate
        mark="within"
        tone="dye"
        name={pressWords(tag)}
        said={
          <PageHeading className="leading-none!">
            <span className="block text-22 font-semibold tablet:text-26">Cleared up to</span>
            <span className="mt-1 flex flex-wrap items-center gap-x-4 gap-y-1">
              <span className="text-76 leading-[0.95] font-semibold tracking-tight tablet:text-104">{words.load}</span>{' '}
              <span className="w-min text-26/[30px] font-semibold tablet:text-34/[37px]">{words.unit}</span>
            </span>
          </PageHeading>
        }
      >
        {words.loadNote !== '' && <p className="mt-2 text-18">{words.loadNote}.</p>}
        <p className="mt-1 text-22 font-semibold tablet:text-26">Until {words.until}</p>
      </AnswerPlate>
      <div className={classNames(column, 'py-5')}>
        <Facts
          facts={[
            [words.gaugeLabel, words.gaugeLimit],
            ['Where', where?.lead],
            ['Tooling', clearance.tooling.length > 0 ? tooling?.rest : 'Any that is rated for the load.'],
            ['Test', clearance.protocol ? `${clearance.number}, ${clearance.protocol}` : clearance.number],
          ]}
        />
        <p className="mt-4 text-18 font-medium">{words.clearedBy}</p>
        <p className="text-18">{words.changes}</p>
        <div className="mt-5 grid gap-2.5 border-2 border-ink px-4 py-3">
          <p>{where?.rest}</p>
          {print.map(({ lead, rest }) => (
            <p key={`${lead}${rest}`}>
              {lead !== '' && <strong className="font-semibold">{lead} </strong>}
              {rest}
            </p>
          ))}
        </div>
      </div>
    </>
  )
}

function Shut({ tag, answer }: { tag: PublicTag; answer: Exclude<PublicTag['answer'], { is: 'cleared' }> }) {
  const { why, since } = shutWords(answer)
  return (
    <>
      <AnswerPlate
        mark="stop"
        tone="stop"
        name={pressWords(tag)}
        said={<PageHeading className="text-46! leading-none! font-bold tablet:text-76!">DO NOT USE</PageHeading>}
      >
        <p className="mt-4 text-20 font-semibold tablet:text-22">{why}</p>
        {since !== null && <p className="text-18">Since {since}.</p>}
      </AnswerPlate>
      <div className={classNames(column, 'py-5 text-18')}>
        <p>A paper on the press that says otherwise no longer holds. Take it off, and tell whoever looks after the press.</p>
        <p className="mt-2 text-graphite">Whoever loads it loads a frame that nobody answers for.</p>
      </div>
    </>
  )
}

/** Nothing stale is shown: without an answer, the press counts as not cleared. */
export function CannotTell({ asking, onAgain }: { asking: boolean; onAgain: () => void }) {
  return (
    <>
      <div role="alert" className="bg-stop text-on-stop print:bg-[#fff]! print:text-[#000]!">
        <div className={classNames(column, 'py-6 tablet:py-8')}>
          <div className="flex items-center gap-4 tablet:gap-6">
            <Mark name="not-connected" size={72} tone="plate" className="size-14 shrink-0 tablet:size-[72px]" />
            <PageHeading className="text-34! tablet:text-46!">Can’t tell now: treat it as not cleared</PageHeading>
          </div>
        </div>
      </div>
      <div className={classNames(column, 'py-5 text-18')}>
        <p>
          This phone does not reach the shop’s server. A clearance may have ended since anything was last read here, so nothing older is
          shown.
        </p>
        <button
          type="button"
          onClick={onAgain}
          className="mt-4 min-h-14 rounded-key border-2 border-on-chalk bg-chalk px-6 font-semibold text-on-chalk print:hidden"
        >
          {asking ? 'Asking' : 'Ask again'}
        </button>
      </div>
    </>
  )
}

/** A code that nobody gave out. */
export function UnknownTag() {
  return (
    <div className={classNames(column, 'py-8')}>
      <div className="flex items-start gap-4 border-t-2 border-ink pt-6">
        <Mark name="not-read" size={36} className="mt-1 shrink-0" />
        <div>
          <PageHeading>No press has this code</PageHeading>
          <p className="mt-2 text-18">
            It was not given out here, or a letter of it was read wrongly. Treat the press as not cleared, and ask whoever looks after it.
          </p>
        </div>
      </div>
    </div>
  )
}

/** What a press's tag says at this moment, in one look. */
export function PublicTagView({ tag }: { tag: PublicTag }) {
  const { answer } = tag
  return (
    <>
      {answer.is === 'cleared' ? <Cleared tag={tag} clearance={answer.clearance} /> : <Shut tag={tag} answer={answer} />}
      <p role="status" className={classNames(column, 'pb-8 text-graphite')}>
        As of {clockTime(tag.asOf, { seconds: true })} on {longDate(tag.asOf)}.
        <span className="print:hidden"> Asked again every 30 seconds while this page is open.</span>
      </p>
    </>
  )
}
