import { Mark } from '../../../components/marks'
import { NothingHere } from '../../../components/nothing-here'
import { Section } from '../../../components/page'
import { RuledList, RuledRow } from '../../../components/ruled-list'
import { classNames } from '../../../lib/class-names'
import { weekday } from '../../../lib/dates'
import type { DueRow, Month } from '../calendar-words'

const shortMonth = (name: string): readonly [month: string, year: string] => {
  const [month = '', year = ''] = name.split(' ')
  return [month.slice(0, 3), year]
}

/** The year ahead as a graduated rule: a cell a month, a ring for each thing that falls due in it. */
function Year({ months }: { months: readonly Month[] }) {
  return (
    <nav aria-label="Months ahead" className="ground-dye px-4 py-4 tablet:px-6">
      <ol className="grid grid-cols-4 border-l border-ghost tablet:grid-cols-6 desktop:grid-cols-12">
        {months.map(({ id, name, rows }, index) => {
          const [month, year] = shortMonth(name)
          const first = index === 0 || month === 'Jan'
          const body = (
            <>
              <span className="flex items-baseline justify-between gap-1">
                <span className={classNames(index === 0 ? 'font-semibold text-chalk' : 'font-medium')}>{month}</span>
                {first && <span className="text-14 text-faint-scribe">{year}</span>}
              </span>
              <span aria-hidden="true" className="mt-2 flex min-h-3 flex-wrap gap-1">
                {rows.slice(0, 12).map((row) => (
                  <span key={row.id} className="size-2.5 rounded-full border-2 border-scribe" />
                ))}
              </span>
              <span className="sr-only">{rows.length === 0 ? 'nothing' : `${rows.length} due`}</span>
            </>
          )
          return (
            <li key={id} className="border-r border-ghost border-b desktop:border-b-0">
              {rows.length > 0 ? (
                <a href={`#m${id}`} className="block min-h-16 px-2.5 py-2 hover:bg-thin-dye">
                  {body}
                </a>
              ) : (
                <span className="block min-h-16 px-2.5 py-2 text-faint-scribe">{body}</span>
              )}
            </li>
          )
        })}
      </ol>
    </nav>
  )
}

function Rows({ rows, dated }: { rows: readonly DueRow[]; dated: boolean }) {
  return (
    <RuledList>
      {rows.map((row) => (
        <RuledRow
          key={row.id}
          to={row.to}
          mark={<Mark name={row.mark} size={26} />}
          title={row.title}
          note={<span className="max-tablet:hidden">{row.note}</span>}
          aside={
            <span className={row.late ? 'text-stop-ink' : undefined}>{dated ? weekday(row.on).replace(/ \p{L}+$/u, '') : row.due}</span>
          }
          asideNote={dated ? row.due : weekday(row.on)}
        />
      ))}
    </RuledList>
  )
}

type CalendarViewProps = { late: readonly DueRow[]; months: readonly Month[] }

/** What is late first, then month by month what falls due. */
export function CalendarView({ late, months }: CalendarViewProps) {
  const coming = months.filter(({ rows }) => rows.length > 0)
  return (
    <>
      <div className="-mx-4 tablet:-mx-6">
        <Year months={months} />
      </div>
      <div className="mt-6 grid gap-x-10 gap-y-8">
        {late.length > 0 && (
          <Section title="Late, or waiting for somebody" note={late.length === 1 ? 'one thing' : `${late.length} things`}>
            <Rows rows={late} dated={false} />
          </Section>
        )}
        {coming.map(({ id, name, rows }) => (
          <div key={id} id={`m${id}`} className="scroll-mt-4">
            <Section title={name} note={rows.length === 1 ? 'one thing' : `${rows.length} things`}>
              <Rows rows={rows} dated />
            </Section>
          </div>
        ))}
        {coming.length === 0 && (
          <NothingHere
            what={late.length > 0 ? 'Nothing else falls due in a year.' : 'Nothing falls due in a year.'}
            next="Days come with a clearance and with the calibration of an instrument."
          />
        )}
      </div>
    </>
  )
}
