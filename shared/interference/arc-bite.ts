import { axisLength, biteBeside, type JetCone, type JetLine } from './jet-cone.ts'
import type { WallLine } from './wall-band.ts'

/** Golden section: the share of a bracket that stays. */
const GOLDEN = (Math.sqrt(5) - 1) / 2

/** Steps that bring an eighth of a turn down to 1e-8 rad; a maximum is flat, so that the bite is right to 1e-16 of the radius. */
const HEADING_STEPS = 38

/** Written by `biteOnArc`: the heading from the centre at which the jet bites deepest. */
export const found = { heading: 0 }

/**
 * The deepest bite of a jet on an arc of a wall at a depth, about (cx, cy). In the jet's metric the arc is a bit of
 * an ellipse: cut at its axes and half-way between, the bite has one maximum on each piece, or is told by the
 * pieces' ends. An arc out of the jet's reach is answered by a bound from above, which is never positive.
 */
export function biteOnArc(
  cone: JetCone,
  line: JetLine,
  depth: number,
  cx: number,
  cy: number,
  wall: WallLine,
): number {
  const { p, q } = line
  const dx = cx - line.x - p * depth
  const dy = cy - line.y - q * depth
  const length = axisLength(line)
  const gap = Math.abs(Math.hypot(dx, dy) - wall.radius)
  // Nowhere does a bite fall by less than this per mm of level distance.
  const fall = (cone.cos - Math.abs(cone.sin) * Math.sqrt(length * length - 1)) / length
  const bound = cone.cos * cone.radius - cone.sin * depth * length - gap * fall
  if (fall > 0 && bound <= 0) return bound
  const biteFrom = (heading: number) =>
    biteBeside(cone, p, q, depth, dx + wall.radius * Math.cos(heading), dy + wall.radius * Math.sin(heading))
  let best = -Infinity
  const offer = (heading: number) => {
    const bite = biteFrom(heading)
    if (bite > best) {
      best = bite
      found.heading = heading
    }
  }
  const from = Math.min(wall.heading, wall.heading + wall.sweep)
  const to = Math.max(wall.heading, wall.heading + wall.sweep)
  offer(from)
  offer(to)
  const lean = Math.atan2(q, p)
  const eighth = Math.PI / 4
  let a = from
  for (let k = Math.floor((from - lean) / eighth) + 1; a < to; k++) {
    const b = Math.min(to, lean + k * eighth)
    offer(b)
    offer(peak(biteFrom, a, b))
    a = b
  }
  return best
}

/** Where a function with one maximum between a and b has it. */
function peak(value: (at: number) => number, a: number, b: number): number {
  let x = b - GOLDEN * (b - a)
  let y = a + GOLDEN * (b - a)
  let [vx, vy] = [value(x), value(y)]
  for (let step = 0; step < HEADING_STEPS; step++) {
    if (vx < vy) {
      a = x
      x = y
      vx = vy
      y = a + GOLDEN * (b - a)
      vy = value(y)
    } else {
      b = y
      y = x
      vy = vx
      x = b - GOLDEN * (b - a)
      vx = value(x)
    }
  }
  return (a + b) / 2
}
