/**
 * The wall strip's numbers: one loop's perimeter unrolled, arc length across. Lengths in mm, tilts in degrees
 * from vertical without sign (what the head has to lean).
 */
export interface StripEdge {
  readonly edge: number
  readonly length: number
  /** Largest whole jet tilt along the edge. */
  readonly tilt: number
  /** Jet tilt of the seam at the corner where the edge starts; null where there is no single seam. */
  readonly cornerTilt: number | null
}

export interface StripCell {
  readonly edge: number
  readonly from: number
  readonly to: number
}

export interface StripPoint {
  readonly s: number
  readonly tilt: number
}

export interface Breach {
  readonly from: number
  readonly to: number
  /** The line inside the breach, closed along the limit: a polygon to hatch. */
  readonly outline: readonly StripPoint[]
}

/** Share of an edge over which the line climbs to the corner, at most; the real length comes with the corner moves. */
const RAMP_SHARE = 1 / 3

export function cellsOf(edges: readonly StripEdge[]): StripCell[] {
  let s = 0
  return edges.map(({ edge, length }) => ({ edge, from: s, to: (s += length) }))
}

export function perimeterOf(edges: readonly StripEdge[]): number {
  return edges.reduce((sum, { length }) => sum + length, 0)
}

/**
 * The jet tilt needed along the way. Each edge is a plateau; at a corner the line climbs to the seam's tilt
 * over `rampLength` (or a third of a shorter edge), and where there is no single seam it steps.
 */
export function tiltLine(edges: readonly StripEdge[], rampLength: number): StripPoint[] {
  const cells = cellsOf(edges)
  const raw = edges.flatMap(({ length, tilt, cornerTilt }, i) => {
    const { from, to } = cells[i]!
    const ramp = Math.min(rampLength, length * RAMP_SHARE)
    const nextCorner = edges[(i + 1) % edges.length]!.cornerTilt
    return [
      { s: from, tilt: cornerTilt ?? tilt },
      { s: from + ramp, tilt },
      { s: to - ramp, tilt },
      { s: to, tilt: nextCorner ?? tilt },
    ]
  })
  return raw.filter((point, i) => i === 0 || point.s !== raw[i - 1]!.s || point.tilt !== raw[i - 1]!.tilt)
}

/** Where the line runs above a limit; touching it is allowed. */
export function breachesOf(line: readonly StripPoint[], limit: number): Breach[] {
  const breaches: Breach[] = []
  let outline: StripPoint[] = []
  const close = () => {
    if (outline.length > 1) {
      breaches.push({ from: outline[0]!.s, to: outline.at(-1)!.s, outline })
    }
    outline = []
  }
  line.forEach((point, i) => {
    const before = line[i - 1]
    const over = point.tilt > limit
    const wasOver = before !== undefined && before.tilt > limit
    if (over && !wasOver) {
      const s = before === undefined ? point.s : crossing(before, point, limit)
      outline = [{ s, tilt: limit }]
    }
    if (over) outline.push(point)
    if (!over && wasOver) {
      outline.push({ s: crossing(before, point, limit), tilt: limit })
      close()
    }
  })
  if (outline.length > 0) {
    outline.push({ s: outline.at(-1)!.s, tilt: limit })
    close()
  }
  return breaches
}

function crossing(a: StripPoint, b: StripPoint, limit: number): number {
  return a.s + ((b.s - a.s) * (limit - a.tilt)) / (b.tilt - a.tilt)
}

/** The tilt at a place along the line; at a step, the larger side. */
export function tiltAt(line: readonly StripPoint[], s: number): number | null {
  let best: number | null = null
  for (let i = 1; i < line.length; i += 1) {
    const a = line[i - 1]!
    const b = line[i]!
    if (s < a.s || s > b.s) continue
    const tilt =
      a.s === b.s ? Math.max(a.tilt, b.tilt) : a.tilt + ((b.tilt - a.tilt) * (s - a.s)) / (b.s - a.s)
    best = best === null ? tilt : Math.max(best, tilt)
  }
  return best
}

export function cellAt(cells: readonly StripCell[], s: number): StripCell | null {
  return cells.find(({ from, to }) => s >= from && s <= to) ?? null
}

/** A cell as drawn: one edge, or several too narrow to tell apart. */
export interface DrawnCell {
  readonly edges: readonly number[]
  readonly from: number
  readonly to: number
}

/** Neighbours narrower than `least` mm on the page are drawn as one, until they are wide enough. */
export function drawnCells(cells: readonly StripCell[], least: number): DrawnCell[] {
  const drawn: { edges: number[]; from: number; to: number }[] = []
  for (const { edge, from, to } of cells) {
    const last = drawn.at(-1)
    const narrow = to - from < least
    if (last !== undefined && last.to - last.from < least && narrow) {
      last.edges.push(edge)
      last.to = to
    } else {
      drawn.push({ edges: [edge], from, to })
    }
  }
  return drawn
}

/** The top of the tilt axis: the next 15° above everything shown. */
export function axisTop(line: readonly StripPoint[], limits: readonly number[]): number {
  const highest = Math.max(...line.map(({ tilt }) => tilt), ...limits, 0)
  return Math.min(90, Math.max(30, Math.ceil((highest + 3) / 15) * 15))
}

/** Names that fit: an edge keeps its label when it is wide enough for it, in mm at the present scale. */
export function labelled(cells: readonly DrawnCell[], widthOf: (edge: number) => number): Set<number> {
  const kept = new Set<number>()
  for (const { edges, from, to } of cells) {
    const [edge] = edges
    if (edges.length === 1 && edge !== undefined && to - from >= widthOf(edge)) kept.add(edge)
  }
  return kept
}
