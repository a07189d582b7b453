import { previewChange, type ChangePreview } from '#shared/press/changes'
import type { PressChange } from '#shared/press/entries'
import { nameJoints } from '#shared/press/joints'
import type { PressState } from '#shared/press/state'
import { Mark, type MarkName } from '../../../../components/marks'
import { capital } from '../../../../lib/words'

type Line = { mark: MarkName; says: string }

function clearanceLine({ clearance }: PressState, { rule }: ChangePreview): Line {
  if (clearance.is !== 'cleared' && clearance.is !== 'suspended')
    return { mark: 'not-read', says: 'No clearance is in force, so none ends with it.' }
  if (rule.clearance === 'stands') return { mark: 'within', says: 'The clearance stands as it is.' }
  if (rule.clearance === 'ends')
    return { mark: 'stop', says: 'The clearance ends with it. The press needs a proof test before it is used.' }
  return clearance.is === 'cleared'
    ? { mark: 'wait', says: 'The clearance waits: the press is not used until these joints are accepted again.' }
    : { mark: 'wait', says: 'The clearance stays suspended.' }
}

function jointsLine({ touched }: ChangePreview, all: number): Line {
  if (touched.length === 0) return { mark: 'within', says: 'No joint falls back.' }
  const falls = touched.length === 1 ? 'falls back to unexamined' : 'fall back to unexamined'
  const names = nameJoints(touched.map((joint) => joint.number))
  return {
    mark: 'undecided',
    says:
      touched.length === all && all > 1
        ? `Every joint, ${names.replace('joints ', '')}, falls back to unexamined.`
        : `${capital(names)} ${falls}.`,
  }
}

type ChangeEffectProps = { state: PressState; change: PressChange['change'] | undefined; jointIds: readonly string[] }

/** What a change touches and what it does, by its numbered rule, before anybody enters it. */
export function ChangeEffect({ state, change, jointIds }: ChangeEffectProps) {
  if (change === undefined) {
    return (
      <p className="border-y border-dashed border-rule py-3 text-graphite">What it does stands here as soon as you say what happened.</p>
    )
  }
  const preview = previewChange(state, { change, jointIds: [...jointIds] })
  const all = state.joints.filter((joint) => !joint.retired).length
  return (
    <div role="status" className="border-2 border-ink bg-sheet px-4 py-3">
      <h3 className="text-18">What it does</h3>
      <ul>
        {[jointsLine(preview, all), clearanceLine(state, preview)].map(({ mark, says }) => (
          <li key={says} className="flex items-start gap-3 py-1 font-medium">
            <Mark name={mark} size={22} className="mt-0.5 shrink-0" />
            <span>{says}</span>
          </li>
        ))}
      </ul>
      <p className="mt-1 text-graphite">
        Rule {preview.rule.id}: {preview.rule.text}
      </p>
    </div>
  )
}
