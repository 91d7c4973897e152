import fc from 'fast-check'

/** Numbers spread evenly over a range: fast-check's own doubles crowd round 0, where little goes wrong. */
export function spread(min: number, max: number): fc.Arbitrary<number> {
  const STEPS = 1_000_000
  return fc.integer({ min: 0, max: STEPS }).map((step) => min + ((max - min) * step) / STEPS)
}
