import { withEarlier } from '#shared/chart/earlier-line'
import { recordLine } from '#shared/chart/record-line'
import { Fit } from '../../../components/fit'
import { LineChart } from '../../../components/instruments/line-chart'
import type { MarkName } from '../../../components/marks'
import { useEarlierLine } from '../../../lib/use-earlier-line'
import type { RecordView } from '../record-view'

const DECISION_MARKS = { 'go-on': 'go-on', wait: 'wait', stop: 'stop' } as const

/** A sheet of paper isn't measured anew: the drawing is fitted into its plate, and the marks stand in the table. */
const ON_PAPER =
  'print:h-[536px] print:min-h-0 print:[&_svg[aria-hidden]]:hidden print:[&_svg[role=img]]:h-[536px] print:[&_svg[role=img]]:w-full'

/** The line of one leg on its dye plate, with what was decided at each stage beside it. */
export function RecordChart({ record, leg }: { record: RecordView; leg: number }) {
  const { opened, evaluation, state } = record
  const climbs = evaluation.climbs.filter((climb) => climb.leg === leg)
  const earlier = useEarlierLine(opened, leg)
  const label = opened.legs[leg]?.label ?? ''
  if (recordLine(opened, climbs, { width: 640, height: 536 }, state) === null) {
    return (
      <div className="ground-dye flex min-h-60 items-center justify-center p-6 text-faint-scribe">
        <p>{opened.legs.length > 1 ? `${label}: no stage was read.` : 'No stage was read.'}</p>
      </div>
    )
  }
  const last = opened.protocol.content.stages.at(-1)?.percent
  const marks = (climbs[0]?.stages ?? []).flatMap(({ percent, attempt }) => {
    const decision = attempt.decided?.decision
    if (decision === undefined) return []
    const mark: MarkName = decision === 'go-on' && percent === last ? 'within' : DECISION_MARKS[decision]
    return [{ percent, mark }]
  })
  return (
    <figure className="ground-dye flex flex-col print:break-inside-avoid">
      {opened.legs.length > 1 && <figcaption className="px-6 pt-3 font-medium">{label}</figcaption>}
      <Fit
        initial={{ width: 640, height: 536 }}
        className={`w-full ${ON_PAPER} ${opened.legs.length > 1 ? 'h-[440px]' : 'h-[440px] tablet:h-[536px] wide:h-auto wide:min-h-[536px] wide:grow'}`}
      >
        {(size) => {
          const spec = recordLine(opened, climbs, size, state)
          return spec && <LineChart {...withEarlier(spec, earlier)} stageMarks={[{ percent: 0, mark: 'datum' }, ...marks]} />
        }}
      </Fit>
    </figure>
  )
}
