import type { ReactElement } from 'react'
import type { InstrumentDetails } from '#shared/instruments/model'
import { accuracyWords, errorLimitWords, instrumentWords, scaleEnd, typedWords } from '#shared/instruments/words'
import { multiples, dialTicks } from '#shared/chart/ticks'
import { parseDecimal, unitLabel, type Typed, type Unit } from '#shared/units'
import { Fit } from '../../../components/fit'
import { Dial } from '../../../components/instruments/dial'
import { CONDENSED, groupDigits } from '../../../components/typeset'

function numberOf(typed: Typed<Unit>): number {
  const parsed = parseDecimal(typed.text)
  return parsed.ok ? parsed.value : 0
}

type RuleProps = { end: number; unit: string; width: number }

/** A scale lying flat, from zero to its end: ticks that an eye divides without counting. */
function Rule({ end, unit, width }: RuleProps): ReactElement {
  const steps = dialTicks(end)
  const [left, right, top] = [24, width - 44, 34]
  const at = (value: number) => left + ((right - left) * value) / end
  const ticks = (step: number, long: number) =>
    multiples(step, 0, end)
      .map((value) => `M${at(value).toFixed(1)} ${top}v${long}`)
      .join('')
  const labels = multiples(steps.label, 0, end)
  const decimals = Math.max(0, ...labels.map((value) => String(value).split('.')[1]?.length ?? 0))
  return (
    <svg width={width} height={92} className="block">
      <g fill="none" stroke="var(--scribe)">
        <rect x={left - 12} y={top} width={right - left + 24} height={44} strokeWidth={1.6} />
        <path d={ticks(steps.minor, 9)} strokeWidth={1} opacity={0.75} />
        <path d={ticks(steps.major, 16)} strokeWidth={1.8} />
      </g>
      <g fontFamily={CONDENSED} fontSize={16} fontWeight={500} fill="var(--scribe)" textAnchor="middle">
        {labels.map((value) => (
          <text key={value} x={at(value)} y={22}>
            {groupDigits(value, decimals)}
          </text>
        ))}
      </g>
      <text x={right + 4} y={top + 36} fontFamily={CONDENSED} fontSize={16} fill="var(--faint-scribe)" textAnchor="end">
        {unit}
      </text>
    </svg>
  )
}

type Note = readonly [name: string, value: string]

function notesOf(details: InstrumentDetails): Note[] {
  const turn = details.kind === 'indicator' && details.revolution
  return [
    ['What it is', details.description === '' ? instrumentWords(details) : `${instrumentWords(details)}, ${details.description}`],
    [details.kind === 'indicator' ? 'Range' : 'Full scale', typedWords(scaleEnd(details))],
    ['One step', typedWords(details.increment)],
    ...(turn ? ([['One turn', typedWords(turn)]] satisfies Note[]) : []),
    ...(details.kind === 'gauge' ? ([['Class or grade', accuracyWords(details)]] satisfies Note[]) : []),
    ['Limit of error', errorLimitWords(details)],
  ]
}

function Face({ details }: { details: InstrumentDetails }) {
  const end = scaleEnd(details)
  const unit = unitLabel(end.unit, { plural: true })
  if (details.kind !== 'gauge') {
    return (
      <Fit initial={{ width: 340, height: 92 }} className="h-[92px] w-full">
        {({ width }) => <Rule end={numberOf(end)} unit={unit} width={width} />}
      </Fit>
    )
  }
  const step = details.increment.unit === end.unit ? numberOf(details.increment) : undefined
  return (
    <Dial
      code=""
      fullScale={numberOf(end)}
      unit={unit}
      minor={step}
      value={null}
      target={null}
      window={null}
      limitFrom={null}
      width={350}
    />
  )
}

/** The instrument's own scale, drawn: a gauge by its dial, everything else by a rule. Beneath it, what it is in words. */
export function InstrumentFace({ details }: { details: InstrumentDetails }) {
  return (
    <div className="flex flex-col gap-6 px-4 py-6 tablet:px-6 tablet:max-desktop:flex-row tablet:max-desktop:items-center">
      <div aria-hidden="true" className="flex min-w-0 justify-center tablet:max-desktop:w-1/2 tablet:max-desktop:shrink-0">
        <Face details={details} />
      </div>
      <dl className="grow border-t border-ghost">
        {notesOf(details).map(([name, value]) => (
          <div key={name} className="grid grid-cols-[8rem_1fr] gap-x-4 border-b border-ghost py-2">
            <dt className="text-faint-scribe">{name}</dt>
            <dd className="min-w-0 font-medium">{value}</dd>
          </div>
        ))}
      </dl>
    </div>
  )
}
