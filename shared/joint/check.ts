import type { JointSection, SectionPoint } from './section.ts'

export type JointProblem = 'depths' | 'outermost' | 'narrowest' | 'area' | 'root-face'

/** Rounding of a few dozen additions, as a share of the section's size. */
const ROUNDING = 1e-12

/** What is wrong with a section, worked out from its outline alone. */
export function jointProblems(section: JointSection): JointProblem[] {
  const { thickness, rootOpening, left, right, rootFace } = section
  const problems: JointProblem[] = []
  const size = Math.max(thickness, rootOpening, ...[...left, ...right].map(({ x }) => Math.abs(x)))
  const near = (a: number, b: number, scale: number) => Math.abs(a - b) <= ROUNDING * scale
  const whole = (wall: readonly SectionPoint[]) =>
    wall[0]?.depth === 0 &&
    wall.at(-1)?.depth === thickness &&
    wall.every(({ depth }, i) => i === 0 || depth > (wall[i - 1]?.depth ?? depth))
  if (!whole(left) || !whole(right)) problems.push('depths')
  const tips = near(Math.max(...left.map(({ x }) => x)), 0, size)
  const facing = near(Math.min(...right.map(({ x }) => x)), rootOpening, size)
  if (!tips || !facing) problems.push('outermost')
  // The outermost lines stand the gap apart, so nothing comes closer.
  if (!(section.narrowest >= rootOpening - ROUNDING * size)) problems.push('narrowest')
  // Shoelace round the hollow: down the left wall, up the right one.
  const ring = [...left, ...right.toReversed()]
  const twice = ring.reduce((sum, a, i) => {
    const b = ring[(i + 1) % ring.length] ?? a
    return sum + a.x * b.depth - b.x * a.depth
  }, 0)
  if (!near(Math.abs(twice) / 2, section.area, size * size)) problems.push('area')
  if (!near(rootFace.toDepth - rootFace.fromDepth, rootFace.length, size)) problems.push('root-face')
  return problems
}
