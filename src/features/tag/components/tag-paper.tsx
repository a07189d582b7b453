import { useEffect, useState, type ReactNode } from 'react'
import type { PublicTag } from '#shared/api/tags'
import { classNames } from '../../../lib/class-names'
import { dateAndTime } from '../../../lib/dates'
import { pressWords, shutWords, spelled, tagWords, type SmallPrint, type TagClearance } from '../tag-words'
import { QrCode } from './qr-code'
import { useSmallPrint } from './use-small-print'
import '../tag.css'

export type TagSize = 'small' | 'a6'

/** The edge of a rule, scribed across the tag. */
function Edge() {
  const ticks = Array.from({ length: 21 }, (_, tick) => `M${tick * 5} 10v${tick % 5 === 0 ? -9 : -5}`).join('')
  return (
    <svg viewBox="-0.5 0 101 11" preserveAspectRatio="none" aria-hidden="true" className="block h-[2.4mm] w-full">
      <path d={`M0 10H100${ticks}`} fill="none" stroke="#000" strokeWidth={1.2} vectorEffect="non-scaling-stroke" />
    </svg>
  )
}

/** Hazard stripes, drawn and not a background: printers leave backgrounds out. */
function Stripes({ className }: { className: string }) {
  const bars = Array.from({ length: 19 }, (_, bar) => `M${bar * 6 - 8} 6l6 -6h3l-6 6z`).join('')
  return (
    <svg
      viewBox="0 0 100 6"
      preserveAspectRatio="xMidYMid slice"
      aria-hidden="true"
      className={classNames('block w-full shrink-0', className)}
    >
      <path d={bars} fill="#000" />
    </svg>
  )
}

function TickRing({ className }: { className: string }) {
  return (
    <svg viewBox="0 0 24 24" aria-hidden="true" fill="none" stroke="#000" className={className}>
      <circle cx={12} cy={12} r={10.4} strokeWidth={2.4} />
      <path d="M7 12.4L10.8 16.2L17.2 8.2" strokeWidth={2.8} />
    </svg>
  )
}

function Octagon({ className }: { className: string }) {
  return (
    <svg viewBox="0 0 24 24" aria-hidden="true" className={className}>
      <path d="M7.03 0H16.97L24 7.03V16.97L16.97 24H7.03L0 16.97V7.03Z" fill="#000" />
      <path d="M5.4 9.6h13.2v4.8H5.4z" fill="#fff" />
    </svg>
  )
}

/** Two long names share the width of a small tag by taking two lines each. */
const LONG_NAMES = 46

function Head({ tag, size }: { tag: PublicTag; size: TagSize }) {
  const small = size === 'small'
  const name = pressWords(tag)
  const long = name.length + tag.shopName.length > LONG_NAMES
  return (
    <div className={classNames('flex shrink-0 justify-between gap-x-[3mm]', small ? 'items-baseline' : 'flex-col')}>
      <p
        className={classNames(
          'line-clamp-2 min-w-0 leading-[1.15] font-semibold',
          small ? (long ? 'text-[2.9mm]' : 'text-[3.7mm]') : 'text-[5mm]',
        )}
      >
        {name}
      </p>
      <p
        className={classNames(
          'line-clamp-2 leading-[1.2]',
          small ? classNames('max-w-[38mm] shrink-0 text-right', long ? 'text-[2.4mm]' : 'text-[2.9mm]') : 'text-[3.4mm]',
        )}
      >
        {tag.shopName}
      </p>
    </div>
  )
}

function Code({ address, code, className }: { address: string; code: string; className: string }) {
  return (
    <div className="shrink-0 text-center">
      <QrCode text={address} className={classNames('block', className)} />
      <p className="-mt-[1mm] font-mono text-[2.15mm] leading-[1.2] tracking-tight">{spelled(code)}</p>
    </div>
  )
}

function Paragraphs({ paragraphs }: { paragraphs: readonly SmallPrint[] }) {
  return paragraphs.map(({ lead, rest }) => (
    <p key={`${lead}${rest}`}>
      {lead !== '' && <strong className="font-semibold">{lead} </strong>}
      {rest}
    </p>
  ))
}

type Given = { tag: PublicTag; address: string; code: string; size: TagSize; onFull: (full: boolean) => void }

type LoadSizes = readonly [short: string, medium: string, long: string]
const NUMBER: Record<TagSize, LoadSizes> = {
  small: ['text-[15mm]', 'text-[13.5mm]', 'text-[9mm]'],
  a6: ['text-[21mm]', 'text-[19mm]', 'text-[13mm]'],
}

function Load({ words, size }: { words: ReturnType<typeof tagWords>; size: TagSize }) {
  const small = size === 'small'
  // A longer figure or unit, such as 104.2 metric tons-force, takes the same room in a smaller size.
  const { length } = words.load
  const number = NUMBER[size][length > 5 ? 2 : length > 4 ? 1 : 0]
  const long = words.unit.split(' ').some((word) => word.length > 6)
  const unit = small ? (long ? 'text-[4.4mm]' : 'text-[5.6mm]') : long ? 'text-[6.2mm]' : 'text-[8mm]'
  return (
    <div className="min-w-0">
      <p
        className={classNames(
          'flex items-center font-semibold',
          small ? 'gap-[1.6mm] text-[3.9mm] leading-[5.4mm]' : 'gap-[2.4mm] text-[5.2mm] leading-[7.6mm]',
        )}
      >
        <TickRing className={small ? 'size-[5.4mm]' : 'size-[7.6mm]'} />
        Cleared up to
      </p>
      <p className={classNames('flex items-center font-bold', small ? 'gap-[2mm]' : 'gap-[3mm]')}>
        <span className={classNames('leading-[0.84] tracking-[-0.02em] whitespace-nowrap', number)}>{words.load}</span>{' '}
        <span className={classNames('w-min leading-[1.02]', unit)}>{words.unit}</span>
      </p>
      {words.loadNote !== '' && (
        <p className={small ? 'text-[2.6mm] leading-[1.1]' : 'mt-[0.6mm] text-[3.5mm] leading-[1.2]'}>{words.loadNote}.</p>
      )}
    </div>
  )
}

function Limits({ words, small }: { words: ReturnType<typeof tagWords>; small: boolean }) {
  const label = small ? 'text-[2.7mm] leading-[1.2]' : 'text-[3.6mm] leading-[1.3]'
  return (
    <>
      <div>
        <p className={label}>{words.gaugeLabel}</p>
        <p className={classNames('font-bold whitespace-nowrap', small ? 'text-[5.4mm] leading-[1.15]' : 'text-[8mm] leading-[1.2]')}>
          {words.gaugeLimit}
        </p>
      </div>
      <div>
        <p className={label}>Until</p>
        <p className={classNames('font-bold', small ? 'text-[4mm] leading-[1.15]' : 'text-[5.6mm] leading-[1.2]')}>{words.until}</p>
      </div>
    </>
  )
}

function Foot({ children, size }: { children: ReactNode; size: TagSize }) {
  return (
    <div
      className={classNames(
        'shrink-0 border-t-[0.4mm] border-black font-condensed font-medium',
        size === 'small' ? 'px-[2.4mm] py-[0.7mm] text-[2.2mm] leading-[1.2]' : 'px-[4mm] py-[1.2mm] text-[2.7mm] leading-[1.22]',
      )}
    >
      {children}
    </div>
  )
}

function Cleared({ tag, clearance, address, code, size, onFull }: Given & { clearance: TagClearance }) {
  const small = size === 'small'
  // A long list of what was not measured gives way before the rest is set too small to read.
  const [tight, setTight] = useState(false)
  const words = tagWords(clearance, tag.noChangeSince, small || tight ? 'short' : 'ample')
  const { box, full } = useSmallPrint(`${size} ${JSON.stringify(words.smallPrint)}`)
  useEffect(() => {
    if (full && !small && !tight) setTight(true)
    else onFull(full)
  }, [full, small, tight, onFull])
  const foot = (
    <Foot size={size}>
      <p>
        {words.clearedBy} <span className="whitespace-nowrap">Test {words.test}.</span>
      </p>
      <p>
        {words.changes} Printed {dateAndTime(tag.asOf)}; the code says how it stands now.
      </p>
    </Foot>
  )
  const print = (
    <div
      ref={box}
      className={classNames(
        'tag-small-print min-h-0 min-w-0 grow overflow-clip font-condensed',
        small ? '[--tag-print:2.5mm]' : 'space-y-[0.7mm] [--tag-print:3.3mm]',
      )}
    >
      <Paragraphs paragraphs={words.smallPrint} />
    </div>
  )
  if (small) {
    return (
      <>
        <div className="shrink-0 px-[2.4mm] pt-[1.2mm]">
          <Head tag={tag} size={size} />
          <Edge />
          <div className="flex justify-between gap-[2mm] pt-[0.8mm] pb-[0.4mm]">
            <Load words={words} size={size} />
            <Code address={address} code={code} className="-mr-[1.2mm] size-[21.5mm]" />
          </div>
        </div>
        <div className="flex min-h-0 grow border-t-[0.4mm] border-black">
          <div className="flex shrink-0 flex-col justify-evenly border-r-[0.3mm] border-black px-[2.4mm]">
            <Limits words={words} small />
          </div>
          <div className="flex min-h-0 min-w-0 grow px-[2mm] py-[0.8mm]">{print}</div>
        </div>
        {foot}
      </>
    )
  }
  return (
    <>
      <div className="shrink-0 px-[4mm] pt-[3mm]">
        <Head tag={tag} size={size} />
        <div className="pt-[0.4mm]">
          <Edge />
        </div>
        <div className="pt-[1.4mm] pb-[1.4mm]">
          <Load words={words} size={size} />
        </div>
      </div>
      <div className="flex shrink-0 border-t-[0.4mm] border-black">
        <div className="flex grow flex-col justify-evenly border-r-[0.3mm] border-black px-[4mm] py-[1mm]">
          <Limits words={words} small={false} />
        </div>
        <div className="p-[0.6mm]">
          <Code address={address} code={code} className="size-[29mm]" />
        </div>
      </div>
      <div className="flex min-h-0 grow border-t-[0.4mm] border-black px-[4mm] py-[1.2mm]">{print}</div>
      {foot}
    </>
  )
}

function Shut({ tag, answer, address, code, size, onFull }: Given & { answer: Exclude<PublicTag['answer'], { is: 'cleared' }> }) {
  const small = size === 'small'
  const { why, since } = shutWords(answer)
  const { box, full } = useSmallPrint(`${size} ${why}`)
  useEffect(() => onFull(full), [full, onFull])
  return (
    <>
      <Stripes className={small ? 'h-[5mm]' : 'h-[8mm]'} />
      <div className={classNames('flex min-h-0 grow flex-col', small ? 'px-[2.4mm] pt-[1.4mm] pb-[1mm]' : 'px-[4mm] py-[3mm]')}>
        <Head tag={tag} size={size} />
        <p
          className={classNames(
            'flex shrink-0 items-center font-bold tracking-[-0.01em]',
            small ? 'gap-[2.4mm] py-[1.2mm] text-[12mm] leading-[12mm]' : 'gap-[4mm] py-[4mm] text-[17mm] leading-[16.5mm]',
          )}
        >
          <Octagon className={small ? 'size-[11mm] shrink-0' : 'size-[24mm] shrink-0'} />
          DO NOT USE
        </p>
        <div className={classNames('flex min-h-0 grow', small ? 'gap-[2mm]' : 'flex-col justify-between gap-[3mm]')}>
          <div
            ref={box}
            className={classNames(
              'tag-small-print min-h-0 min-w-0 grow overflow-clip',
              small ? '[--tag-print:3.6mm]' : '[--tag-print:5.4mm]',
            )}
          >
            <p className="font-semibold">{why}</p>
            {since !== null && <p>Since {since}.</p>}
            <p className="mt-[0.4em]">Whoever loads it loads a frame that nobody answers for.</p>
          </div>
          <div className={classNames('flex items-end', !small && 'gap-[3mm]')}>
            <Code address={address} code={code} className={small ? 'size-[24mm]' : 'size-[36mm]'} />
            {!small && (
              <p className="pb-[4mm] text-[3.4mm] leading-[1.25]">
                This tag comes off when the press is cleared again. Scan the code to see how it stands.
              </p>
            )}
          </div>
        </div>
      </div>
      <Foot size={size}>
        Printed {dateAndTime(tag.asOf)}. {small && 'It comes off when the press is cleared again.'}
      </Foot>
      <Stripes className={small ? 'h-[5mm]' : 'h-[8mm]'} />
    </>
  )
}

/** A press's tag as it is printed: what it may carry and what ends that, or that nobody uses it. */
export function TagPaper(given: Given) {
  const { answer } = given.tag
  return (
    <article aria-label="The tag" className="tag-paper p-[1.5mm] font-sans" data-size={given.size}>
      <div className="flex h-full flex-col border-[0.5mm] border-black">
        {answer.is === 'cleared' ? <Cleared {...given} clearance={answer.clearance} /> : <Shut {...given} answer={answer} />}
      </div>
    </article>
  )
}
