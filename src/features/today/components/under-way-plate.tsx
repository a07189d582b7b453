import { ButtonLink } from '../../../components/button'
import { Fit } from '../../../components/fit'
import { LoadLadder, type LadderStage } from '../../../components/instruments/load-ladder'
import { usePhone } from '../../../lib/use-media'

/** A test under way, as far as its ladder shows it. */
export type UnderWay = {
  id: string
  /** "Press 1, forming press". */
  press: string
  /** "Press 1, at 50 % for 1 min": the same in one line, for the phone. */
  short: string
  /** "First load by quarters, PT-0044". */
  test: string
  /** "Idris Wolcott leads, Pell Navarre witnesses". */
  people: string
  stages: LadderStage[]
  levelPercent: number | null
  /** "Watch the test", "Go on with the test". */
  action: { label: string; to: string }
}

function OneTest({ test, first }: { test: UnderWay; first: boolean }) {
  const phone = usePhone()
  return (
    <article className="flex flex-col gap-x-8 border-ghost px-4 py-3 not-first:border-t tablet:px-6 tablet:py-5 desktop:grid desktop:grid-cols-[minmax(16rem,360fr)_minmax(30rem,640fr)_auto] desktop:items-center">
      <div className="min-w-0">
        <p className="text-faint-scribe desktop:text-18">Under way now</p>
        <h2 className="text-22 tablet:mt-1 desktop:text-[1.875rem]/[2.375rem]">{phone ? test.short : test.press}</h2>
        {!phone && (
          <p className="mt-2 text-18/[28px] text-faint-scribe">
            {test.test}
            <br />
            {test.people}
          </p>
        )}
      </div>
      <Fit className="h-24 w-full tablet:mt-3 tablet:h-[140px] desktop:mt-0" initial={{ width: 600, height: 140 }}>
        {({ width, height }) => (
          <LoadLadder scale="strip" words={!phone} stages={test.stages} levelPercent={test.levelPercent} width={width} height={height} />
        )}
      </Fit>
      <ButtonLink
        to={test.action.to}
        kind={first ? 'next' : 'scribed'}
        className="mt-2 mb-1 tablet:mt-4 max-desktop:w-full desktop:mt-0 desktop:mb-0 desktop:min-h-[70px] desktop:px-8 desktop:text-20"
      >
        {test.action.label}
      </ButtonLink>
    </article>
  )
}

type Next = { label: string; to: string } | undefined

const firstWords = 'A test needs a press: enter its frame, its joints and its train.'
const planWords = 'A test begins with its plan: press, gauge, indicators, lead, pump hand and witness.'

function NoTest({ next, firstPress }: { next: Next; firstPress: boolean }) {
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-8 gap-y-4 px-4 py-5 tablet:px-6 desktop:py-8">
      <div className="min-w-0">
        <h2 className="text-22 tablet:text-34">No test is under way</h2>
        <p className="mt-1 text-faint-scribe tablet:text-18">
          {next === undefined ? 'When a lead opens one, it stands here.' : firstPress ? firstWords : planWords}
        </p>
      </div>
      {next && (
        <ButtonLink kind="next" to={next.to} className="max-tablet:w-full desktop:min-h-[70px] desktop:px-8 desktop:text-20">
          {next.label}
        </ButtonLink>
      )}
    </div>
  )
}

type UnderWayPlateProps = { tests: readonly UnderWay[] | undefined; next: Next; firstPress: boolean }

/** The dye plate at the head of Today: tests that go on now, each with its ladder. */
export function UnderWayPlate({ tests, next, firstPress }: UnderWayPlateProps) {
  return (
    <div className="ground-dye desktop:min-h-[140px]">
      {tests === undefined ? (
        <div role="status" aria-label="Being fetched" className="h-40" />
      ) : tests.length === 0 ? (
        <NoTest next={next} firstPress={firstPress} />
      ) : (
        tests.map((test, index) => <OneTest key={test.id} test={test} first={index === 0} />)
      )}
    </div>
  )
}
