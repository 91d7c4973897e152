import type { Place, Rect } from './place.ts'

/** Radius of a balloon, px; the button round it is larger where fingers are used. */
export const BALLOON_RADIUS = 11
/** How far a balloon stands from its place, px, and the turns away from "outward" that are tried. */
const ARMS = [34, 52]
const TURNS = [0, 0.6, -0.6, 1.2, -1.2, 2.2, -2.2]
/** Points of a leader, as shares of it, that other texts keep clear of. */
const KEPT_CLEAR = [0.1, 0.4, 0.7]
/** Gaps between a mark and its text, px. */
const GAPS = [3, 14, 30]

interface Point {
  readonly x: number
  readonly y: number
}

/** Places for a balloon round its point, away from the middle of the picture first. */
export function balloonPlaces(from: Point, middle: Point): Place[] {
  const outward = Math.atan2(from.y - middle.y, from.x - middle.x)
  return ARMS.flatMap((arm) =>
    TURNS.map((turn) => ({
      x: from.x + Math.cos(outward + turn) * arm,
      y: from.y + Math.sin(outward + turn) * arm,
    })),
  )
}

/** Places for a text round a mark: right, left, below, above, then the same farther off. */
export function besidePlaces({ x, y }: Point, size: { width: number; height: number }): Place[] {
  return GAPS.flatMap((gap) => {
    const dx = BALLOON_RADIUS + gap + size.width / 2
    const dy = BALLOON_RADIUS + gap + size.height / 2
    return [
      { x: x + dx, y },
      { x: x - dx, y },
      { x, y: y + dy },
      { x, y: y - dy },
    ]
  })
}

/** The hairline from a point to the rim of its balloon, and what it occupies. */
export function balloonLeader(from: Point, at: Point): { path: string; taken: Rect[] } {
  const share = Math.max(0, 1 - BALLOON_RADIUS / Math.hypot(at.x - from.x, at.y - from.y))
  const on = (part: number) => ({
    x: from.x + (at.x - from.x) * part * share,
    y: from.y + (at.y - from.y) * part * share,
  })
  return { path: line(from, on(1)), taken: KEPT_CLEAR.map((part) => squareRound(on(part), 1)) }
}

/** The hairline from an edge to its label: it ends where it meets the text's box. */
export function labelLeader(
  anchor: Point,
  at: Point,
  box: { readonly width: number; readonly height: number },
): string {
  const dx = at.x - anchor.x
  const dy = at.y - anchor.y
  const inside = Math.min(box.width / 2 / Math.abs(dx), box.height / 2 / Math.abs(dy))
  const share = Math.max(0, 1 - inside)
  return line(anchor, { x: anchor.x + dx * share, y: anchor.y + dy * share })
}

export function squareRound(at: Point, radius: number): Rect {
  return { left: at.x - radius, top: at.y - radius, width: radius * 2, height: radius * 2 }
}

function line(from: Point, to: Point): string {
  return `M${from.x.toFixed(1)} ${from.y.toFixed(1)}L${to.x.toFixed(1)} ${to.y.toFixed(1)}`
}
