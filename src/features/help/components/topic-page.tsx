import { Link } from 'react-router-dom'
import { inset, PageHeading, Section } from '../../../components/page'
import { Sheet } from '../../../components/plate'
import { classNames } from '../../../lib/class-names'
import { useTitle } from '../../../lib/use-title'
import { paths } from '../../../paths'
import { Maths } from '../maths'
import type { Formula, Topic } from '../topic'
import { WorkedExample } from './worked-example'

function Formulas({ formulas }: { formulas: readonly Formula[] }) {
  return (
    <Sheet className="py-2">
      {formulas.map(({ maths, say, gives }) => (
        <div key={say} className="border-b border-hairline py-1.5 last:border-b-0">
          <p className="text-graphite">{gives}</p>
          <Maths say={say}>{maths}</Maths>
        </div>
      ))}
    </Sheet>
  )
}

function Symbols({ topic }: { topic: Topic }) {
  const head = 'border-b border-rule pb-1 text-left text-14 font-medium text-graphite'
  return (
    <table className="w-full border-collapse">
      <caption className="sr-only">What each sign stands for</caption>
      <thead>
        <tr>
          <th scope="col" className={`${head} w-16 pr-3`}>
            Sign
          </th>
          <th scope="col" className={`${head} pr-3`}>
            Stands for
          </th>
          <th scope="col" className={`${head} w-20 tablet:w-28`}>
            Unit
          </th>
        </tr>
      </thead>
      <tbody>
        {topic.symbols.map(({ sign, say, meaning, unit }) => (
          <tr key={say} className="border-b border-hairline align-baseline">
            <th scope="row" className="py-1.5 pr-3 text-left text-18 font-normal">
              <span aria-hidden="true">{sign}</span>
              <span className="sr-only">{say}</span>
            </th>
            <td className="py-1.5 pr-3">{meaning}</td>
            <td className="py-1.5 text-graphite">{unit}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}

function Plain({ sentences }: { sentences: readonly string[] }) {
  return (
    <ul className="border-t border-hairline">
      {sentences.map((sentence) => (
        <li key={sentence} className="border-b border-hairline py-2">
          {sentence}
        </li>
      ))}
    </ul>
  )
}

function UsedIn({ topic }: { topic: Topic }) {
  return (
    <ul className="border-t border-hairline">
      {topic.usedIn.map(({ where, to }) => (
        <li key={where} className="border-b border-hairline">
          {to === undefined ? (
            <span className="block py-2">{where}</span>
          ) : (
            <Link to={to} className="flex min-h-14 items-center py-2 underline underline-offset-[3px] hover:decoration-2 desktop:min-h-0">
              {where}
            </Link>
          )}
        </li>
      ))}
    </ul>
  )
}

function Cautions({ sentences }: { sentences: readonly string[] }) {
  return (
    <section aria-label="Cautions" className="border-y-2 border-ink py-3">
      <ul className="grid gap-1">
        {sentences.map((sentence) => (
          <li
            key={sentence}
            className="relative pl-[18px] before:absolute before:top-[11px] before:left-0 before:h-0.5 before:w-2.5 before:bg-ink"
          >
            {sentence}
          </li>
        ))}
      </ul>
    </section>
  )
}

const paper = classNames(inset, 'w-full max-w-4xl min-w-0 desktop:px-8')

type TopicPageProps = { topic: Topic; before: Topic | undefined; after: Topic | undefined }

/** One formula: what it answers, how it is set, drawn, worked out, where it is used and where it comes from. */
export function TopicPage({ topic, before, after }: TopicPageProps) {
  useTitle(topic.title)
  const { Drawing } = topic
  return (
    <div className="flex grow flex-col desktop:grid desktop:grid-cols-[minmax(22rem,37.5%)_minmax(0,1fr)] desktop:grid-rows-[auto_1fr]">
      <header className={classNames(paper, 'pt-4 pb-6 desktop:col-start-2')}>
        <p className="mb-1">
          <Link
            to={paths.help.href()}
            className="inline-flex items-center underline underline-offset-[3px] max-desktop:min-h-14 hover:decoration-2"
          >
            Help
          </Link>
          <span className="text-graphite">, {topic.title}</span>
        </p>
        <PageHeading>{topic.question}</PageHeading>
        <p className="mt-2 max-w-prose text-18">{topic.answer}</p>
      </header>
      <div className="ground-dye desktop:col-start-1 desktop:row-span-2 desktop:row-start-1">
        <figure className="px-4 pt-5 pb-7 tablet:px-6 desktop:sticky desktop:top-0">
          <h2 className="mb-3 text-18">{topic.drawing.title}</h2>
          <Drawing />
          <figcaption className="mt-4 border-t border-ghost pt-3 text-faint-scribe">{topic.drawing.note}</figcaption>
        </figure>
      </div>
      <div className={classNames(paper, 'grid grid-cols-1 content-start gap-7 pb-10 max-desktop:pt-6 desktop:col-start-2')}>
        {topic.cautions.length > 0 && <Cautions sentences={topic.cautions} />}
        <Section title="The formula">
          <Formulas formulas={topic.formulas} />
        </Section>
        <Symbols topic={topic} />
        <WorkedExample example={topic.example()} />
        <Section title="Where Quarterload uses it">
          <UsedIn topic={topic} />
        </Section>
        <Section title="Where it comes from">
          <Plain sentences={topic.sources} />
        </Section>
        <nav aria-label="Other pages of help" className="flex flex-wrap justify-between gap-x-6 border-t-2 border-ink pt-2">
          {[before, after].map((other, index) =>
            other === undefined ? (
              <span key={index} />
            ) : (
              <Link
                key={index}
                to={paths.helpTopic.href(other.slug)}
                rel={index === 0 ? 'prev' : 'next'}
                className="inline-flex min-h-14 items-center underline underline-offset-[3px] hover:decoration-2 desktop:min-h-12"
              >
                {index === 0 ? 'Before: ' : 'Next: '}
                {other.title}
              </Link>
            ),
          )}
        </nav>
      </div>
    </div>
  )
}
