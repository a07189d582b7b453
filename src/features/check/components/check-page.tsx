import { useMemo, useState, type ReactNode } from 'react'
import { fingerprintOf } from '#shared/ledger/check-ledger'
import { Mark } from '../../../components/marks'
import { PageHeading, inset } from '../../../components/page'
import { classNames } from '../../../lib/class-names'
import { useVerificationKeys } from '../../../lib/verification-keys'
import { checkFile, otherFile, readFile, type ChosenFile } from '../read-file'
import { ChooseFile } from './choose-file'
import { KeyPanel } from './key-panel'
import { Verdict } from './verdict'
import { WhatItWas, WhoSigned } from './what-it-was'

function comparedWords(pasted: string, served: number | undefined, failed: boolean): string {
  if (pasted !== '') return 'Compared with the fingerprint below.'
  if (served !== undefined) return `Compared with the keys of this server, ${served === 1 ? 'one' : `${served}, retired ones among them`}.`
  return failed ? 'This server’s keys could not be fetched: compare the fingerprint yourself.' : 'This server’s keys are being fetched.'
}

/** Checks a record's ledger file in this browser: anybody may, and nothing is sent anywhere. */
export function CheckPage({ head }: { head: ReactNode }) {
  const [chosen, setChosen] = useState<ChosenFile | null>(null)
  const [pasted, setPasted] = useState('')
  const { keys, failed } = useVerificationKeys()
  const given = pasted.trim()
  const waits = given === '' && keys === undefined && !failed
  const check = useMemo(() => {
    if (chosen === null || !('bytes' in chosen) || waits) return null
    const served = keys?.map(({ publicKey }) => fingerprintOf(publicKey))
    return checkFile(chosen.bytes, given === '' ? served : [given])
  }, [chosen, keys, given, waits])
  return (
    <div className="ground-steel flex min-h-dvh flex-col">
      {head}
      <main className={classNames(inset, 'mx-auto w-full max-w-[1040px] grow py-6')}>
        <PageHeading>Check a record</PageHeading>
        <p className="mt-1 mb-4 text-18">
          Whether a record’s ledger file is as it was sealed, or was altered since. It is read by this browser and sent nowhere.
        </p>
        <ChooseFile chosen={chosen?.name ?? null} onChoose={(file) => void readFile(file).then(setChosen)} />
        <div className="mt-4">
          {chosen !== null && 'refused' in chosen && (
            <p role="alert" className="ground-sheet flex gap-3 border-t-2 border-ink px-4 py-4 text-18">
              <Mark name="not-read" size={28} className="shrink-0" />
              {chosen.refused}
            </p>
          )}
          {chosen !== null && check !== null && 'bytes' in chosen && (
            <Verdict
              check={check}
              fileName={chosen.name}
              instead={check.verdict === 'not a ledger file' ? otherFile(chosen.bytes) : null}
            />
          )}
        </div>
        <div className="mt-6 grid gap-x-10 gap-y-6 desktop:grid-cols-2">
          {check !== null && 'file' in check && (
            <>
              <WhatItWas check={check} />
              <WhoSigned check={check} />
            </>
          )}
          <KeyPanel
            fingerprints={check !== null && 'fingerprints' in check ? check.fingerprints : []}
            comparedWith={comparedWords(given, keys?.length, failed)}
            pasted={pasted}
            onPaste={setPasted}
          />
          <section className="self-start border-t border-hairline py-2 text-graphite">
            <p>
              A whole record says that nothing was changed since it was sealed. It does not say that a press may be used: read what it came
              to, and what was not measured.
            </p>
            <p className="mt-2">
              Without this server: <span className="font-mono">npm run verify -- FILE</span> in a copy of the program says the same.
            </p>
          </section>
        </div>
      </main>
    </div>
  )
}
