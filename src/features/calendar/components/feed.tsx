import { useState } from 'react'
import { Button } from '../../../components/button'
import { FormError } from '../../../components/form'
import { Section } from '../../../components/page'
import { sayWhatFailed } from '../../../lib/problem'
import { useFeed } from '../api/get-calendar'

/** The address stands in a field, so that it can be taken by hand where a page may not write to the clipboard. */
function Address({ address }: { address: string }) {
  const [copied, setCopied] = useState<'yes' | 'no' | null>(null)
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(address)
      setCopied('yes')
    } catch {
      setCopied('no')
    }
  }
  return (
    <div className="mt-3 grid gap-2">
      <label className="grid gap-1">
        <span className="font-medium">The address, shown this once</span>
        <input
          readOnly
          value={address}
          onFocus={(event) => event.target.select()}
          className="min-h-14 w-full rounded-field border-2 border-rule bg-field px-3 font-mono text-14 desktop:min-h-12"
        />
      </label>
      <div className="flex flex-wrap items-center gap-3">
        <Button size="line" onClick={() => void copy()}>
          Copy it
        </Button>
        <p role="status">
          {copied === 'yes' && 'Copied. Paste it into a calendar program as a calendar to follow.'}
          {copied === 'no' && 'This browser did not let it be copied: take it from the field.'}
        </p>
      </div>
    </div>
  )
}

/** The shop's due dates in whatever calendar a person keeps. */
export function Feed({ shopId, shopName }: { shopId: string; shopName: string }) {
  const feed = useFeed(shopId)
  const address = feed.data?.address ?? null
  const ended = feed.isSuccess && address === null
  return (
    <Section title="In your own calendar">
      <div className="border-t border-hairline pt-3">
        <FormError message={feed.error && sayWhatFailed(feed.error)} attempt={feed.failureCount} />
        <p className="max-w-[72ch]">
          A calendar program can follow {shopName}’s due dates by an address of yours. Whoever has that address reads them without signing
          in: names of presses, codes of instruments and days, nothing else. It ends when you end it, make another, or leave the shop.
        </p>
        {address !== null && <Address address={address} />}
        {ended && (
          <p role="status" className="mt-3 font-medium">
            No address leads to this calendar any more.
          </p>
        )}
        <div className="mt-3 flex flex-wrap gap-3">
          <Button busy={feed.isPending && feed.variables === 'make' && 'Making it'} onClick={() => feed.mutate('make')}>
            {address === null ? 'Make an address' : 'Make another, ending this one'}
          </Button>
          {!ended && (
            <Button busy={feed.isPending && feed.variables === 'end' && 'Ending it'} onClick={() => feed.mutate('end')}>
              End the address
            </Button>
          )}
        </div>
        <p className="mt-2 text-graphite">An address made earlier ends with the next one.</p>
      </div>
    </Section>
  )
}
