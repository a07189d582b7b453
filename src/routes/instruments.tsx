import { INSTRUMENT_SORTS } from '#shared/api/instruments'
import { ButtonLink } from '../components/button'
import { KeysetPages } from '../components/keyset-pages'
import { NothingHere } from '../components/nothing-here'
import { Page } from '../components/page'
import { SkeletonRows } from '../components/skeleton'
import { useInstruments } from '../features/instruments/api/get-instruments'
import { instrumentsAsked } from '../features/instruments/asked'
import { InstrumentFilters } from '../features/instruments/components/instrument-filters'
import { InstrumentTable } from '../features/instruments/components/instrument-table'
import { calendarDate } from '../lib/dates'
import { useCan, useShop } from '../lib/here'
import { useRegister } from '../lib/register-view'
import { paths } from '../paths'

export function Component() {
  const shop = useShop()
  const can = useCan()
  const view = useRegister({ sorts: INSTRUMENT_SORTS, fallback: 'code', href: paths.instruments.href })
  const { asked, narrowed } = instrumentsAsked(shop.id, view)
  const list = useInstruments(asked)
  if (list.error && list.data === undefined) throw list.error
  const enter = can('instrument:write') && (
    <ButtonLink kind="next" to={paths.newInstrument.href({ shop: shop.id })}>
      Enter an instrument
    </ButtonLink>
  )
  const nothing = narrowed ? (
    <NothingHere what="No instrument fits." next="Take out a word, or show all kinds." />
  ) : (
    <NothingHere what="No instrument is entered yet." next="A test reads at least one gauge or load cell, and one indicator." />
  )
  return (
    <Page title="Instruments" note={view.sort.column === 'due' ? 'by the day they fall due' : 'by their code'} actions={enter || undefined}>
      <InstrumentFilters
        search={asked.search ?? ''}
        kind={asked.kind ?? ''}
        retired={asked.retired === 'yes'}
        sort={asked.sort}
        onChange={view.change}
      />
      {list.data === undefined ? (
        <SkeletonRows />
      ) : (
        <>
          <InstrumentTable
            instruments={list.data.instruments}
            today={calendarDate(new Date())}
            sort={view.sort}
            onSort={(sort) => view.change(view.sortBy(sort))}
            nothing={nothing}
          />
          <KeysetPages
            newer={view.pageAt(list.data.newer)}
            older={view.pageAt(list.data.older)}
            words={{ newer: 'Before these', older: 'After these' }}
            note="A clock struck through is past its day. It blocks a new test."
          />
        </>
      )}
    </Page>
  )
}
