import { moreDestinations } from '../../../components/navigation/destinations'
import { RuledList, RuledRow } from '../../../components/ruled-list'
import { usePersonEntries } from './signed-in-frame'

/** Everything that has no cell of its own at the foot of the phone. */
export function MoreList() {
  const entries = usePersonEntries()
  return (
    <RuledList className="border-t-2 border-t-ink">
      {moreDestinations.map((destination) => (
        <RuledRow key={destination.label} title={destination.label} to={destination.to} />
      ))}
      {entries.map((entry) =>
        'to' in entry ? (
          <RuledRow key={entry.label} title={entry.label} note={entry.note} to={entry.to} />
        ) : (
          <li key={entry.label} className="border-b border-hairline">
            <button type="button" onClick={entry.act} className="flex min-h-16 w-full flex-col justify-center text-left font-semibold">
              {entry.label}
              {entry.note !== undefined && <span className="font-normal text-graphite">{entry.note}</span>}
            </button>
          </li>
        ),
      )}
    </RuledList>
  )
}
