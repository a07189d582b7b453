import { useState } from 'react'

const without = (ids: readonly string[], id: string) => ids.filter((one) => one !== id)

/**
 * Which joints the page is about: the one that is looked at, those chosen for a form that is open, or those that a
 * repair concerns. A tap on the drawing does what the page asks for at the time.
 */
export function useJointsMeant(choosing: boolean, begunWith: readonly string[] = []) {
  const [selectedId, select] = useState<string | null>(null)
  const [repairId, pointAt] = useState<string | null>(null)
  const [chosen, setChosen] = useState(begunWith)
  const toggle = (id: string) => setChosen((before) => (before.includes(id) ? without(before, id) : [...before, id]))
  return {
    choosing,
    chosen,
    selectedId: choosing ? null : selectedId,
    repairId,
    select: (id: string | null) => {
      pointAt(null)
      select(id)
    },
    pointAt: (id: string | null) => {
      select(null)
      pointAt(id)
    },
    toggle,
    tap: (id: string) => {
      if (choosing) return toggle(id)
      pointAt(null)
      select(id === selectedId ? null : id)
    },
    clear: () => setChosen([]),
  }
}
