import { useEffect, useState, type ReactNode } from 'react'
import { SkeletonRows } from '../../../components/skeleton'
import { isNotFound } from '../../../lib/problem'
import { useTitle } from '../../../lib/use-title'
import { ASK_EVERY_MS, usePublicTag } from '../api/get-tag'
import { pressWords } from '../tag-words'
import { CannotTell, PublicTagView, UnknownTag } from './public-tag'

/** After this long without an answer, whatever was answered is too old to stand on a screen. */
const TOO_OLD_MS = 2 * ASK_EVERY_MS

/** The time now, by the second, so that an answer that grows old is taken down without anybody touching the phone. */
function useNow(): number {
  const [now, setNow] = useState(() => Date.now())
  useEffect(() => {
    const timer = setInterval(() => setNow(Date.now()), 1000)
    return () => clearInterval(timer)
  }, [])
  return now
}

/** Keeps the page out of search engines: a code is for whoever stands at the press. */
function useNotIndexed(): void {
  useEffect(() => {
    const meta = document.createElement('meta')
    meta.name = 'robots'
    meta.content = 'noindex, nofollow'
    document.head.append(meta)
    return () => meta.remove()
  }, [])
}

/** What the code of a press's tag leads to. Nobody signs in for it. */
export function PublicTagPage({ code, head }: { code: string; head: (shopName: string | null) => ReactNode }) {
  useNotIndexed()
  const { data, error, dataUpdatedAt, isFetching, refetch } = usePublicTag(code)
  const now = useNow()
  const unknown = isNotFound(error)
  const tooOld = data !== undefined && now - dataUpdatedAt > TOO_OLD_MS
  const dark = !unknown && (error !== null || tooOld)
  useTitle(data && !unknown ? pressWords(data) : 'Tag of a press')
  return (
    <div className="ground-steel flex min-h-dvh flex-col print:bg-[#fff]!">
      {head(data && !unknown ? data.shopName : null)}
      <main className="grow">
        {unknown ? (
          <UnknownTag />
        ) : dark ? (
          <CannotTell asking={isFetching} onAgain={() => void refetch()} />
        ) : data ? (
          <PublicTagView tag={data} />
        ) : (
          <div className="p-6">
            <SkeletonRows />
          </div>
        )}
      </main>
    </div>
  )
}
