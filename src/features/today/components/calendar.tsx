import { Link } from 'react-router-dom'
import { estimateTextWidth } from '#shared/chart/drawing'
import { Fit } from '../../../components/fit'
import { CONDENSED } from '../../../components/typeset'
import { daysBetween, longDate, shortDate } from '../../../lib/dates'
import { paths } from '../../../paths'
import { layOutEvents, WEEKS, type CalendarEvent } from '../lay-out-events'

export type { CalendarEvent }

const days = WEEKS * 7
const side = 16
const axis = 74

function addDays(date: string, count: number): string {
  return new Date(Date.parse(`${date}T00:00:00Z`) + count * 86_400_000).toISOString().slice(0, 10)
}

const dayAndMonth = (date: string): string => shortDate(date).replace(/ \d{4}$/, '')

function Scale({ width, height, today, events }: { width: number; height: number; today: string; events: readonly CalendarEvent[] }) {
  const at = (day: number) => side + ((width - 2 * side - 4) * day) / days
  const placed = layOutEvents({
    events: events.map((event) => ({ event, x: at(daysBetween(today, event.date)) })),
    right: width - side,
    widthOf: (text) => estimateTextWidth(text, 16, 500, true),
    reserved: [0, at(0) + 62],
  })
  const fortnight = width > 900 ? 2 : 4
  return (
    <svg width={width} height={height} aria-hidden="true" className="block" fontFamily={CONDENSED} fontSize="16">
      <g stroke="var(--scribe)" fill="none">
        <path d={`M${at(0)} ${axis}H${at(days)}`} strokeWidth="1.6" />
        <path d={Array.from({ length: WEEKS + 1 }, (_, week) => `M${at(week * 7)} ${axis}v11`).join('')} strokeWidth="1.6" />
        <path d={Array.from({ length: days }, (_, day) => `M${at(day)} ${axis}v5`).join('')} stroke="var(--faint-scribe)" strokeWidth="1" />
      </g>
      {Array.from({ length: WEEKS / fortnight + 1 }, (_, index) => index * fortnight)
        .filter((week) => week <= WEEKS)
        .map((week) => (
          <text
            key={week}
            x={at(week * 7)}
            y={axis + 32}
            textAnchor={week === 0 ? 'start' : week === WEEKS ? 'end' : 'middle'}
            fill="var(--faint-scribe)"
          >
            {dayAndMonth(addDays(today, week * 7))}
          </text>
        ))}
      <path d={`M${at(0) - 9} ${axis - 18}h18L${at(0)} ${axis - 2}Z`} fill="var(--chalk)" />
      <text x={at(0) + 14} y={axis - 8} fill="var(--chalk)" fontWeight="600">
        today
      </text>
      {placed.map(({ event, x, level, flipped }) => {
        const ring = axis - 26
        const top = ring - level * 20
        const edge = flipped ? -12 : 12
        return (
          <g key={`${event.date}${event.label}`}>
            <path
              d={`M${x} ${axis}V${ring + 5}${level > 0 ? `M${x} ${ring - 5}V${top}H${x + edge - Math.sign(edge) * 2}` : ''}`}
              stroke="var(--scribe)"
              strokeWidth="1.4"
              fill="none"
              opacity=".9"
            />
            <circle cx={x} cy={ring} r="4.6" fill="var(--dye)" stroke="var(--scribe)" strokeWidth="2" />
            <text x={x + edge} y={top + 5} fill="var(--scribe)" fontWeight="500" textAnchor={flipped ? 'end' : 'start'}>
              {event.label}
            </text>
          </g>
        )
      })}
    </svg>
  )
}

type CalendarProps = { calendar: { today: string; events: readonly CalendarEvent[] } | undefined }

/** The next fourteen weeks as a graduated scale; on the phone, and for who can't see it, a list. */
export function Calendar({ calendar }: CalendarProps) {
  const coming = calendar?.events.filter((event) => {
    const day = daysBetween(calendar.today, event.date)
    return day >= 0 && day <= days
  })
  return (
    <section className="ground-dye px-4 pt-3 pb-4 tablet:px-6 tablet:pb-2 desktop:min-h-[158px]">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6">
        <h2 className="text-20">The next {WEEKS} weeks</h2>
        <Link to={paths.calendar.href()} className="inline-block min-h-12 content-center underline underline-offset-[3px] desktop:min-h-6">
          The whole calendar
        </Link>
      </div>
      {calendar === undefined || coming === undefined ? (
        <div role="status" aria-label="Being fetched" className="h-[110px]" />
      ) : (
        <>
          {coming.length === 0 && (
            <p className="mt-1 text-faint-scribe">
              Nothing falls due: no calibration, examination or clearance ends before {longDate(addDays(calendar.today, days))}.
            </p>
          )}
          <Fit className="-mx-2 hidden h-[112px] tablet:block" initial={{ width: 1232, height: 112 }}>
            {({ width, height }) => <Scale width={width} height={height} today={calendar.today} events={coming} />}
          </Fit>
          {coming.length > 0 && (
            <ol className="mt-2 border-t border-ghost tablet:sr-only">
              {[...coming]
                .sort((a, b) => a.date.localeCompare(b.date))
                .map((event) => (
                  <li key={`${event.date}${event.label}`} className="border-b border-ghost">
                    <Link to={event.to} className="flex min-h-14 items-center justify-between gap-4">
                      <span className="min-w-0 font-medium">{event.label}</span>
                      <span className="shrink-0 text-faint-scribe">{shortDate(event.date)}</span>
                    </Link>
                  </li>
                ))}
            </ol>
          )}
        </>
      )}
    </section>
  )
}
