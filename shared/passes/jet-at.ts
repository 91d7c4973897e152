import type { JetPath } from './types.ts'

/** A jet line, in the columns of a jet path. */
export interface JetLine {
  readonly x: number
  readonly y: number
  readonly p: number
  readonly q: number
}

/** The jet at a part (0 to 1) of the move that begins at station i, which is not the last of its pass. */
export function jetAt(path: JetPath, i: number, part: number): JetLine {
  const { x, y, p, q } = path
  const j = i + 1
  const sweep = path.sweep[i]!
  const mix = (a: number, b: number) => a + part * (b - a)
  if (sweep === 0) {
    return { x: mix(x[i]!, x[j]!), y: mix(y[i]!, y[j]!), p: mix(p[i]!, p[j]!), q: mix(q[i]!, q[j]!) }
  }
  const [cx, cy] = [path.cx[i]!, path.cy[i]!]
  const a = Math.atan2(y[i]! - cy, x[i]! - cx)
  const b = a + sweep
  const radius = mix(Math.hypot(x[i]! - cx, y[i]! - cy), Math.hypot(x[j]! - cx, y[j]! - cy))
  // Parts of the slope along the radius and across it, at both ends.
  const [ca, sa, cb, sb] = [Math.cos(a), Math.sin(a), Math.cos(b), Math.sin(b)]
  const along = mix(p[i]! * ca + q[i]! * sa, p[j]! * cb + q[j]! * sb)
  const across = mix(q[i]! * ca - p[i]! * sa, q[j]! * cb - p[j]! * sb)
  const heading = a + part * sweep
  const [c, s] = [Math.cos(heading), Math.sin(heading)]
  return {
    x: cx + radius * c,
    y: cy + radius * s,
    p: along * c - across * s,
    q: along * s + across * c,
  }
}
