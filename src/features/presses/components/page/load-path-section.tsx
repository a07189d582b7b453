import type { Joint, PressDescription } from '#shared/press/model'
import { CHECK_CAUTIONS, anyFigures, checkedByUse, factorWords } from '#shared/structure/check-words'
import { checkLoadPath } from '#shared/structure/load-path-check'
import { formatQuantity, type ForceUnit, type LengthUnit } from '#shared/units'
import { ButtonLink } from '../../../../components/button'
import { HowLink } from '../../../../components/how-link'
import { Mark } from '../../../../components/marks'
import { Section } from '../../../../components/page'
import { Facts } from '../../../../components/ruled-list'
import { CheckBars, NotChecked } from '../../../../components/structure/check-bars'
import { setPercent } from '../../../../components/typeset'
import { capital } from '../../../../lib/words'
import { Dashes } from './dashes'

type LoadPathSectionProps = {
  description: PressDescription
  joints: readonly Joint[]
  forceUnit: ForceUnit
  lengthUnit: LengthUnit
  /** Where sections are given; null for somebody who may not, or while a test has the press. */
  editTo: string | null
}

const fold = 'min-h-12 cursor-pointer content-center font-medium underline underline-offset-[3px] desktop:min-h-10'

/** What the members and joints of this press come to under its rated load: an estimate, never an approval. */
export function LoadPathSection({ description, joints, forceUnit, lengthUnit, editTo }: LoadPathSectionProps) {
  const check = checkLoadPath({ description, joints, forceUnit })
  const known = anyFigures(check)
  const checked = checkedByUse(check.results)
  const { band, missing } = check.expected
  const length = (si: number) => formatQuantity(si, lengthUnit, lengthUnit === 'in' ? 3 : 2)
  return (
    <Section title="Load path check, an estimate" className="mt-6">
      <p className="mb-3 flex items-start gap-3 font-medium">
        <span className="mt-0.5">
          <Mark name={check.blocks ? 'stop' : check.weakest ? 'within' : 'not-read'} size={22} />
        </span>
        <span className="max-w-prose">{setPercent(capital(check.sentence))}</span>
      </p>
      <CheckBars check={check} forceUnit={forceUnit} />
      <HowLink topic="load-path" of="the load path check" className="mt-2" />
      {known && (
        <p className="mt-3">
          {band
            ? `Head and bed are expected to move apart by ${length(band.low)} to ${length(band.high)} at the rated load.`
            : `How far head and bed move apart is not estimated. ${missing}`}
        </p>
      )}
      {check.notChecked > 0 && (
        <details className="mt-2" open={known}>
          <summary className={fold}>NOT CHECKED: {check.notChecked}</summary>
          <NotChecked check={check} />
        </details>
      )}
      <details className="mt-2">
        <summary className={fold}>Factors, and where every figure comes from</summary>
        <Facts facts={factorWords()} />
        {checked.length > 0 && (
          <Facts
            className="mt-3"
            facts={checked.map(
              ({ name, check: what, carries, source }) => [`${capital(name)}, ${what}`, `${capital(carries)}. ${source}`] as const,
            )}
          />
        )}
      </details>
      <div className="mt-3 max-w-prose">
        <Dashes sentences={CHECK_CAUTIONS} />
      </div>
      {editTo !== null && (
        <div className="mt-4">
          <ButtonLink size="line" to={editTo}>
            {known ? 'Change its sections' : 'Give its sections'}
          </ButtonLink>
        </div>
      )}
    </Section>
  )
}
