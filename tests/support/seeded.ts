/** Numbers that look random and follow from a seed alone, so that a run can be had again. */
export class Seeded {
  private state: number

  constructor(readonly seed: number) {
    this.state = seed >>> 0
  }

  /** From 0 up to, not including, 1. The generator is mulberry32, from memory; any that spreads evenly would do. */
  next(): number {
    this.state = (this.state + 0x6d2b79f5) >>> 0
    let mixed = Math.imul(this.state ^ (this.state >>> 15), this.state | 1)
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296
  }

  /** A whole number from `least` to `most`, both included. */
  between(least: number, most: number): number {
    return least + Math.floor(this.next() * (most - least + 1))
  }

  chance(share: number): boolean {
    return this.next() < share
  }

  pick<T>(from: readonly T[]): T {
    const picked = from[this.between(0, from.length - 1)]
    if (picked === undefined) throw new Error('There is nothing to pick from.')
    return picked
  }

  /** The same things in another order. */
  shuffle<T>(things: readonly T[]): T[] {
    const left = [...things]
    const order: T[] = []
    while (left.length > 0) order.push(...left.splice(this.between(0, left.length - 1), 1))
    return order
  }
}

/** The seed of this run: SEED as given, else a new one. */
export function runSeed(): number {
  const given = Number(process.env['SEED'])
  return Number.isInteger(given) && given > 0 ? given : 1 + Math.floor(Math.random() * 2_147_483_646)
}

/** The whole of it, as `npm run test:faults` asks; `npm test` runs a bounded part. */
export const isFullRun = (): boolean => process.env['FAULTS'] === 'full'

export function pauseFor(milliseconds: number): Promise<void> {
  return new Promise((resolve) => {
    setTimeout(resolve, milliseconds)
  })
}
