import { Page, Section } from '../components/page'
import { Facts } from '../components/ruled-list'
import { ChangePasswordForm } from '../features/people/components/change-password-form'
import { ThemeChoice } from '../features/people/components/theme-choice'
import { useGuestOf, useMyShops, useUser } from '../lib/here'

export function Component() {
  const user = useUser()
  const shops = useMyShops()
  const guestOf = useGuestOf()
  return (
    <Page title="Your account">
      <div className="grid gap-x-12 gap-y-8 desktop:grid-cols-2">
        <div className="grid content-start gap-8">
          <Section title="Who you are">
            <Facts
              facts={[
                ['Name on records', user.name],
                ['E-mail', user.email],
                ...shops.map((shop) => [shop.name, shop.role] as const),
                ...guestOf.map(
                  ({ shopName, pressName, test }) => [shopName, `witness of ${test?.number ?? `the next test of ${pressName}`}`] as const,
                ),
              ]}
            />
          </Section>
          <Section title="Light or dark">
            <ThemeChoice />
          </Section>
        </div>
        <Section title="Password" note="Signing a record asks for it again">
          <ChangePasswordForm />
        </Section>
      </div>
    </Page>
  )
}
