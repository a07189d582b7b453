import { Link } from 'react-router-dom'
import { Logotype } from '../components/logotype'
import { CheckPage } from '../features/check/components/check-page'
import { useTitle } from '../lib/use-title'
import { paths } from '../paths'

export function Component() {
  useTitle('Check a record')
  return (
    <CheckPage
      head={
        <header className="ground-deep-dye flex items-center justify-between gap-4 px-4 py-2 text-scribe tablet:px-6">
          <Logotype tone="dye" />
          <Link to={paths.today.href()} className="flex min-h-14 items-center px-2 underline underline-offset-[3px]">
            To the shop
          </Link>
        </header>
      }
    />
  )
}
