import { loadPathOf } from '#shared/press/load-path'
import type { PressJoint, PressState } from '#shared/press/state'
import { Mark, type MarkName } from '../../../../components/marks'

export type JointDeed = 'add' | 'describe' | 'split' | 'retire' | 'place'

type Line = { mark: MarkName; says: string }

function jointLine(deed: JointDeed, joint: PressJoint | null): Line {
  const name = joint ? `Joint ${joint.number}` : 'The joint'
  switch (deed) {
    case 'add':
      return { mark: 'undecided', says: 'The new joint is unexamined until somebody examines it. No other joint falls back.' }
    case 'describe':
      return joint?.examination
        ? { mark: 'undecided', says: `${name} falls back to unexamined: its examination was of what stood here before.` }
        : { mark: 'not-read', says: `${name} stays unexamined.` }
    case 'split':
      return { mark: 'undecided', says: `${name} is retired. Each of the new ones is unexamined until somebody examines it.` }
    case 'retire':
      return { mark: 'not-read', says: `${name} leaves the drawing and the list; what was entered of it stays. No other joint falls back.` }
    case 'place':
      return { mark: 'within', says: 'Only the drawing changes: no joint falls back.' }
  }
}

function clearanceLine(deed: JointDeed, { clearance }: PressState): Line {
  if (deed === 'place') return { mark: 'within', says: 'The clearance stands as it is.' }
  if (clearance.is !== 'cleared' && clearance.is !== 'suspended')
    return { mark: 'not-read', says: 'No clearance is in force, so none ends with it.' }
  return { mark: 'stop', says: 'The clearance ends with it. The press needs a proof test before it is used.' }
}

function pathLine(deed: JointDeed, joint: PressJoint | null, state: PressState): Line[] {
  if (deed !== 'retire' || joint === null) return []
  const left = state.joints.filter((one) => !one.retired && one.id !== joint.id)
  const path = loadPathOf(state.description?.members ?? [], left)
  return path.closed
    ? [{ mark: 'within', says: 'The load path closes without it.' }]
    : [{ mark: 'stop', says: `The load path is open without it. ${path.gap}` }]
}

/** What a deed does to examination, clearance and load path, before anybody does it. */
export function JointEffect({ state, joint, deed }: { state: PressState; joint: PressJoint | null; deed: JointDeed }) {
  const lines = [jointLine(deed, joint), clearanceLine(deed, state), ...pathLine(deed, joint, state)]
  return (
    <div className="border-2 border-ink bg-sheet px-4 py-3">
      <h4 className="text-16 font-semibold">What it does</h4>
      <ul>
        {lines.map(({ mark, says }) => (
          <li key={says} className="flex items-start gap-3 py-1 font-medium">
            <Mark name={mark} size={22} className="mt-0.5 shrink-0" />
            <span>{says}</span>
          </li>
        ))}
      </ul>
    </div>
  )
}
