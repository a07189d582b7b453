import { useId, useState, type ReactNode, type Ref } from 'react'
import { Button } from '../../../../../components/button'

type FoldedProps = {
  /** Of what: "Head beam", "joint 3". */
  of: string
  given: boolean
  wrong: boolean
  /** What the button says while nothing is entered. */
  give: string
  /** What is known so far, in a few words. */
  summary: string
  onGive: () => void
  onTakeOut: () => void
  ref?: Ref<HTMLButtonElement>
  children: ReactNode
}

/** What the load path check asks of a member or joint, folded away until somebody wants it. */
export function FoldedStrength({ of, given, wrong, give, summary, onGive, onTakeOut, ref, children }: FoldedProps) {
  const id = useId()
  const [unfolded, setUnfolded] = useState(false)
  const open = given && (unfolded || wrong)
  return (
    <div className="pt-1 pb-3">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button
          ref={ref}
          size="line"
          aria-expanded={open}
          aria-controls={open ? id : undefined}
          aria-label={given ? `${open ? 'Fold away' : 'Show'} the strength of ${of}` : `${give}: ${of}`}
          onClick={() => {
            if (!given) onGive()
            setUnfolded(!open)
          }}
        >
          {!given ? give : open ? 'Fold away' : 'For the load path check'}
        </Button>
        <p className="text-graphite">{given ? summary : 'Only for the load path check; may be left out.'}</p>
      </div>
      {open && (
        <fieldset id={id} className="mt-3 border-l-4 border-rule pl-4">
          <legend className="sr-only">For the load path check: {of}</legend>
          <div className="grid grid-cols-1 items-start gap-4 tablet:grid-cols-2">{children}</div>
          <Button
            size="line"
            className="mt-4"
            onClick={() => {
              setUnfolded(false)
              onTakeOut()
            }}
          >
            Leave it unchecked
          </Button>
        </fieldset>
      )}
    </div>
  )
}
