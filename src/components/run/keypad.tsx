import type { ReactElement, ReactNode } from 'react'

interface KeypadProps {
  /** A digit, the decimal mark, or "-". */
  onKey: (key: string) => void
  onBackspace: () => void
  onEnter: () => void
  enterLabel: string
  /** What Enter does next, for example "then left pin". */
  enterNote?: string
  /** What the last Enter of the row will do. */
  enterLast?: string
  decimal?: '.' | ','
  /** Adds a minus sign, for indicators that can read below zero. */
  signed?: boolean
  /** 112 px keys beside a tall Enter, or 56 px keys over a wide one. */
  size?: 'tablet' | 'phone'
  /** Nothing to enter yet: the key is there and says so, but isn't the chalk action of the screen. */
  enterShut?: boolean
}

/** Keeps the focus, and with it the caret, in the field that is being typed. */
const keepFocus = { onMouseDown: (event: { preventDefault: () => void }) => event.preventDefault() }

const PLAIN =
  'flex touch-manipulation select-none items-center justify-center rounded-key border border-rule bg-field text-ink active:bg-hairline'

interface KeyProps {
  name: string
  onPress: () => void
  children: ReactNode
  type: string
}

function Key({ name, onPress, children, type }: KeyProps): ReactElement {
  return (
    <button type="button" aria-label={name} onClick={onPress} className={`${PLAIN} ${type} font-medium`} {...keepFocus}>
      {children}
    </button>
  )
}

function BackspaceMark({ width }: { width: number }): ReactElement {
  return (
    <svg aria-hidden viewBox="0 0 44 32" width={width} height={(width * 32) / 44}>
      <path d="M1.6 16 14.4 2H42V30H14.4Z" fill="none" stroke="currentColor" strokeWidth={2} />
      <path d="m21.6 10.4 11.2 11.2M32.8 10.4 21.6 21.6" fill="none" stroke="currentColor" strokeWidth={2} />
    </svg>
  )
}

const WORDS: Record<string, string> = { '.': 'decimal point', ',': 'decimal comma', '-': 'minus' }

function EnterTall({ label, note, last }: { label: string; note: string | undefined; last: string | undefined }): ReactElement {
  return (
    <>
      <span className="block text-26 font-semibold leading-[34px]">{label}</span>
      {note !== undefined && (
        <>
          <span className="mt-2 block max-w-[84px] text-balance text-16 font-medium leading-[21px]">{note}</span>
          <svg aria-hidden viewBox="0 0 56 24" width={56} height={24} className="mt-4">
            <path d="M0 12H40" stroke="currentColor" strokeWidth={3} />
            <path d="M36 0 56 12 36 24Z" fill="currentColor" />
          </svg>
        </>
      )}
      {last !== undefined && <span className="mt-4 block max-w-[88px] text-16 leading-[19px]">{last}</span>}
    </>
  )
}

const CHALK = 'border-2 border-on-chalk bg-chalk text-on-chalk'
const SHUT = 'border-2 border-dashed border-rule bg-transparent text-graphite'

/** Digits for gloved fingers. A hardware keyboard goes on working: these keys never take the focus. */
export function Keypad(props: KeypadProps): ReactElement {
  const { decimal = '.', signed = false, size = 'tablet', enterShut = false } = props
  const tablet = size === 'tablet'
  const type = tablet ? 'text-46' : 'min-h-14 text-26'
  const key = (text: string): ReactElement => (
    <Key key={text} name={WORDS[text] ?? text} onPress={() => props.onKey(text)} type={type}>
      {text === '-' ? '\u2212' : text}
    </Key>
  )
  const back = (
    <Key key="back" name="Delete the last digit" onPress={props.onBackspace} type={type}>
      <BackspaceMark width={tablet ? 44 : 36} />
    </Key>
  )
  const enterName = [props.enterLabel, props.enterNote].filter((part) => part !== undefined).join(', ')
  const enter = (shape: string, content: ReactNode): ReactElement => (
    <button
      type="button"
      aria-label={enterName}
      aria-disabled={enterShut}
      onClick={() => {
        if (!enterShut) props.onEnter()
      }}
      className={`touch-manipulation select-none rounded-key text-center ${shape} ${enterShut ? SHUT : CHALK}`}
      {...keepFocus}
    >
      {content}
    </button>
  )
  if (!tablet) {
    const feet = signed ? ['-', decimal, '0'] : [decimal, '0']
    return (
      <div role="group" aria-label="Keys" className="grid gap-[6px]">
        <div className="grid grid-cols-3 gap-[5px]">{[...'123456789'].map(key)}</div>
        <div className={`grid gap-[5px] ${signed ? 'grid-cols-4' : 'grid-cols-3'}`}>
          {feet.map(key)}
          {back}
        </div>
        {enter('min-h-14 text-20 font-semibold', props.enterLabel)}
      </div>
    )
  }
  return (
    <div role="group" aria-label="Keys" className="grid h-full min-h-[292px] grid-cols-5 grid-rows-3 gap-[6px]">
      {[...'123'].map(key)}
      {back}
      {signed && key('-')}
      {enter(
        `col-start-5 flex min-h-0 flex-col items-center justify-center ${signed ? 'row-span-2 row-start-2' : 'row-span-3 row-start-1'}`,
        <EnterTall label={props.enterLabel} note={props.enterNote} last={props.enterLast} />,
      )}
      {[...'456'].map(key)}
      {key(decimal)}
      {[...'789'].map(key)}
      {key('0')}
    </div>
  )
}
