import { createContext, useContext, useLayoutEffect, useMemo, useState, type ReactElement, type ReactNode } from 'react'
import { createPortal } from 'react-dom'

export type SlotName = 'over' | 'bench' | 'action' | 'note' | 'pause' | 'aside'

interface Slots {
  places: Partial<Record<SlotName, HTMLElement | null>>
  put: (name: SlotName, element: HTMLElement | null) => void
  fill: (name: SlotName, by: 1 | -1) => void
}

const SlotsContext = createContext<Slots | null>(null)

function useSlots(): Slots {
  const slots = useContext(SlotsContext)
  if (slots === null) throw new Error('A part of a step is drawn outside the run.')
  return slots
}

interface FrameParts {
  over: ReactNode
  bench: ReactNode
  /** Left out while no step asks for it. */
  action: ReactNode | undefined
  note: ReactNode | undefined
  pause: ReactNode | undefined
  aside: ReactNode | undefined
}

/**
 * Steps come and go while the frame and its Stop stay the same elements: a finger that lies on Stop while a
 * step changes still presses it. So each step draws into places of the frame.
 */
export function SlotFrame({ frame, children }: { frame: (parts: FrameParts) => ReactNode; children: ReactNode }): ReactElement {
  const [places, setPlaces] = useState<Slots['places']>({})
  const [filled, setFilled] = useState<Partial<Record<SlotName, number>>>({})
  const slots = useMemo<Slots>(
    () => ({
      places,
      put: (name, element) => setPlaces((known) => (known[name] === element ? known : { ...known, [name]: element })),
      fill: (name, by) => setFilled((known) => ({ ...known, [name]: (known[name] ?? 0) + by })),
    }),
    [places],
  )
  const place = (name: SlotName): ReactNode | undefined => ((filled[name] ?? 0) > 0 ? <Place name={name} /> : undefined)
  return (
    <SlotsContext value={slots}>
      {frame({
        over: <Place name="over" />,
        bench: <Place name="bench" />,
        action: place('action'),
        note: place('note'),
        pause: place('pause'),
        aside: place('aside'),
      })}
      {children}
    </SlotsContext>
  )
}

function Place({ name }: { name: SlotName }): ReactElement {
  const { put } = useSlots()
  const [bind] = useState(() => (element: HTMLElement | null) => put(name, element))
  return <div ref={bind} className="contents" />
}

/** Draws its children at a place of the frame. */
export function Into({ slot, children }: { slot: SlotName; children: ReactNode }): ReactNode {
  const { places, fill } = useSlots()
  const [tell] = useState(() => fill)
  useLayoutEffect(() => {
    tell(slot, 1)
    return () => tell(slot, -1)
  }, [tell, slot])
  const place = places[slot]
  return place ? createPortal(children, place) : null
}
