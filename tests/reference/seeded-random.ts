/** A seeded source of random numbers (sfc32), so that a Monte-Carlo check comes out alike every time. */
export function seededRandom(seed: number): { rectangular: (halfWidth: number) => number; normal: (u: number) => number } {
  let a = seed >>> 0
  let b = 0x9e3779b9
  let c = 0x243f6a88
  let counter = 1
  const word = () => {
    const out = (((a + b) >>> 0) + counter) >>> 0
    counter = (counter + 1) >>> 0
    a = (b ^ (b >>> 9)) >>> 0
    b = (c + (c << 3)) >>> 0
    c = (((c << 21) | (c >>> 11)) + out) >>> 0
    return out
  }
  for (let warm = 0; warm < 20; warm += 1) word()
  const uniform = () => (word() + 0.5) / 2 ** 32
  return {
    rectangular: (halfWidth) => (2 * uniform() - 1) * halfWidth,
    normal: (u) => u * Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform()),
  }
}

/** Mean, standard deviation and the share of trials within ± U of a value. */
export function simulate(
  trials: number,
  draw: () => number,
  about: { value: number; U: number },
): { mean: number; sd: number; covered: number } {
  let mean = 0
  let squares = 0
  let inside = 0
  for (let n = 1; n <= trials; n += 1) {
    const y = draw()
    const step = y - mean
    mean += step / n
    squares += step * (y - mean)
    if (Math.abs(y - about.value) <= about.U) inside += 1
  }
  return { mean, sd: Math.sqrt(squares / (trials - 1)), covered: inside / trials }
}
