import type { ProtocolResponse, ProtocolVersion } from '#shared/api/protocols'
import { Button, ButtonLink, TextLink } from '../../../components/button'
import { FormError } from '../../../components/form'
import { HowLinks } from '../../../components/how-link'
import { Page, Section } from '../../../components/page'
import { RuledList, RuledRow } from '../../../components/ruled-list'
import { dateAndTime } from '../../../lib/dates'
import { sayWhatFailed } from '../../../lib/problem'
import { capital } from '../../../lib/words'
import { paths, withQuery } from '../../../paths'
import { useArchiveProtocol } from '../api/archive-protocol'
import { judging, lastStageWords, stoppingLimits, timesAndSteps } from './protocol-values'
import { StageStrip } from './stage-strip'
import { ValueList } from './value-list'

function Archiving({ id, archived }: { id: string; archived: boolean }) {
  const archive = useArchiveProtocol(id)
  return (
    <Section title={archived ? 'Archived' : 'Out of the choice'}>
      <FormError message={archive.error && sayWhatFailed(archive.error)} attempt={archive.failureCount} />
      <div className="flex flex-wrap items-center justify-between gap-4 border-t border-hairline pt-3">
        <p className="min-w-0 text-graphite">
          {archived
            ? 'No new test is run by it. Tests that were stay as they are.'
            : 'No longer wanted for new tests: archive it. Tests that were run by it stay as they are.'}
        </p>
        <Button busy={archive.isPending && 'Changing it'} onClick={() => archive.mutate(!archived)}>
          {archived ? 'Bring it back' : 'Archive it'}
        </Button>
      </div>
    </Section>
  )
}

function Versions({ id, versions, shown }: { id: string; versions: readonly ProtocolVersion[]; shown: number }) {
  return (
    <Section title="Versions" note="Never edited: each test keeps the one it was opened with">
      <RuledList ordered>
        {versions.map((one, index) => (
          <RuledRow
            key={one.version}
            title={
              one.version === shown ? (
                `Version ${one.version}, shown here`
              ) : (
                <TextLink to={withQuery(paths.protocol.href(id), index === 0 ? {} : { version: String(one.version) })}>
                  Version {one.version}
                </TextLink>
              )
            }
            note={`${dateAndTime(one.createdAt)}, by ${one.createdBy}`}
            aside={index === 0 ? 'for new tests' : undefined}
          />
        ))}
      </RuledList>
    </Section>
  )
}

type ProtocolPageProps = {
  answer: ProtocolResponse
  /** The version to show; the current one when there is none of that number. */
  asked: number | undefined
  mayWrite: boolean
}

/** One protocol: its stages to scale, its legs, and every limit with where it comes from. */
export function ProtocolPage({ answer, asked, mayWrite }: ProtocolPageProps) {
  const { protocol, versions } = answer
  const older = versions.find((one) => one.version === asked && one.version !== protocol.version)
  const content = older?.content ?? protocol.content
  const version = older?.version ?? protocol.version
  const actions = mayWrite && !protocol.archived && (
    <ButtonLink kind="next" to={paths.newProtocolVersion.href(protocol.id)}>
      Write a new version
    </ButtonLink>
  )
  return (
    <Page
      title={protocol.name}
      note={older ? `version ${version}, no longer for new tests` : `version ${version}`}
      actions={actions || undefined}
    >
      <div className="grid grid-cols-1 gap-8">
        <div>
          {content.purpose !== '' && <p className="mb-4 text-18">{content.purpose}</p>}
          <StageStrip stages={content.stages} />
          {content.aboveRating && <p className="mt-3">{capital(lastStageWords(content.aboveRating))}.</p>}
        </div>
        <Section
          title={content.legs.length === 1 ? 'One leg' : `${content.legs.length} legs, in this order`}
          note="Each with its own datum, climbs and set"
        >
          <RuledList ordered>
            {content.legs.map((leg, index) => (
              <RuledRow
                key={index}
                mark={<span className="font-semibold">{index + 1}</span>}
                title={leg.label}
                aside={`ram ${leg.ramPosition}`}
                asideNote={`bed: ${leg.bed}`}
              />
            ))}
          </RuledList>
        </Section>
        <div className="grid gap-8 desktop:grid-cols-3 desktop:gap-6">
          <Section title="Stops or waits">
            <ValueList values={stoppingLimits(content)} />
            <HowLinks
              className="mt-2"
              topics={[
                ['hold', 'pressure loss and creep'],
                ['softening', 'softening'],
                ['permanent-set', 'set'],
              ]}
            />
          </Section>
          <Section title="Times and steps">
            <ValueList values={timesAndSteps(content)} />
          </Section>
          <Section title="How it is judged">
            <ValueList values={judging(content)} />
            <HowLinks
              className="mt-2"
              topics={[
                ['decision-rule', 'rule'],
                ['line', 'prediction'],
                ['clearance', 'clearance'],
              ]}
            />
            {content.aboveRatingRule !== '' && <p className="mt-3">Above rating by: {content.aboveRatingRule}.</p>}
          </Section>
        </div>
        <p className="border-2 border-rule px-4 py-3">
          The figures are an aid, not a design approval. Local law and codes come first, and a licensed engineer where they ask for one. A
          load above rating is never above the lowest rating in the train.
        </p>
        <Versions id={protocol.id} versions={versions} shown={version} />
        {mayWrite && <Archiving id={protocol.id} archived={protocol.archived} />}
      </div>
    </Page>
  )
}
