import { useState } from 'react'
import { useLocation } from 'react-router-dom'
import type { InstrumentResponse } from '#shared/api/instruments'
import { instrumentWords } from '#shared/instruments/words'
import { PhotoField } from '../../../components/attachments/photo-field'
import { Button, ButtonLink } from '../../../components/button'
import { FormError } from '../../../components/form'
import { Page, PlateBesidePaper, Section } from '../../../components/page'
import { sayWhatFailed } from '../../../lib/problem'
import { paths } from '../../../paths'
import { useAddCalibration } from '../api/add-calibration'
import { useRetireInstrument } from '../api/retire-instrument'
import { useCertificate } from '../use-certificate'
import { CalibrationForm } from './calibration-form'
import { CalibrationState } from './calibration-state'
import { CalibrationTable } from './calibration-table'
import { InstrumentFace } from './instrument-face'

function Retirement({ id, code, retired }: { id: string; code: string; retired: boolean }) {
  const retire = useRetireInstrument(id)
  return (
    <Section title={retired ? 'Retired' : 'Out of use'}>
      <FormError message={retire.error && sayWhatFailed(retire.error)} attempt={retire.failureCount} />
      <div className="flex flex-wrap items-center justify-between gap-4 border-t border-hairline pt-3">
        <p className="min-w-0 text-graphite">
          {retired
            ? `${code} can be taken into use again.`
            : `${code} is lost, broken or sold: retire it. Records that name it stay, and its code stays taken.`}
        </p>
        <Button busy={retire.isPending && 'Changing it'} onClick={() => retire.mutate(!retired)}>
          {retired ? 'Back into use' : `Retire ${code}`}
        </Button>
      </div>
    </Section>
  )
}

type InstrumentPageProps = { answer: InstrumentResponse; today: string; mayWrite: boolean; mayCalibrate: boolean }

/** One instrument: may it be relied on, what it is, and every certificate it ever had. */
export function InstrumentPage({ answer, today, mayWrite, mayCalibrate }: InstrumentPageProps) {
  const { instrument, calibrations } = answer
  const { id, details, retired } = instrument
  // Whoever is sent here to enter a certificate finds the form open.
  const { hash } = useLocation()
  const [entering, setEntering] = useState(hash === '#calibration' && mayCalibrate && !retired)
  const add = useAddCalibration(id)
  const certificate = useCertificate(id, calibrations, entering)
  const actions = mayWrite && !retired && (
    <>
      <ButtonLink to={paths.editInstrument.href(id)}>Change its details</ButtonLink>
      {mayCalibrate && !entering && (
        <Button kind="next" onClick={() => setEntering(true)}>
          Enter a calibration
        </Button>
      )}
    </>
  )
  return (
    <PlateBesidePaper paperFirst plate={<InstrumentFace details={details} />}>
      <Page title={details.code} note={instrumentWords(details)} actions={actions || undefined}>
        <div className="grid grid-cols-1 gap-8">
          <CalibrationState instrument={instrument} today={today} />
          {entering && (
            <Section title={`A calibration of ${details.code}`}>
              <CalibrationForm
                details={details}
                sending={add.isPending}
                send={async (calibration) => {
                  await add.mutateAsync({ ...calibration, certificateFile: certificate.chosen[0] ?? null })
                  setEntering(false)
                }}
                onLeave={() => setEntering(false)}
                file={
                  <PhotoField
                    label="The certificate itself"
                    hint="A PDF or a photo of it. It is sent when the calibration is entered."
                    owner={certificate.owner}
                    chosen={certificate.chosen}
                    // What is chosen is what is kept for this draft.
                    onChange={() => undefined}
                    most={1}
                  />
                }
              />
            </Section>
          )}
          <Section title="Calibrations">
            <CalibrationTable calibrations={calibrations} code={details.code} />
          </Section>
          {mayWrite && <Retirement id={id} code={details.code} retired={retired} />}
        </div>
      </Page>
    </PlateBesidePaper>
  )
}
