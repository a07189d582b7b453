import type { ReactNode } from 'react'
import { Link } from 'react-router-dom'
import { classNames } from '../lib/class-names'
import type { HelpTopic } from '../lib/help-topics'
import { paths } from '../paths'

const line = 'inline-flex items-center underline underline-offset-[3px] max-desktop:min-h-14 hover:decoration-2'

type WayProps = { topic: HelpTopic; beside: boolean; className: string; children: ReactNode }

/** Beside a half-filled form the page opens in a tab of its own, so that nothing typed is lost. */
function Way({ topic, beside, className, children }: WayProps) {
  const to = paths.helpTopic.href(topic)
  if (!beside) {
    return (
      <Link to={to} className={classNames(line, className)}>
        {children}
      </Link>
    )
  }
  return (
    <a href={to} target="_blank" rel="noopener" className={classNames(line, className)}>
      {children}
      <span className="sr-only">, in a tab of its own</span>
    </a>
  )
}

type HowLinkProps = {
  topic: HelpTopic
  /** Whose figure it is, where several such links stand on one screen: read out after the link's words. */
  of: string
  /** Whether a form is being filled in. */
  beside?: boolean
  className?: string
}

/** The way from a figure that may puzzle to the page that works it out. Never shown under load. */
export function HowLink({ topic, of, beside = false, className }: HowLinkProps) {
  return (
    <Way topic={topic} beside={beside} className={classNames('text-16 print:hidden desktop:text-14', className)}>
      How it is worked out
      <span className="sr-only">: {of}</span>
    </Way>
  )
}

type HowLinksProps = {
  /** A page each, with the words of the figure it is about. */
  topics: readonly (readonly [topic: HelpTopic, figure: string])[]
  beside?: boolean
  className?: string
}

/** The same for a table of several figures: one line of links. */
export function HowLinks({ topics, beside = false, className }: HowLinksProps) {
  return (
    <p className={classNames('flex flex-wrap items-center gap-x-3 text-16 text-graphite print:hidden desktop:text-14', className)}>
      How it is worked out:
      {topics.map(([topic, figure]) => (
        <Way key={topic} topic={topic} beside={beside} className="text-ink">
          {figure}
        </Way>
      ))}
    </p>
  )
}
