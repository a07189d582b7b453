import type { ToolingRow } from '#shared/api/tooling'
import { typedWords } from '#shared/instruments/words'
import { formatForce, toSI } from '#shared/units'
import { Button, ButtonLink } from '../../../components/button'
import { FormError } from '../../../components/form'
import { Mark } from '../../../components/marks'
import { Page, PlateBesidePaper, Section } from '../../../components/page'
import { Facts } from '../../../components/ruled-list'
import { sayWhatFailed } from '../../../lib/problem'
import { paths } from '../../../paths'
import { useRetirePiece } from '../api/change-tooling'
import { TOOLING_WORDS } from '../words'
import { PieceDrawing } from './piece-drawing'

function Retirement({ id, code, retired }: { id: string; code: string; retired: boolean }) {
  const retire = useRetirePiece(id)
  return (
    <Section title={retired ? 'Retired' : 'Out of use'}>
      <FormError message={retire.error && sayWhatFailed(retire.error)} attempt={retire.failureCount} />
      <div className="flex flex-wrap items-center justify-between gap-4 border-t border-hairline pt-3">
        <p className="min-w-0 text-graphite">
          {retired
            ? `${code} can be taken into use again.`
            : `When ${code} is cracked, worn, lost or sold, retire it. Records that name it stay, and its number stays taken.`}
        </p>
        <Button busy={retire.isPending && 'Changing it'} onClick={() => retire.mutate(!retired)}>
          {retired ? 'Back into use' : `Retire ${code}`}
        </Button>
      </div>
    </Section>
  )
}

type ToolingPageProps = { tooling: ToolingRow; mayWrite: boolean; planTo?: string }

/** One piece: what it carries, how it sits, and whether it is in use. */
export function ToolingPage({ tooling, mayWrite, planTo }: ToolingPageProps) {
  const { id, details, retired } = tooling
  const { ratedLoad } = details
  const words = TOOLING_WORDS[details.kind]
  const actions = !retired && (
    <>
      {mayWrite && <ButtonLink to={paths.editTool.href(id)}>Change its details</ButtonLink>}
      {planTo !== undefined && (
        <ButtonLink kind="next" to={planTo}>
          Plan a test
        </ButtonLink>
      )}
    </>
  )
  return (
    <PlateBesidePaper
      paperFirst
      plate={
        <div className="flex flex-col items-center gap-4 px-4 py-6 tablet:px-6">
          <div aria-hidden="true">
            <PieceDrawing kind={details.kind} />
          </div>
          <p className="w-full border-t border-ghost pt-3 text-faint-scribe">
            Drawn by its kind, not to scale. The force goes through it: whatever it is used with carries no more than the weaker of the two.
          </p>
        </div>
      }
    >
      <Page title={details.code} note={details.name} actions={actions || undefined}>
        <div className="grid grid-cols-1 gap-8">
          <div className="border-y border-ink py-4">
            {retired && (
              <p className="mb-2 flex items-center gap-3 text-18 font-semibold">
                <Mark name="abandoned" size={24} /> Retired: no test takes it.
              </p>
            )}
            <p className="text-graphite">Carries no more than</p>
            <p className="text-34 font-semibold tablet:text-46">{typedWords(ratedLoad)}</p>
            <p className="text-graphite">
              {ratedLoad.unit === 'kN' ? '' : `${formatForce(toSI(ratedLoad), 'kN')}. `}Rating: {details.ratingFrom}.
            </p>
          </div>
          <Section title="How it is made">
            <Facts
              facts={[
                ['Kind', `${words.name}, ${words.note}`],
                ['What it fits', details.fit],
                ...(details.height ? [['Height', typedWords(details.height)] as const] : []),
                ...(details.remark === '' ? [] : [['Remark', details.remark] as const]),
              ]}
            />
          </Section>
          {mayWrite && <Retirement id={id} code={details.code} retired={retired} />}
        </div>
      </Page>
    </PlateBesidePaper>
  )
}
