import { FilterBar, FilterSearch, FilterSelect } from '../../../components/filter-bar'

const kinds = [
  { value: 'gauge', label: 'Pressure gauges' },
  { value: 'load-cell', label: 'Load cells' },
  { value: 'indicator', label: 'Indicators' },
]

const orders = [
  { value: '-code', label: 'By code, last first' },
  { value: 'due', label: 'By day due' },
  { value: '-due', label: 'By day due, last first' },
]

type InstrumentFiltersProps = {
  search: string
  kind: string
  retired: boolean
  sort: string
  onChange: (changed: { search?: string; kind?: string; retired?: string; sort?: string }) => void
}

export function InstrumentFilters({ search, kind, retired, sort, onChange }: InstrumentFiltersProps) {
  return (
    <FilterBar label="Narrow the list of instruments">
      <FilterSearch value={search} placeholder="code or description" onChange={(text) => onChange({ search: text })} />
      <FilterSelect wide label="Kind" value={kind} all="All kinds" choices={kinds} onChange={(value) => onChange({ kind: value })} />
      <FilterSelect
        label="Use"
        value={retired ? 'yes' : ''}
        all="In use"
        choices={[{ value: 'yes', label: 'Retired' }]}
        onChange={(value) => onChange({ retired: value })}
      />
      <FilterSelect
        label="Order"
        value={sort === 'code' ? '' : sort}
        all="By code"
        choices={orders}
        onChange={(value) => onChange({ sort: value })}
      />
    </FilterBar>
  )
}
