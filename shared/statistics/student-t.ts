/**
 * Normal and Student t distributions, to about 1e-12 relative in both tails and around the middle.
 *
 * Method: the t distribution through the regularised incomplete beta function as a continued
 * fraction (NIST Digital Library of Mathematical Functions, 8.17.22), the normal distribution
 * through the series and continued fraction of the error function (DLMF 7.6.2, 7.9.1; DLMF numbers
 * from memory). Quantiles invert the same functions, on a logarithmic scale, so that a probability
 * next to zero and one next to a half both keep their digits.
 */

const CONVERGED = 1e-16
const SQRT_PI = Math.sqrt(Math.PI)

/** erf(x) for 0 ≤ x < 2, all terms positive. */
function erfSeries(x: number): number {
  let term = x
  let sum = x
  for (let n = 1; term > sum * CONVERGED; n += 1) {
    term *= (2 * x * x) / (2 * n + 1)
    sum += term
  }
  return ((2 / SQRT_PI) * sum) / Math.exp(x * x)
}

/** erfc(x) for x ≥ 2, by the continued fraction, evaluated by Lentz's method. */
function erfcFraction(x: number): number {
  let value = x
  let c = x
  let d = 0
  for (let n = 1; n < 1000; n += 1) {
    d = 1 / (x + (n / 2) * d)
    c = x + n / 2 / c
    const step = c * d
    value *= step
    if (Math.abs(step - 1) < CONVERGED) break
  }
  return Math.exp(-x * x) / (SQRT_PI * value)
}

/** Probability above z, and between 0 and z, for z ≥ 0 under the standard normal. */
function normalParts(z: number): { above: number; between: number } {
  const x = z / Math.SQRT2
  if (x < 2) {
    const between = erfSeries(x) / 2
    return { above: 0.5 - between, between }
  }
  const above = erfcFraction(x) / 2
  return { above, between: 0.5 - above }
}

const normalDensity = (z: number): number => Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI)

/** What Stirling's formula leaves out of ln Γ(z), for z ≥ 20 (DLMF 5.11.1). */
function stirlingRemainder(z: number): number {
  const w = 1 / (z * z)
  return (1 / 12 - w * (1 / 360 - w * (1 / 1260 - w * (1 / 1680 - w / 1188)))) / z
}

/** Γ(a + ½)/Γ(a), a > 0, without the cancellation of two logarithms of gamma. */
function gammaHalfRatio(a: number): number {
  let product = 1
  let shifted = a
  while (shifted < 20) {
    product *= shifted / (shifted + 0.5)
    shifted += 1
  }
  const exponent = shifted * Math.log1p(0.5 / shifted) - 0.5 + stirlingRemainder(shifted + 0.5) - stirlingRemainder(shifted)
  return product * Math.sqrt(shifted) * Math.exp(exponent)
}

/**
 * I_x(a, b)·B(a, b)/(x^a·y^b) as a continued fraction, with y = 1 − x passed in full precision so
 * that nothing cancels where either is next to one: the form of DiDonato and Morris, ACM TOMS
 * algorithm 708 (1992), from memory, checked against tails computed to fifty digits.
 */
function betaFraction(a: number, b: number, x: number, y: number): number {
  const first = 1 + (x < y ? a - (a + b) * x : (a + b) * y - b)
  const ratio = 1 + 1 / a
  let previousTop = 0
  let previousBottom = 1
  let top = 1
  let value = ratio / first
  let bottom = first / ratio
  let p = 1
  let s = a + 1
  for (let n = 1; n < 100_000; n += 1) {
    const share = n / a
    const w = n * (b - n) * x
    const e = a / s
    const alpha = p * (p + b / a) * e * e * (w * x)
    const beta = n + w / s + ((share + 1) / (ratio + 2 * share)) * (first + n * (y + 1))
    p = share + 1
    s += 2
    const nextTop = alpha * previousTop + beta * top
    const nextBottom = alpha * previousBottom + beta * bottom
    const next = nextTop / nextBottom
    const settled = Math.abs(next - value) <= CONVERGED * next
    previousTop = top / nextBottom
    previousBottom = bottom / nextBottom
    top = next
    bottom = 1
    value = next
    if (settled) break
  }
  return value
}

/** Beyond this, t is the normal distribution with a correction whose error is under 1e-16. */
const NEARLY_NORMAL = 1e8

/** The normal deviate with the same tail as t at a very large number of degrees of freedom. */
function normalEquivalent(t: number, dof: number): number {
  // Past a hundred either tail is smaller than the smallest number there is.
  if (dof === Infinity || t > 100) return t
  const s = t * t
  // Abramowitz and Stegun 26.7.8 and its next term, from memory; checked against the exact tail.
  return t * (1 - (s + 1) / (4 * dof) + (13 * s * s + 8 * s + 3) / (96 * dof * dof))
}

/** ln(ν/(ν + t²)), also where t² is out of range. */
function logShare(t: number, dof: number): number {
  const ratio = (t / dof) * t
  return Number.isFinite(ratio) ? -Math.log1p(ratio) : Math.log(dof) - 2 * Math.log(t)
}

/** Probability above t, and between 0 and t, for t ≥ 0. */
function studentParts(t: number, dof: number): { above: number; between: number } {
  if (t === 0) return { above: 0.5, between: 0 }
  if (t === Infinity) return { above: 0, between: 0.5 }
  if (dof > NEARLY_NORMAL) return normalParts(normalEquivalent(t, dof))
  const a = dof / 2
  const logX = logShare(t, dof)
  const x = Math.exp(logX)
  const rest = -Math.expm1(logX)
  // x^a (1 − x)^½ / B(a, ½)
  const front = (Math.exp(a * logX) * Math.sqrt(rest) * gammaHalfRatio(a)) / SQRT_PI
  // The mean of the beta distribution parts the two sides, each by the fraction that converges there.
  if (rest * (a + 0.5) > 0.5) {
    const above = (front * betaFraction(a, 0.5, x, rest)) / 2
    return { above, between: 0.5 - above }
  }
  const between = (front * betaFraction(0.5, a, rest, x)) / 2
  return { above: 0.5 - between, between }
}

function studentDensity(t: number, dof: number): number {
  if (dof === Infinity) return normalDensity(t)
  const power = ((dof + 1) / 2) * logShare(t, dof)
  return (gammaHalfRatio(dof / 2) / (Math.sqrt(dof) * SQRT_PI)) * Math.exp(power)
}

function requireDof(dof: number): void {
  if (!(dof > 0)) throw new RangeError('Degrees of freedom must be above zero.')
}

function requireProbability(p: number): void {
  if (!(p >= 0 && p <= 1)) throw new RangeError('A probability lies between 0 and 1.')
}

/**
 * Solves for the point at which a symmetric distribution reaches p: Newton's steps on the
 * logarithm of the point, kept inside a bracket that halves when a step would leave it.
 */
function invert(p: number, parts: (t: number) => { above: number; between: number }, density: (t: number) => number): number {
  requireProbability(p)
  if (p === 0.5) return 0
  if (p === 0 || p === 1) return p === 0 ? -Infinity : Infinity
  const sign = p < 0.5 ? -1 : 1
  const tail = p < 0.5 ? p : 1 - p
  const middle = Math.abs(p - 0.5)
  const byTail = tail < 0.25
  let low = -760
  let high = 709.7
  let s = 0
  for (let step = 0; step < 400; step += 1) {
    const t = Math.exp(s)
    const { above, between } = parts(t)
    const gap = byTail ? Math.log(tail / above) : Math.log(between / middle)
    if (gap > 0) high = s
    else low = s
    const slope = (t * density(t)) / (byTail ? above : between)
    const next = s - gap / slope
    const moved = Number.isFinite(next) && next > low && next < high ? next : (low + high) / 2
    const settled = Math.abs(moved - s) <= 2e-16 * Math.max(1, Math.abs(s))
    s = moved
    if (settled) break
  }
  // With a tiny number of degrees of freedom the point itself can pass the largest number there is.
  return sign * (s > 709.69 ? Infinity : Math.exp(s))
}

/** Probability that a standard normal variable is at most z. No units. Throws nothing. */
export function normalCdf(z: number): number {
  const { above, between } = normalParts(Math.abs(z))
  return z < 0 ? above : 0.5 + between
}

/**
 * The standard normal deviate below which a share p of the distribution lies.
 * @throws RangeError when p is not between 0 and 1.
 */
export function normalQuantile(p: number): number {
  return invert(p, normalParts, normalDensity)
}

/**
 * Probability that Student's t with `dof` degrees of freedom (any real number above zero, Infinity
 * for the normal) is at most t. No units. Values: NIST/SEMATECH e-Handbook 1.3.6.7.2.
 * @throws RangeError when dof is not above zero.
 */
export function studentTCdf(t: number, dof: number): number {
  requireDof(dof)
  const { above, between } = studentParts(Math.abs(t), dof)
  return t < 0 ? above : 0.5 + between
}

/**
 * The value of Student's t below which a share p lies; p = 0.975 serves a two-sided 95 % interval.
 * @throws RangeError when dof is not above zero or p is not between 0 and 1.
 */
export function studentTQuantile(p: number, dof: number): number {
  requireDof(dof)
  return invert(
    p,
    (t) => studentParts(t, dof),
    (t) => studentDensity(t, dof),
  )
}
