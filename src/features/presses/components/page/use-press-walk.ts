import { useState } from 'react'
import type { FrameKind } from '#shared/press/model'
import { walkingOrder } from '#shared/press/places'
import type { PressJoint } from '#shared/press/state'

const KEY = 'quarterload.walk.'

function begunAt(pressId: string): string | null {
  try {
    return localStorage.getItem(KEY + pressId)
  } catch {
    return null
  }
}

function keepBegun(pressId: string, at: string | null): void {
  try {
    if (at === null) localStorage.removeItem(KEY + pressId)
    else localStorage.setItem(KEY + pressId, at)
  } catch {
    // Storage is switched off: the walk-down lasts as long as the page.
  }
}

export interface Walked {
  /** Joints examined since the walk-down began, in the order they were, with the moment. */
  order: { id: string; at: string }[]
  /** Joints that are still to come, in walking order; those that need work last. */
  toCome: PressJoint[]
}

/** How far a walk-down that began at `since` has come: it follows from the examinations alone. */
export function walkedSince(since: string, kind: FrameKind, joints: readonly PressJoint[]): Walked {
  const order = joints
    .flatMap(({ id, examination }) => (examination && examination.at >= since ? [{ id, at: examination.at }] : []))
    .sort((a, b) => (a.at === b.at ? 0 : a.at < b.at ? -1 : 1))
  const done = new Set(order.map(({ id }) => id))
  const left = walkingOrder(kind, joints).filter(({ id }) => !done.has(id))
  return { order, toCome: [...left.filter(({ makeUp }) => makeUp === 'finished'), ...left.filter(({ makeUp }) => makeUp !== 'finished')] }
}

/** A walk-down outside a test: it goes on after a reload, until it is over or somebody ends it. */
export function usePressWalk(pressId: string, kind: FrameKind, joints: readonly PressJoint[]) {
  const [since, setSince] = useState(() => begunAt(pressId))
  const set = (at: string | null): void => {
    keepBegun(pressId, at)
    setSince(at)
  }
  return {
    walked: since === null ? null : walkedSince(since, kind, joints),
    begin: () => set(new Date().toISOString()),
    end: () => set(null),
  }
}

export type PressWalk = ReturnType<typeof usePressWalk>
