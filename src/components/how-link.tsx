import { Link } from 'react-router-dom'
import { classNames } from '../lib/class-names'
import type { HelpTopic } from '../lib/help-topics'
import { paths } from '../paths'

type HowLinkProps = {
  topic: HelpTopic
  /** Whose figure it is, where several such links stand on one screen: read out after the link's words. */
  of: string
  /** Beside a half-filled form: opens beside it, so that nothing typed is lost. */
  beside?: boolean
  className?: string
}

/** The way from a figure that may puzzle to the page that works it out. Never shown under load. */
export function HowLink({ topic, of, beside = false, className }: HowLinkProps) {
  return (
    <Link
      to={paths.helpTopic.href(topic)}
      {...(beside ? { target: '_blank', rel: 'noopener' } : {})}
      className={classNames(
        'inline-flex items-center text-16 underline underline-offset-[3px] max-desktop:min-h-14 hover:decoration-2 desktop:text-14',
        className,
      )}
    >
      How it is worked out
      <span className="sr-only">
        : {of}
        {beside && ', in a tab of its own'}
      </span>
    </Link>
  )
}
