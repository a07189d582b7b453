import { fingerprintGroups } from '#shared/ledger/verdict-words'
import { TextField } from '../../../components/field'
import { Section } from '../../../components/page'

interface KeyPanelProps {
  /** Of the file's keys; none while no file was read. */
  fingerprints: readonly string[]
  /** What the keys were compared with, in words. */
  comparedWith: string
  pasted: string
  onPaste: (fingerprint: string) => void
}

/** The fingerprint of the key, and how to compare it with one that came another way. */
export function KeyPanel({ fingerprints, comparedWith, pasted, onPaste }: KeyPanelProps) {
  return (
    <Section title="Whose key">
      {fingerprints.map((fingerprint) => (
        <p key={fingerprint} className="border-t border-hairline py-2 font-mono leading-7">
          {fingerprintGroups(fingerprint)}
        </p>
      ))}
      <p className="border-t border-hairline py-2">{comparedWith}</p>
      <p className="pb-3">
        A printed record bears the first 16 digits of this fingerprint beside its seal, as the key. Have the shop read it out, or look on a
        record that you had before: the same digits, the same key.
      </p>
      <TextField
        label="Fingerprint that you have from the shop"
        hint="All of it, or at least the first 16 digits. The file is then compared with this one alone."
        optional
        value={pasted}
        spellCheck={false}
        autoComplete="off"
        onChange={(event) => onPaste(event.target.value)}
      />
    </Section>
  )
}
