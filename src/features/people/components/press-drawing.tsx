import { balloonItems, type JointMarkState } from '#shared/drawing/balloon-items'
import { DrawingItems } from '../../../components/instruments/drawing-view'
import { CONDENSED } from '../../../components/typeset'

const uprights = [184, 448] as const
const holes = [252, 308, 363, 419, 531, 586] as const
const middle = 333

type Balloon = { number: number; state: JointMarkState; at: readonly [number, number]; to: readonly [number, number] }

const balloons: readonly Balloon[] = [
  { number: 1, state: 'accepted', at: [113, 140], to: [189, 170] },
  { number: 2, state: 'accepted', at: [552, 140], to: [476, 170] },
  { number: 3, state: 'accepted', at: [255, 220], to: [304, 178] },
  { number: 4, state: 'accepted', at: [411, 280], to: [345, 332] },
  { number: 5, state: 'accepted', at: [113, 443], to: [194, 472] },
  { number: 6, state: 'accepted', at: [552, 443], to: [472, 472] },
  { number: 7, state: 'finished', at: [255, 577], to: [291, 493] },
  { number: 8, state: 'finished', at: [411, 577], to: [374, 493] },
]

/** The tip of a leader or dimension at a point, for a line that arrives from another. */
function arrow(from: readonly [number, number], to: readonly [number, number], length = 11, half = 3.4): string {
  const angle = Math.atan2(to[1] - from[1], to[0] - from[0])
  const along = (distance: number, aside: number) =>
    `${to[0] - distance * Math.cos(angle) - aside * Math.sin(angle)} ${to[1] - distance * Math.sin(angle) + aside * Math.cos(angle)}`
  return `M${to[0]} ${to[1]}L${along(length, half)}L${along(length, -half)}Z`
}

function Upright({ left }: { left: number }) {
  const centre = left + 17
  const inner = left < middle ? left + 34 : left
  const outer = left < middle ? left : left + 34
  const out = left < middle ? -1 : 1
  return (
    <g>
      <path d={`M${left} 170V442M${left + 34} 170V442M${left} 505V691M${left + 34} 505V691`} />
      <path d={`M${left} 110v-5.5h34v5.5`} />
      <path
        d={`M${left + 5} 170V442M${left + 29} 170V442M${left + 5} 505V691M${left + 29} 505V691`}
        stroke="var(--faint-scribe)"
        strokeWidth="1"
        opacity=".7"
      />
      <path d={`M${outer} 629L${outer + out * 33} 691`} />
      <path d={`M${inner - out * 40} 691H${outer + out * 45}v9H${inner - out * 40}Z`} fill="var(--dye)" />
      <path d={`M${centre} 87V715`} stroke="var(--faint-scribe)" strokeWidth="1" strokeDasharray="14 4 3 4" opacity=".6" />
      {holes.map((y) => (
        <g key={y} strokeWidth="1.2" opacity=".8">
          <circle cx={centre} cy={y} r="5" />
          <path d={`M${centre - 8} ${y}h16`} strokeWidth=".8" />
        </g>
      ))}
    </g>
  )
}

function RamAndStack() {
  return (
    <g fill="var(--dye)">
      <path d="M299 170h67v10h-67zM309.5 180h46.5v7h-46.5zM312.5 187h41v78h-41zM315.5 265h35.5v4.5h-35.5zM323 269.5h19.5v58.5h-19.5zM318 328h30v18h-30z" />
      <path d="M323 315l19.5-2.5M323 319.5l19.5-2.5M323 324l19.5-2.5" strokeWidth="1" />
      <path d="M314 257h38" strokeWidth="1" opacity=".6" />
      <path d="M310.5 346h45v86h-45z" fill="url(#sign-in-hatch)" />
      <path d="M273.5 432h119v10h-119z" />
    </g>
  )
}

function Beams() {
  return (
    <g fill="var(--dye)">
      <path d="M179 110h308v60H179z" />
      <path d="M179 115.5h308M179 164.5h308" strokeWidth="1" opacity=".6" />
      <path d="M171.5 442h323v63h-323z" />
      <path d="M171.5 447.5h323M171.5 499.5h323" strokeWidth="1" opacity=".6" />
      <path d="M290.5 447h4.5v53h-4.5zM371 447h4.5v53h-4.5z" strokeWidth="1.2" />
      {uprights.map((left) => (
        <g key={left}>
          <circle cx={left + 17} cy="475" r="6.5" />
          <path d={`M${left + 3} 475h28M${left + 17} 461v28`} strokeWidth="1" />
        </g>
      ))}
    </g>
  )
}

function Dimensions() {
  return (
    <g stroke="var(--faint-scribe)" strokeWidth="1" fill="var(--faint-scribe)">
      <path d="M65 104.5H174M65 700H110M70 105V277M70 318V700M201 644H318M347 644H465" fill="none" opacity=".8" />
      <path
        stroke="none"
        d={[arrow([70, 200], [70, 105]), arrow([70, 200], [70, 700]), arrow([300, 644], [201, 644]), arrow([300, 644], [465, 644])].join(
          '',
        )}
      />
      <g stroke="none" fontSize="17" textAnchor="middle" fontFamily={CONDENSED}>
        <text x="333" y="650">
          710
        </text>
        <text transform="rotate(-90 76 298)" x="76" y="298">
          1600
        </text>
      </g>
    </g>
  )
}

function MeasuringPoints() {
  const points = [
    { x: 201, name: 'L', textX: 175 },
    { x: middle, name: 'M', textX: 351 },
    { x: 465, name: 'R', textX: 491 },
  ]
  return (
    <g>
      {points.map((point) => (
        <g key={point.name}>
          <path d={`M${point.x} 507l8.5 13.5h-17Z`} fill="var(--dye)" />
          <text
            x={point.textX}
            y="522"
            fontSize="16"
            textAnchor="middle"
            fill="var(--scribe)"
            stroke="none"
            fontFamily={CONDENSED}
            fontWeight="500"
          >
            {point.name}
          </text>
        </g>
      ))}
    </g>
  )
}

/** A shop press on two uprights with its eight numbered joints: what the product is about, in one drawing. */
export function PressDrawing({ className }: { className?: string }) {
  return (
    <svg
      viewBox="44 60 540 680"
      className={className}
      role="img"
      aria-label="Front elevation of a shop press with eight numbered joints; six are accepted, two are finished and not examined."
    >
      <defs>
        <pattern id="sign-in-hatch" width="7" height="7" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
          <path d="M0 0V7" stroke="var(--faint-scribe)" strokeWidth="1.4" opacity=".75" />
        </pattern>
      </defs>
      <g fill="none" stroke="var(--scribe)" strokeWidth="1.6">
        <path d="M113 700H553" strokeWidth="1.2" stroke="var(--faint-scribe)" />
        <path
          d={Array.from({ length: 36 }, (_, index) => `M${124 + index * 12} 700l-8 9`).join('')}
          stroke="var(--ghost)"
          strokeWidth="1"
        />
        {uprights.map((left) => (
          <Upright key={left} left={left} />
        ))}
        <Beams />
        <RamAndStack />
        <path d={`M${middle} 80V715`} stroke="var(--faint-scribe)" strokeWidth="1" strokeDasharray="14 4 3 4" opacity=".8" />
        <MeasuringPoints />
        <Dimensions />
        {balloons.map(({ number, at, to }) => (
          <g key={number}>
            <path d={`M${at[0]} ${at[1]}L${to[0]} ${to[1]}`} strokeWidth="1.2" />
            <path d={arrow(at, to)} fill="var(--scribe)" stroke="none" />
          </g>
        ))}
      </g>
      {balloons.map(({ number, state, at }) => (
        <DrawingItems key={number} items={balloonItems({ number, state, at: { x: at[0], y: at[1] }, size: 36 })} />
      ))}
    </svg>
  )
}

const rungs = [
  { y: 150, percent: '100\u202f%', note: 'rated load' },
  { y: 275, percent: '75\u202f%', note: 'three quarters' },
  { y: 400, percent: '50\u202f%', note: 'a half' },
  { y: 525, percent: '25\u202f%', note: 'a quarter' },
  { y: 650, percent: '0\u202f%', note: 'datum' },
] as const

/** The four quarters, with the ram at the first of them. */
export function QuartersDrawing({ className }: { className?: string }) {
  return (
    <svg viewBox="618 104 200 590" className={className} aria-hidden="true" focusable="false">
      <g fill="none" stroke="var(--scribe)" strokeWidth="1.6">
        <path d="M657 115V690" stroke="var(--faint-scribe)" strokeWidth="1" strokeDasharray="14 4 3 4" opacity=".6" />
        <path d="M640 130V660M674 130V660" />
        <path d="M626 150h14M626 275h14M626 400h14M626 525h14M626 650h14" />
        <path
          d={Array.from({ length: 21 }, (_, index) => 150 + index * 25)
            .filter((y) => (y - 150) % 125 !== 0)
            .map((y) => `M633 ${y}h7`)
            .join('')}
          strokeWidth="1"
        />
        <path d="M647 538H667V660H647Z" fill="var(--thin-dye)" />
        <path d="M642 525H672V532L666 539H648L642 532Z" fill="var(--scribe)" stroke="none" />
        {rungs.map(({ y, percent }) => {
          const now = y === 525
          const toCome = y < 525
          return (
            <path
              key={percent}
              d={`M674 ${y}H810`}
              stroke={now ? 'var(--chalk)' : 'var(--scribe)'}
              strokeWidth={now ? 3 : 1.6}
              strokeDasharray={toCome ? '7 5' : undefined}
            />
          )
        })}
      </g>
      {rungs.map(({ y, percent, note }) => (
        <g key={percent} fill={y === 525 ? 'var(--chalk)' : 'var(--scribe)'}>
          <text x="688" y={y - 8} fontSize="26" fontWeight="600">
            {percent}
          </text>
          <text x="688" y={y + 22} fontSize="16" fontFamily={CONDENSED} fill={y === 525 ? 'var(--chalk)' : 'var(--faint-scribe)'}>
            {note}
          </text>
        </g>
      ))}
    </svg>
  )
}
