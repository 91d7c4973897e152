/**
 * First zero of a function over [0, end] when all that is known is how far its value can stray from the one
 * in the middle of a span. Spans that cannot hold a zero are dropped, the others halved, earliest first; so no
 * zero is missed, and a near touch counts as one (it is then as good as a touch).
 *
 * @param slack bound on |value(t) − value(middle)| over the span
 */
export function firstZero(
  value: (t: number) => number,
  slack: (from: number, to: number) => number,
  end: number,
): number | null {
  let looks = 0
  const spans: [from: number, to: number][] = [[0, end]]
  for (let span = spans.pop(); span; span = spans.pop()) {
    const [from, to] = span
    const middle = (from + to) / 2
    if (Math.abs(value(middle)) > slack(from, to)) continue
    if (to - from <= end * (++looks > PATIENCE ? COARSE_SPAN : FINE_SPAN)) return polish(value, from, to)
    spans.push([middle, to], [from, middle])
  }
  return null
}

/** Spans are halved down to this share of the whole, so that a zero without a change of sign is told to 13 digits. */
const FINE_SPAN = 2 ** -44

/**
 * A long near touch would take very many such spans. After so many halvings (a plain zero takes some hundred)
 * a coarser span is enough: about as small a share of the distance travelled, 1e-8 mm in a millimetre.
 */
const PATIENCE = 2000
const COARSE_SPAN = 2 ** -27

/** Bisection to the last digit where the sign changes; the middle of the span where it does not (a touch). */
function polish(value: (t: number) => number, from: number, to: number): number {
  const sign = Math.sign(value(from))
  if (sign === 0) return from
  if (Math.sign(value(to)) === sign) return (from + to) / 2
  let [low, high] = [from, to]
  for (let middle = (low + high) / 2; middle > low && middle < high; middle = (low + high) / 2) {
    if (Math.sign(value(middle)) === sign) low = middle
    else high = middle
  }
  return high
}
