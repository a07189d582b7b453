import { classNames } from '../lib/class-names'
import { inset } from './page'

/** The lines of what is coming, still: nothing turns while one waits. */
function Line({ width, className }: { width: string; className?: string }) {
  return <span className={classNames('block h-4 bg-hairline/60', className)} style={{ width }} />
}

const widths = ['34%', '52%', '41%', '60%', '38%', '47%']

/** Rows to come in a list. */
export function SkeletonRows({ rows = 6 }: { rows?: number }) {
  return (
    <div aria-hidden="true" className="border-t border-hairline">
      {Array.from({ length: rows }, (_, index) => (
        <div key={index} className="flex h-16 items-center gap-3 border-b border-hairline desktop:h-[54px]">
          <span className="size-6 shrink-0 border-2 border-dashed border-hairline" />
          <div className="grow">
            <Line width={widths[index % widths.length] ?? '40%'} />
          </div>
          <Line width="6rem" />
        </div>
      ))}
    </div>
  )
}

/** A whole screen to come, with its outline where it will stand. */
export function SkeletonPage() {
  return (
    <div role="status" aria-label="Being fetched" className={classNames(inset, 'grow pt-5')}>
      <Line width="14rem" className="mb-8 h-8" />
      <SkeletonRows rows={7} />
    </div>
  )
}
