import { useNewVersion } from '../lib/use-new-version'
import { Button } from './button'
import { Mark } from './marks'

/** Says that a newer version of the program can be loaded. Nothing is shown under load, or while an entry waits. */
export function VersionPlate() {
  const load = useNewVersion()
  if (load === undefined) return null
  return (
    <aside
      aria-label="New version"
      className="ground-sheet flex flex-wrap items-center gap-x-4 gap-y-2 border-b border-hairline px-4 py-2 tablet:px-6"
    >
      <Mark name="go-on" size={22} />
      <p className="min-w-0 flex-1 text-16">
        <span className="font-semibold">A new version is ready.</span> Nothing is under load here and nothing waits to be sent.
      </p>
      <Button size="line" onClick={load}>
        Load it now
      </Button>
    </aside>
  )
}
