import { FilterBar, FilterDate, FilterSearch, FilterSelect } from '../../../components/filter-bar'
import { useChoices } from '../api/get-choices'
import { outcomeChoices } from './outcome'

type TestFiltersProps = {
  shopId: string
  today: string
  value: (name: string) => string
  onChange: (changed: Record<string, string | undefined>) => void
}

/** Search, press, result, lead and the days between which tests were opened. */
export function TestFilters({ shopId, today, value, onChange }: TestFiltersProps) {
  const choices = useChoices(shopId)
  return (
    <FilterBar label="Narrow the list of proof tests">
      <FilterSearch value={value('search')} placeholder="number, press or person" onChange={(search) => onChange({ search })} />
      <FilterSelect
        label="Press"
        value={value('press')}
        all="All presses"
        choices={choices.data?.presses ?? []}
        onChange={(press) => onChange({ press })}
      />
      <FilterSelect
        label="Result"
        value={value('result')}
        all="All results"
        choices={outcomeChoices}
        onChange={(result) => onChange({ result })}
      />
      <FilterSelect
        label="Lead"
        value={value('lead')}
        all="Anyone"
        choices={choices.data?.leads ?? []}
        onChange={(lead) => onChange({ lead })}
      />
      <FilterDate label="From" any="The first" value={value('from')} max={value('to') || today} onChange={(from) => onChange({ from })} />
      <FilterDate
        label="To"
        any="Today"
        value={value('to')}
        min={value('from') || undefined}
        max={today}
        onChange={(to) => onChange({ to })}
      />
    </FilterBar>
  )
}
