import type { InstrumentDetails } from '#shared/instruments/model'
import { accuracyWords, errorLimitWords, instrumentWords, scaleEnd, typedWords } from '#shared/instruments/words'
import { Facts } from '../../../components/ruled-list'

/** What the instrument is, in words. */
export function InstrumentFacts({ details }: { details: InstrumentDetails }) {
  const turn = details.kind === 'indicator' && details.revolution
  return (
    <Facts
      facts={[
        ['What it is', details.description === '' ? instrumentWords(details) : `${instrumentWords(details)}, ${details.description}`],
        [details.kind === 'indicator' ? 'Range' : 'Full scale', typedWords(scaleEnd(details))],
        ['One step', typedWords(details.increment)],
        ...(turn ? [['One turn', typedWords(turn)] as const] : []),
        [details.kind === 'gauge' ? 'Class or grade' : 'Stated limit', accuracyWords(details)],
        ['Limit of error', errorLimitWords(details)],
      ]}
    />
  )
}
