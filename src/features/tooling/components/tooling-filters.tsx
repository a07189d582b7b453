import { FilterBar, FilterSearch, FilterSelect } from '../../../components/filter-bar'

type ToolingFiltersProps = {
  search: string
  retired: boolean
  sort: string
  onChange: (changed: { search?: string; retired?: string; sort?: string }) => void
}

export function ToolingFilters({ search, retired, sort, onChange }: ToolingFiltersProps) {
  return (
    <FilterBar label="Narrow the list of tooling">
      <FilterSearch value={search} placeholder="number or name" onChange={(text) => onChange({ search: text })} />
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
        all="By number"
        choices={[{ value: '-code', label: 'By number, last first' }]}
        onChange={(value) => onChange({ sort: value })}
      />
    </FilterBar>
  )
}
