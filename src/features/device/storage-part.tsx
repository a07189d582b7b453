import { useEffect, useState, type ReactElement } from 'react'
import { Button } from '../../components/button'
import { Mark, type MarkName } from '../../components/marks'
import { Section } from '../../components/page'
import { askToKeep, readStorageState, sayBytes, type StorageState } from '../../lib/storage-persistence'

const SAYS: Record<StorageState['keeping'], { mark: MarkName; is: string; do: string }> = {
  kept: {
    mark: 'within',
    is: 'Kept for good',
    do: 'The browser clears nothing of Quarterload by itself, only when somebody clears this site’s data.',
  },
  'may-clear': {
    mark: 'undecided',
    is: 'The browser may clear it',
    do: 'When this device runs short of room, the browser may delete what has not been sent. Ask it to keep it. If it goes on refusing: put Quarterload on the home screen or among the bookmarks, then ask again. Until then send often, and keep room free.',
  },
  unknown: {
    mark: 'not-read',
    is: 'The browser does not say',
    do: 'It may delete what has not been sent when this device runs short of room. Send often, keep room free, or use another browser for tests.',
  },
}

/** Whether the browser keeps what is stored here, how much that is, and how much more there is room for. */
export function StoragePart(): ReactElement {
  const [state, setState] = useState<StorageState | null>(null)
  const [asked, setAsked] = useState(false)
  useEffect(() => {
    let here = true
    void readStorageState().then((read) => here && setState(read))
    return () => {
      here = false
    }
  }, [])
  const ask = (): void => {
    void askToKeep().then((answer) => {
      setState(answer)
      setAsked(true)
    })
  }
  const words = state && SAYS[state.keeping]
  return (
    <Section title="Storage of this browser">
      {words && (
        <div className="border-t border-hairline pt-3">
          <p className="flex items-center gap-3 text-18 font-semibold">
            <Mark name={words.mark} size={22} /> {words.is}
          </p>
          <p className="mt-1">{words.do}</p>
          {state.used !== null && state.room !== null && (
            <p className="mt-1 text-graphite">
              About {sayBytes(state.used)} stored, room for about {sayBytes(state.room)} more, as the browser estimates it.
            </p>
          )}
          {state.keeping === 'may-clear' && (
            <Button className="mt-3" onClick={ask}>
              Ask the browser to keep it
            </Button>
          )}
          <p aria-live="polite" className="mt-2">
            {asked && (state.keeping === 'kept' ? 'The browser keeps it from now on.' : 'The browser refused for now.')}
          </p>
        </div>
      )}
    </Section>
  )
}
