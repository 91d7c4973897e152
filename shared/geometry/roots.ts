/** Real roots of a·t² + b·t + c in rising order, without cancellation; none for a constant. A double root comes once. */
export function quadraticRoots(a: number, b: number, c: number): number[] {
  if (a === 0) return b === 0 ? [] : [-c / b]
  const discriminant = b * b - 4 * a * c
  if (discriminant < 0) return []
  if (discriminant === 0) return [-b / (2 * a)]
  const q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(discriminant)) / 2
  const roots = [q / a, c / q]
  return roots[0]! <= roots[1]! ? roots : roots.reverse()
}
