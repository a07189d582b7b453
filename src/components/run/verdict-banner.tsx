import { useId } from 'react'
import type { ReactElement, Ref } from 'react'
import { Mark } from '../marks'
import { setPercent } from '../typeset'

interface VerdictBannerProps {
  decision: 'go-on' | 'wait' | 'stop'
  /** The word: "Go on", "Wait", "Stop". */
  title: string
  /** What to do, for example "Open the release valve slowly, now." */
  instruction: string
  caution?: string
  /** Takes the focus when the verdict arrives. */
  headingRef?: Ref<HTMLHeadingElement>
}

/** The verdict over its evidence: cut in, never faded. Red only for stop. */
export function VerdictBanner({ decision, title, instruction, caution, headingRef }: VerdictBannerProps): ReactElement {
  const id = useId()
  const stop = decision === 'stop'
  return (
    <section
      aria-labelledby={id}
      className={`flex items-center gap-4 px-4 py-4 tablet:min-h-[152px] tablet:py-3 tablet:gap-6 tablet:px-6 ${stop ? 'bg-stop text-on-stop' : 'ground-dye'}`}
    >
      <span className="hidden tablet:block">
        <Mark name={decision} tone={stop ? 'plate' : 'dye'} size={104} />
      </span>
      <span className="self-start tablet:hidden">
        <Mark name={decision} tone={stop ? 'plate' : 'dye'} size={56} />
      </span>
      <div className="min-w-0">
        <h2 id={id} ref={headingRef} tabIndex={-1} className="text-34 font-bold tablet:text-54 tablet:leading-[54px]">
          {title}
        </h2>
        <p className="text-20 font-semibold tablet:text-26 tablet:leading-[34px]">{setPercent(instruction)}</p>
        {caution !== undefined && <p className="mt-1 text-16 tablet:text-18">{caution}</p>}
      </div>
    </section>
  )
}
