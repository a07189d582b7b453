/** This device's storage did not do what it was asked: nothing can be kept until it does. */
export class StorageFault extends Error {
  override readonly name = 'StorageFault'
  /** What the person can do about it; empty when there is nothing but to wait. */
  readonly advice: string

  constructor(message: string, advice = '', cause?: unknown) {
    super(message, { cause })
    this.advice = advice
  }
}

const said = (failure: unknown): string =>
  typeof failure === 'object' && failure !== null && 'message' in failure ? String(failure.message) : ''
const nameOf = (failure: unknown): string =>
  typeof failure === 'object' && failure !== null && 'name' in failure ? String(failure.name) : ''

const ADVICE: Record<string, string> = {
  QuotaExceededError: 'Free space on this device: delete what it does not need.',
  VersionError: 'This page is older than another tab of Quarterload: load it again.',
  SecurityError: 'The browser forbids storage here: allow it for this site, or leave the private window.',
}

export function asStorageFault(failure: unknown): StorageFault {
  if (failure instanceof StorageFault) return failure
  return new StorageFault(said(failure), ADVICE[nameOf(failure)] ?? '', failure)
}

/** The sentence over the bench while it stands. */
export function sayFault(fault: StorageFault): string {
  const why = fault.message === '' ? '' : ` (${fault.message.replace(/\.$/, '')})`
  const advice = fault.advice === '' ? '' : ` ${fault.advice}`
  return `This device can’t keep entries${why}. Nothing more is taken in.${advice} Under load: stop, and release. Both go straight to the server.`
}

const LONGEST = 3000

/** A disk that doesn't answer is a disk that refuses: nobody waits at Stop for it. Calls `late` before it rejects. */
export function inTime<T>(work: Promise<T>, late?: () => void): Promise<T> {
  let timer: ReturnType<typeof setTimeout> | undefined
  const overdue = new Promise<never>((_resolve, reject) => {
    timer = setTimeout(() => {
      late?.()
      reject(new StorageFault('the storage does not answer'))
    }, LONGEST)
  })
  return Promise.race([work, overdue]).finally(() => clearTimeout(timer))
}
