import { ButtonLink } from '../components/button'
import { NothingHere } from '../components/nothing-here'
import { Page, Section } from '../components/page'
import { SkeletonRows } from '../components/skeleton'
import { useProtocols } from '../features/protocols/api/get-protocols'
import { ProtocolTable } from '../features/protocols/components/protocol-table'
import { useCan, useShop } from '../lib/here'
import { paths } from '../paths'

export function Component() {
  const shop = useShop()
  const can = useCan()
  const { data, error } = useProtocols(shop.id)
  if (error && data === undefined) throw error
  const archived = data?.protocols.filter((one) => one.archived) ?? []
  const write = can('protocol:write') && (
    <ButtonLink kind="next" to={paths.newProtocol.href({ shop: shop.id })}>
      Write a protocol
    </ButtonLink>
  )
  return (
    <Page title="Protocols" note="the written plans that tests are run by" actions={write || undefined}>
      {data === undefined ? (
        <SkeletonRows rows={3} />
      ) : (
        <div className="grid grid-cols-1 gap-8">
          <ProtocolTable
            caption="Protocols for new tests"
            protocols={data.protocols.filter((one) => !one.archived)}
            nothing={<NothingHere what="No protocol is in the choice for new tests." next="Write one, or bring an archived one back." />}
          />
          {archived.length > 0 && (
            <Section title="Archived" note="no new test is run by these">
              <ProtocolTable caption="Archived protocols" protocols={archived} nothing={null} />
            </Section>
          )}
          <p className="text-graphite">
            The strong line runs to rated load, with a tick at each stage. A test freezes the version it is opened with.
          </p>
        </div>
      )}
    </Page>
  )
}
