import { secondsWords } from '#shared/proof-test/protocol-words'
import { Fit } from '../../../components/fit'
import { LoadLadder, type LadderStage } from '../../../components/instruments/load-ladder'
import { usePhone } from '../../../lib/use-media'

/** A hold is null while it is still to be typed. */
type Stages = readonly { percent: number; holdSeconds: number | null }[]

/** The ladder asks for each percentage once; while one is typed, two may be the same for a moment. */
function rungsOf(stages: Stages): LadderStage[] {
  const byPercent = new Map(stages.map((stage) => [stage.percent, stage]))
  const rungs = [...byPercent.values()].map(({ percent, holdSeconds }): LadderStage => ({
    percent,
    label: `${percent} %`,
    load: holdSeconds === null ? '' : 'hold',
    note: holdSeconds === null ? '' : secondsWords(holdSeconds),
    state: 'to-come',
  }))
  return [{ percent: 0, label: '0', load: 'datum', note: '', state: 'datum' }, ...rungs]
}

/** The stages of a protocol on their own scale, from the datum to the last. */
export function StageStrip({ stages }: { stages: Stages }) {
  const phone = usePhone()
  return (
    <div className="ground-dye px-2 py-4 tablet:px-4">
      <Fit initial={{ width: 760, height: 148 }} className={phone ? 'h-[100px] w-full' : 'h-[148px] w-full'}>
        {({ width }) => (
          <LoadLadder scale="strip" words={!phone} stages={rungsOf(stages)} levelPercent={null} width={width} height={phone ? 100 : 148} />
        )}
      </Fit>
      {phone && (
        <p aria-hidden="true" className="px-2 text-faint-scribe">
          held{' '}
          {rungsOf(stages)
            .flatMap((rung) => (rung.note === '' ? [] : [rung.note]))
            .join(', ')}
        </p>
      )}
    </div>
  )
}

/** The same in the line of a table: a scale with a tick at each stage, full load drawn stronger. */
export function StageTicks({ stages }: { stages: Stages }) {
  const top = Math.max(100, ...stages.map((stage) => stage.percent))
  const at = (percent: number) => 4 + (112 * percent) / top
  return (
    <svg width={120} height={20} aria-hidden="true" className="shrink-0">
      <path d={`M4 10H${at(top)}`} stroke="var(--rule)" strokeWidth={1.4} />
      <path d={stages.map(({ percent }) => `M${at(percent)} 4V16`).join('')} stroke="var(--ink)" strokeWidth={1.8} />
      <path d={`M4 10H${at(Math.min(100, top))}`} stroke="var(--ink)" strokeWidth={4} />
    </svg>
  )
}
