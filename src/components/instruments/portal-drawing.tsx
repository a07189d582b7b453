import type { ReactElement } from 'react'
import { Across, CentreLine, Ground, Hair, millimetres, Outline, RamStack, Upright } from './drafting'
import { ramHeights } from './portal-geometry'
import type { Portal, PressDimensions } from './portal-geometry'

interface PartProps {
  portal: Portal
}

/** Channels standing on the floor, with the flange's hidden edge; or round posts. */
function Uprights({ portal }: PartProps): ReactElement {
  const { left, right, post, top, floor, headTop, headBottom, bedTop, bedBottom, kind } = portal
  const foot = kind === 'h-frame' ? floor - 8 : kind === 'four-post' ? floor - 12 : bedTop
  const spans: [number, number][] =
    kind === 'bench'
      ? [[headBottom, bedTop]]
      : [
          [headBottom, bedTop],
          [bedBottom, foot],
        ]
  const edges = [left, right]
    .map((x) => spans.map(([a, b]) => `M${x - post} ${a}V${b}M${x + post} ${a}V${b}`).join(''))
    .join('')
  const inset = Math.max(3, post * 0.24)
  const flanges = [left, right]
    .map((x) => spans.map(([a, b]) => `M${x - post + inset} ${a}V${b}M${x + post - inset} ${a}V${b}`).join(''))
    .join('')
  const caps = [left, right].map((x) => `M${x - post} ${headTop}V${top}H${x + post}V${headTop}`).join('')
  return (
    <g>
      <Outline>
        <path d={edges} />
        {kind !== 'four-post' && <path d={caps} />}
      </Outline>
      {kind === 'four-post' ? <Hair d={edges} /> : <Hair d={flanges} />}
    </g>
  )
}

function Nuts({ portal }: PartProps): ReactElement {
  const { left, right, post, headTop, headBottom, bedTop, bedBottom } = portal
  const nut = (x: number, y: number): ReactElement => (
    <g key={`${x}/${y}`}>
      <rect x={x - post * 1.7} y={y} width={post * 3.4} height={11} fill="var(--dye)" />
      <path d={`M${x - post * 0.7} ${y}v11M${x + post * 0.7} ${y}v11`} strokeWidth={1} />
    </g>
  )
  const backs = [left + post * 4.6, right - post * 4.6]
  return (
    <Outline>
      {[left, right].flatMap((x) => [headTop - 11, headBottom, bedTop - 11, bedBottom].map((y) => nut(x, y)))}
      {backs.map((x) => (
        <g key={x} opacity={0.65}>
          <rect x={x - post * 1.4} y={headTop - 8} width={post * 2.8} height={8} strokeWidth={1.2} />
        </g>
      ))}
    </Outline>
  )
}

function Holes({ portal }: PartProps): ReactElement {
  const { left, right, holes, pin } = portal
  const small = [left, right].flatMap((x) => holes.map((y) => ({ x, y })))
  return (
    <g fill="none">
      {small.map(({ x, y }) => (
        <g key={`${x}/${y}`} stroke="var(--faint-scribe)" strokeWidth={1.1} opacity={0.9}>
          <circle cx={x} cy={y} r={4.6} />
          <path d={`M${x - 7.5} ${y}h15`} strokeWidth={0.8} />
        </g>
      ))}
      {[left, right].map((x) => (
        <g key={x} stroke="var(--scribe)">
          <circle cx={x} cy={pin} r={6} strokeWidth={1.8} />
          <path d={`M${x - 14} ${pin}h28M${x} ${pin - 14}v28`} strokeWidth={1} />
        </g>
      ))}
    </g>
  )
}

function Beams({ portal }: PartProps): ReactElement {
  const { cx, headHalf, headTop, headBottom, bedHalf, bedTop, bedBottom, span } = portal
  const flange = Math.max(3, Math.round((headBottom - headTop) * 0.075))
  const rib = Math.round(span * 0.151)
  const rail = (half: number, y: number): string => `M${cx - half} ${y}H${cx + half}`
  return (
    <g>
      <Outline>
        <rect x={cx - headHalf} y={headTop} width={headHalf * 2} height={headBottom - headTop} fill="var(--dye)" />
        <rect x={cx - bedHalf} y={bedTop} width={bedHalf * 2} height={bedBottom - bedTop} fill="var(--dye)" />
        {[cx - rib - 2, cx + rib - 2].map((x) => (
          <rect key={x} x={x} y={bedTop + 4} width={4} height={bedBottom - bedTop - 8} strokeWidth={1.2} />
        ))}
      </Outline>
      <Hair
        d={
          rail(headHalf, headTop + flange) +
          rail(headHalf, headBottom - flange) +
          rail(bedHalf, bedTop + flange) +
          rail(bedHalf, bedBottom - flange)
        }
      />
    </g>
  )
}

function Feet({ portal }: PartProps): ReactElement {
  const { cx, left, right, post, floor, span, kind, top } = portal
  const half = Math.round(span * (kind === 'four-post' ? 0.13 : 0.225))
  const plate = kind === 'four-post' ? 12 : 8
  const rise = Math.min(57, (floor - top) * 0.105)
  return (
    <Outline>
      {[left, right].map((x) => {
        const out = x < cx ? -1 : 1
        return (
          <g key={x}>
            <rect x={x - half - (x < cx ? 2 : -2)} y={floor - plate} width={half * 2} height={plate} fill="var(--dye)" />
            {kind === 'h-frame' && (
              <path d={`M${x + out * post} ${floor - plate - rise}L${x + out * (post + rise * 0.55)} ${floor - plate}`} />
            )}
          </g>
        )
      })}
    </Outline>
  )
}

/** What a bench press stands on. */
function Pads({ portal }: PartProps): ReactElement {
  const { cx, bedHalf, bedBottom, floor, span } = portal
  const wide = Math.round(span * 0.1)
  return (
    <Outline>
      {[cx - bedHalf, cx + bedHalf - wide].map((x) => (
        <rect key={x} x={x} y={bedBottom} width={wide} height={floor - bedBottom} fill="var(--dye)" />
      ))}
    </Outline>
  )
}

/** Two uprights, a head and a bed: H-frame, four-post or bench press, each with its own feet and fixings. */
export function PortalDrawing({ portal, dimensions }: PartProps & { dimensions: PressDimensions }): ReactElement {
  const { cx, left, right, top, floor, headBottom, bedTop, bedBottom, bedHalf, kind, box, dimensionX } = portal
  const height = millimetres(dimensions.height)
  const width = millimetres(dimensions.width)
  // On a bench press the daylight is taken up by the ram, so the figure goes above the head.
  const acrossY = kind === 'bench' ? top - 18 : Math.min(bedBottom + 129, (bedBottom + floor) / 2 + 20)
  return (
    <g>
      <Ground from={Math.max(4, cx - bedHalf - 54)} to={Math.min(box.width - 4, cx + bedHalf + 54)} y={floor} />
      <Uprights portal={portal} />
      {kind === 'bench' ? <Pads portal={portal} /> : <Feet portal={portal} />}
      <Beams portal={portal} />
      {kind === 'four-post' && <Nuts portal={portal} />}
      <RamStack cx={cx} span={portal.span} top={headBottom} bottom={bedTop} heights={ramHeights(portal)} />
      <CentreLine d={`M${left} ${top - 18}V${floor + 14}M${right} ${top - 18}V${floor + 14}`} />
      <CentreLine d={`M${cx} ${top - 28}V${floor + 14}`} strong />
      {kind === 'h-frame' && <Holes portal={portal} />}
      {height !== null && (
        <Upright x={dimensionX} top={top} bottom={floor} reach={left - portal.post - 9} text={height} />
      )}
      {width !== null && acrossY < floor - 24 && <Across y={acrossY} left={left} right={right} text={width} />}
    </g>
  )
}
