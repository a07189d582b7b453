import { FilterBar, FilterSearch, FilterSelect } from '../../../components/filter-bar'

const kinds = [
  { value: 'gauge', label: 'Pressure gauges' },
  { value: 'load-cell', label: 'Load cells' },
  { value: 'indicator', label: 'Indicators' },
]

type InstrumentFiltersProps = {
  search: string
  kind: string
  retired: boolean
  onChange: (changed: { search?: string; kind?: string; retired?: string }) => void
}

export function InstrumentFilters({ search, kind, retired, onChange }: InstrumentFiltersProps) {
  return (
    <FilterBar label="Narrow the list of instruments">
      <FilterSearch value={search} placeholder="code or description" onChange={(text) => onChange({ search: text })} />
      <FilterSelect label="Kind" value={kind} all="All kinds" choices={kinds} onChange={(value) => onChange({ kind: value })} />
      <FilterSelect
        label="Use"
        value={retired ? 'yes' : ''}
        all="In use"
        choices={[{ value: 'yes', label: 'Retired' }]}
        onChange={(value) => onChange({ retired: value })}
      />
    </FilterBar>
  )
}
