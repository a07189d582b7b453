import type { ToolingRow } from '#shared/api/tooling'
import { typedWords } from '#shared/instruments/words'
import type { PressDescription, TrainPart } from '#shared/press/model'
import { carriesLess } from '#shared/press/ratings'
import type { Opened } from '#shared/proof-test/entries'
import { formatForce, toSI } from '#shared/units'
import type { PlanRegisters } from './api/get-plan-registers'

const chosen = (ids: readonly string[], { tooling }: PlanRegisters): ToolingRow[] =>
  ids.flatMap((id) => tooling.find((piece) => piece.id === id) ?? [])

/** A press as the test would freeze it: the pieces that were chosen join its train, as the server adds them. */
export function withTooling(press: PressDescription, ids: readonly string[], registers: PlanRegisters): PressDescription {
  const pieces = chosen(ids, registers).map(({ id, details }): TrainPart => ({
    id,
    kind: 'tooling',
    name: `${details.code} ${details.name}`.slice(0, 80),
    ratedForce: details.ratedLoad,
    ratedPressure: null,
  }))
  return pieces.length === 0 ? press : { ...press, train: [...press.train, ...pieces] }
}

/** Sentences by id, of the chosen pieces that carry less than the highest load of the test. */
export function tooWeak(ids: readonly string[], registers: PlanRegisters, opened: Opened | null): ReadonlyMap<string, string> {
  const said = new Map<string, string>()
  if (!opened) return said
  const highest = Math.max(100, ...opened.protocol.content.stages.map(({ percent }) => percent))
  const force = (highest / 100) * toSI(opened.press.ratedLoad)
  for (const { id, details } of chosen(ids, registers)) {
    if (!carriesLess(toSI(details.ratedLoad), force)) continue
    const { unit } = opened.press.ratedLoad
    said.set(
      id,
      `${details.code} carries no more than ${typedWords(details.ratedLoad)}, and this test goes to ${formatForce(force, unit)}. Choose a stronger piece.`,
    )
  }
  return said
}
