/** Milliseconds, in order of size. */
export type Times = number[]

async function timed(work: () => Promise<unknown>): Promise<number> {
  const begun = performance.now()
  await work()
  return performance.now() - begun
}

function sorted(times: Times): Times {
  return times.sort((a, b) => a - b)
}

export function percentile(times: Times, percent: number): number {
  return times[Math.min(times.length - 1, Math.ceil((percent / 100) * times.length) - 1)] ?? Number.NaN
}

/** How often each is done: enough for a hundredth part to be more than one. */
export const SAMPLES = 1_000
const WARM_UP = 100

/**
 * Does each of several things in turn, so that what else the machine does meets all of them alike. Answers the
 * times of each, in the order given.
 */
export async function inTurn(works: readonly (() => Promise<unknown>)[], samples = SAMPLES): Promise<Times[]> {
  for (let count = 0; count < Math.min(WARM_UP, samples); count += 1) for (const work of works) await work()
  const times: Times[] = works.map(() => [])
  for (let count = 0; count < samples; count += 1) {
    for (const [index, work] of works.entries()) times[index]?.push(await timed(work))
  }
  return times.map(sorted)
}

export interface Line {
  what: string
  /** What was measured, with its unit. */
  result: string
  /** What it was measured against in the same run, where it is a ratio. */
  floor: string
  /** In the unit of the budget. */
  value: number
  budget: number
  unit: '×' | 'ms' | 'kB'
}

const milliseconds = (value: number) => `${value.toFixed(2)} ms`

/** A ratio of the slowest hundredth of two. */
export function ratioLine(what: string, times: Times, floorName: string, floor: Times, budget: number): Line {
  const [own, bare] = [percentile(times, 99), percentile(floor, 99)]
  const middle = `median ${milliseconds(percentile(times, 50))}`
  return {
    what,
    result: `p99 ${milliseconds(own)}, ${middle}`,
    floor: `${floorName}: p99 ${milliseconds(bare)}, median ${milliseconds(percentile(floor, 50))}`,
    value: own / bare,
    budget,
    unit: '×',
  }
}

export function medianLine(what: string, times: Times, budget: number): Line {
  const middle = percentile(times, 50)
  const range = `median ${milliseconds(middle)} of ${times.length}, slowest ${milliseconds(times.at(-1) ?? 0)}`
  return { what, result: range, floor: '', value: middle, budget, unit: 'ms' }
}

/** The table as it is printed, and whether everything is within its budget. */
export function tableOf(lines: readonly Line[]): { text: string; isWithin: boolean } {
  const within = (line: Line) => line.value <= line.budget
  const figure = (value: number, unit: Line['unit']) => `${unit === '×' ? value.toFixed(2) : value.toFixed(1)} ${unit}`
  const width = Math.max(...lines.map(({ what }) => what.length))
  const rows = lines.flatMap((line) => {
    const answer = within(line) ? 'within' : 'OVER'
    const head = `${line.what.padEnd(width)}  ${figure(line.value, line.unit).padStart(10)}  budget ${figure(line.budget, line.unit).padStart(9)}  ${answer}`
    return [head, `    ${line.result}`, ...(line.floor === '' ? [] : [`    against ${line.floor}`])]
  })
  return { text: `${rows.join('\n')}\n`, isWithin: lines.every(within) }
}
