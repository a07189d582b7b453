import type { ReactNode } from 'react'
import { classNames } from '../lib/class-names'
import { useTitle } from '../lib/use-title'
import { Mark, type MarkName } from './marks'
import { PageHeading, inset } from './page'

type PlainScreenProps = {
  mark?: MarkName
  /** What is so. */
  title: string
  /** What to do. */
  children: ReactNode
  actions?: ReactNode
}

/** One statement and the way on: for what can't be shown. */
export function PlainScreen({ mark = 'not-read', title, children, actions }: PlainScreenProps) {
  useTitle(title)
  return (
    <div className={classNames(inset, 'ground-steel grow py-8 desktop:py-16')}>
      <div className="mx-auto max-w-2xl border-t-2 border-ink pt-6">
        <div className="flex items-start gap-4">
          <span className="mt-1 tablet:mt-2">
            <Mark name={mark} size={28} />
          </span>
          <div className="min-w-0">
            <PageHeading>{title}</PageHeading>
            <div className="mt-2 text-18">{children}</div>
            {actions !== undefined && <div className="mt-6 flex flex-wrap gap-3">{actions}</div>}
          </div>
        </div>
      </div>
    </div>
  )
}
