import { useState } from 'react'
import type { PressDraft } from '#shared/press/entries'
import { Button } from '../../../../components/button'
import { FormError } from '../../../../components/form'
import { Mark } from '../../../../components/marks'
import { setPercent } from '../../../../components/typeset'
import { sayWhatFailed } from '../../../../lib/problem'

type TagPlateProps = {
  why: string
  busy: boolean
  send: (drafts: PressDraft[], answers: { onError: (error: unknown) => void }) => void
}

/** A paper tag says what is no longer so. It hangs until somebody says that it is off. */
export function TagPlate({ why, busy, send }: TagPlateProps) {
  const [failed, setFailed] = useState<unknown>(null)
  return (
    <section
      id="tag"
      tabIndex={-1}
      aria-labelledby="tag-title"
      className="mb-4 scroll-mt-4 border-2 border-stop-ink outline-none bg-sheet px-4 py-3 tablet:px-5"
    >
      <div className="grid items-center gap-x-6 gap-y-3 tablet:grid-cols-[minmax(0,1fr)_13rem]">
        <div className="flex items-start gap-3">
          <Mark name="stop" size={26} className="mt-0.5 shrink-0" />
          <div className="min-w-0">
            <h2 id="tag-title" className="text-20">
              Take the tag off the press
            </h2>
            <p>The paper still names a load. {setPercent(why)} Take it off, then say so here.</p>
          </div>
        </div>
        <Button
          kind="next"
          wide
          busy={busy && 'Writing it down'}
          onClick={() => send([{ kind: 'tag-taken-off', payload: { remark: '' } }], { onError: setFailed })}
        >
          The tag is off
        </Button>
      </div>
      <FormError message={failed === null ? null : sayWhatFailed(failed)} />
    </section>
  )
}
