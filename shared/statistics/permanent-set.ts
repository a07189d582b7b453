/**
 * The permanent increase in opening that ASME ASP-2010, 3-4.1.1 and 3-4.1.3, allows a shop press
 * after its off-centre and proof loads, m: 0.125 in (the standard prints 3.18 mm).
 */
export const ASP_PERMANENT_INCREASE_LIMIT = 0.003175

/**
 * How much of the full-load deflection may stay after release, m: a fraction of it (m), but no less
 * than two readable increments (m). Common practice, from memory, no source.
 */
export function setLimit(input: { fraction: number; fullDeflection: number; increment: number }): number {
  return Math.max(input.fraction * input.fullDeflection, 2 * input.increment)
}

/**
 * Whether an indicator is too coarse for the set limit: two of its increments (m) are more than the
 * fraction of the expected full-load deflection (m). The plan then asks for a finer one.
 * Common practice, no source.
 */
export function indicatorTooCoarse(input: { fraction: number; fullDeflection: number; increment: number }): boolean {
  return 2 * input.increment > input.fraction * input.fullDeflection * (1 + 1e-9)
}

/**
 * Whether a set is beyond what can be resolved: further from zero than its expanded uncertainty, both
 * in m. After the first climb that calls for a repeat climb. Either way counts: an indicator that
 * reads below its datum has moved too.
 * Source: JCGM 106:2012, clause 8; the repeat climb is common practice.
 */
export function setIsResolved(input: { set: number; U: number }): boolean {
  return Math.abs(input.set) > input.U * (1 + 1e-9)
}

/**
 * Whether the set of a repeat climb, from the datum after the first release, vanishes within its
 * expanded uncertainty, both in m. If it does the first was bedding-in, else the frame yields.
 * Common practice, from memory, no source.
 */
export function secondSetVanishes(input: { set: number; U: number }): boolean {
  return !setIsResolved(input)
}
