import { PRESS_STATUSES } from '#shared/api/presses'
import { FilterBar, FilterSearch, FilterSelect } from '../../../components/filter-bar'

const words: Record<(typeof PRESS_STATUSES)[number], string> = {
  building: 'Being built',
  ready: 'Never tested',
  'under test': 'Under test',
  cleared: 'Cleared',
  suspended: 'Suspended',
  withdrawn: 'Withdrawn',
}

type PressFiltersProps = { search: string; status: string; onChange: (changed: { search?: string; status?: string }) => void }

export function PressFilters({ search, status, onChange }: PressFiltersProps) {
  return (
    <FilterBar label="Narrow the list of presses">
      <FilterSearch value={search} placeholder="name or what it is for" onChange={(text) => onChange({ search: text })} />
      <FilterSelect
        label="State"
        value={status}
        all="All presses"
        choices={PRESS_STATUSES.map((value) => ({ value, label: words[value] }))}
        onChange={(value) => onChange({ status: value })}
      />
    </FilterBar>
  )
}
