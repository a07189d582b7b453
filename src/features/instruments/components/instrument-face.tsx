import type { ReactElement } from 'react'
import type { InstrumentDetails } from '#shared/instruments/model'
import { accuracyWords, scaleEnd } from '#shared/instruments/words'
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

/** The instrument's own scale, drawn: a gauge by its dial, everything else by a rule. What it says stands in words beside it. */
export function InstrumentFace({ details }: { details: InstrumentDetails }) {
  const end = scaleEnd(details)
  const unit = unitLabel(end.unit, { plural: true })
  const gauge = details.kind === 'gauge' && details.increment.unit === end.unit ? details : undefined
  return (
    <div className="ground-dye flex flex-col gap-3 px-4 py-5 tablet:px-6">
      <div aria-hidden="true" className="flex justify-center">
        {details.kind === 'gauge' ? (
          <Dial
            code={details.code}
            fullScale={numberOf(end)}
            unit={unit}
            minor={gauge && numberOf(gauge.increment)}
            value={null}
            target={null}
            window={null}
            limitFrom={null}
            width={330}
          />
        ) : (
          <Fit initial={{ width: 340, height: 92 }} className="h-[92px] w-full">
            {({ width }) => <Rule end={numberOf(end)} unit={unit} width={width} />}
          </Fit>
        )}
      </div>
      <p className="text-center font-condensed text-faint-scribe">{accuracyWords(details)}</p>
    </div>
  )
}
