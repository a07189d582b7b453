import { headlineOf } from '#shared/proof-test/record'
import { courseText, resultLines, standingMark } from '#shared/proof-test/record-words'
import { Mark } from '../../../components/marks'
import { PageHeading } from '../../../components/page'
import { LOCAL_DATES, longDate } from '../../../lib/dates'
import type { RecordView } from '../record-view'

/** Whose record this is: the shop, the number, the press and the day. */
export function RecordHead({ record }: { record: RecordView }) {
  const { opened, state } = record
  const day = state.conclusion?.at ?? state.openedAt
  return (
    <header className="border-b-2 border-ink pb-3">
      <div className="flex flex-wrap justify-between gap-x-6 text-graphite">
        <p>Record of a proof test</p>
        <p>{opened.shop.name}</p>
      </div>
      <div className="mt-1 flex flex-wrap items-baseline justify-between gap-x-8">
        <PageHeading className="desktop:text-46">
          {opened.number}
          {'\u2002'}
          <span>
            {opened.press.name}
            {opened.press.whatFor && `, ${opened.press.whatFor}`}
          </span>
        </PageHeading>
        {day !== null && <p className="text-20 font-medium">{longDate(day)}</p>}
      </div>
    </header>
  )
}

/** What it came to, in one line that can be read from across the room, and what it rests on. */
export function RecordResult({ record }: { record: RecordView }) {
  const { state, evaluation, standing, broken } = record
  const headline = headlineOf(state, evaluation)
  const isRed = broken !== null || standing === 'rejected' || standing === 'stopped'
  return (
    <section aria-label="Result" className="flex items-start gap-4 border-b border-hairline py-4 tablet:gap-6">
      <Mark
        name={broken === null ? standingMark(standing) : 'stop'}
        size={64}
        className="hidden shrink-0 tablet:block desktop:h-24 desktop:w-24"
      />
      <div className="min-w-0">
        <p className={`text-26 font-semibold tablet:text-34 desktop:text-46 ${isRed ? 'text-stop-ink' : 'text-ink'}`} data-part="headline">
          {broken === null ? headline : <del className="decoration-2">{headline}</del>}
        </p>
        {(broken === null
          ? resultLines(record, LOCAL_DATES)
          : ['This is worked out from entries that were altered: don’t load the press by it.']
        )
          .filter((line) => line !== '')
          .map((line) => (
            <p key={line} className="mt-0.5 text-18">
              {line}
            </p>
          ))}
      </div>
    </section>
  )
}

/** Under which plan, in how many legs, and when. */
export function RecordCourse({ record }: { record: RecordView }) {
  const { state } = record
  const zone = new Intl.DateTimeFormat('en-GB', { timeZoneName: 'short' }).formatToParts(new Date(state.openedAt ?? 0))
  const zoneName = zone.find((part) => part.type === 'timeZoneName')?.value ?? ''
  return (
    <p className="py-3">
      {courseText(record, LOCAL_DATES)} Times are {zoneName}.
    </p>
  )
}
