import { triangulate } from '../geometry/triangulate.ts'
import type { Point } from '../geometry/types.ts'
import { CornerMode, frameOf, type Frame } from '../contours/frame.ts'
import { blendsAt } from '../contours/places.ts'
import { spiralPoint } from '../contours/spiral.ts'
import { chordsPerEdge, meshLevels, type LevelRuns, type MeshLevel } from './mesh-levels.ts'
import { meshLines } from './mesh-lines.ts'
import { soundRange } from '../events/range.ts'
import { MeshSink } from './mesh-sink.ts'
import type { Body } from '../walls/types.ts'
import type { BodyMesh } from './types.ts'
import { facetIndexAt } from '../walls/wall.ts'

/**
 * Triangles of the body over its sound range (`soundRange`); null when that has no depth. Arcs become chords
 * that depart from them by at most `chordTolerance` mm at every level; lines are exact.
 */
export function meshOf(body: Body, chordTolerance: number): BodyMesh | null {
  const { from, to, empty } = soundRange(body)
  if (empty || !(to > from)) return null
  const frame = frameOf(body)
  const levels = meshLevels(frame, from, to, chordTolerance)
  const chords = chordsPerEdge(frame, levels, chordTolerance)
  const runs = levels.map((level) => levelRuns(frame, level, chords))
  const sink = new MeshSink()
  addLid(sink, frame, runs[0]!, from, 'top')
  addLid(sink, frame, runs.at(-1)!, to, 'bottom')
  for (let g = 0; g < frame.count; g++) {
    addWall(sink, frame, g, levels, runs)
    if (frame.mode[g] === CornerMode.step) addStep(sink, frame, g, levels)
  }
  return sink.finish(meshLines(frame, levels, runs), to)
}

function levelRuns(frame: Frame, { places, sweep }: MeshLevel, chords: Int32Array): LevelRuns {
  return frame.segments.map((segment, g) => {
    const start = { x: places.sx[g]!, y: places.sy[g]! }
    const end = { x: places.ex[g]!, y: places.ey[g]! }
    if (segment.kind === 'line') return lineRun(start, end, chords[g]!)
    const { x: cx, y: cy } = segment.centre
    if (blendsAt(frame, g)) {
      const [fromRadius, toRadius] = [start, end].map(({ x, y }) => Math.hypot(x - cx, y - cy)) as [
        number,
        number,
      ]
      const spiral = { centre: segment.centre, from: start, to: end, fromRadius, toRadius, sweep: sweep[g]! }
      return Array.from({ length: chords[g]! + 1 }, (_, i) => spiralPoint(spiral, i / chords[g]!))
    }
    const radius = (Math.hypot(start.x - cx, start.y - cy) + Math.hypot(end.x - cx, end.y - cy)) / 2
    const heading = Math.atan2(start.y - cy, start.x - cx)
    const run = [start]
    for (let i = 1; i < chords[g]!; i++) {
      const angle = heading + (i / chords[g]!) * sweep[g]!
      run.push({ x: cx + radius * Math.cos(angle), y: cy + radius * Math.sin(angle) })
    }
    run.push(end)
    return run
  })
}

/** Both ends exactly, and the points between the chords of one that blends. */
function lineRun(start: Point, end: Point, chords: number): readonly Point[] {
  const run = [start]
  for (let i = 1; i < chords; i++) {
    const share = i / chords
    run.push({ x: start.x + share * (end.x - start.x), y: start.y + share * (end.y - start.y) })
  }
  run.push(end)
  return run
}

function addLid(sink: MeshSink, frame: Frame, runs: LevelRuns, depth: number, kind: 'top' | 'bottom'): void {
  const rings = frame.body.loops.map((_, l) => {
    const ring: Point[] = []
    for (let g = frame.loopStart[l]!; g < frame.loopStart[l + 1]!; g++) {
      const run = runs[g]!
      ring.push(...run.slice(0, -1))
      const end = run.at(-1)!
      const start = runs[frame.next[g]!]![0]!
      if (end.x !== start.x || end.y !== start.y) ring.push(end)
    }
    return ring
  })
  const up = kind === 'top' ? 1 : -1
  const first = sink.vertexCount
  for (const ring of rings) for (const point of ring) sink.vertex(point, depth, 0, 0, up)
  const face = sink.face({ kind })
  const triangles = triangulate(rings)
  for (let t = 0; t < triangles.length; t += 3) {
    const [a, b, c] = [first + triangles[t]!, first + triangles[t + 1]!, first + triangles[t + 2]!]
    if (kind === 'top') sink.triangle(face, a, b, c)
    else sink.triangle(face, a, c, b)
  }
}

/** One face per facet; the normal is (n cos β, sin β), n following an arc. */
function addWall(
  sink: MeshSink,
  frame: Frame,
  g: number,
  levels: readonly MeshLevel[],
  runs: readonly LevelRuns[],
): void {
  const wall = frame.table.walls[frame.table.rowOfEdge[g]!]!
  const loop = frame.loopOf[g]!
  const segment = frame.segments[g]!
  let face = -1
  let faceFacet = -1
  for (let i = 1; i < levels.length; i++) {
    const [above, below] = [levels[i - 1]!, levels[i]!]
    const facet = facetIndexAt(wall, above.depth)
    if (facet !== faceFacet) {
      face = sink.face({ kind: 'wall', loop, edge: frame.edgeOf[g]!, facet })
      faceFacet = facet
    }
    const strip = {
      top: runs[i - 1]![g]!,
      topDepth: above.depth,
      bottom: runs[i]![g]!,
      bottomDepth: below.depth,
    }
    if (blendsAt(frame, g)) {
      const centre = segment.kind === 'arc' ? segment.centre : null
      addTwisted(sink, face, strip, centre && { centre, above: above.sweep[g]!, below: below.sweep[g]! })
      continue
    }
    const tilt = wall.facets[facet]!.tilt
    const normals = runs[i - 1]![g]!.map((point): Point => {
      if (segment.kind === 'line') return outward(segment.from, segment.to)
      const out = Math.sign(segment.sweep)
      const [dx, dy] = [(point.x - segment.centre.x) * out, (point.y - segment.centre.y) * out]
      const size = Math.hypot(dx, dy)
      return size > 0 ? { x: dx / size, y: dy / size } : outward(segment.from, segment.to)
    })
    addStrip(sink, face, strip, normals, tilt)
  }
}

function addStep(sink: MeshSink, frame: Frame, g: number, levels: readonly MeshLevel[]): void {
  const loop = frame.loopOf[g]!
  const p = frame.previous[g]!
  const ends = ({ places }: MeshLevel): [Point, Point] => [
    { x: places.ex[p]!, y: places.ey[p]! },
    { x: places.sx[g]!, y: places.sy[g]! },
  ]
  let face = -1
  for (let i = 1; i < levels.length; i++) {
    const [above, below] = [levels[i - 1]!, levels[i]!]
    const [top, bottom] = [ends(above), ends(below)]
    const wide = isSpot(top) ? bottom : top
    if (isSpot(wide)) continue
    if (face < 0) face = sink.face({ kind: 'step', loop, vertex: frame.edgeOf[g]! })
    const normal = outward(...wide)
    addStrip(
      sink,
      face,
      { top, topDepth: above.depth, bottom, bottomDepth: below.depth },
      [normal, normal],
      0,
    )
  }
}

function isSpot([a, b]: readonly [Point, Point]): boolean {
  return a.x === b.x && a.y === b.y
}

/** Two runs of as many points, one above the other. */
interface Strip {
  readonly top: readonly Point[]
  readonly topDepth: number
  readonly bottom: readonly Point[]
  readonly bottomDepth: number
}

function addStrip(sink: MeshSink, face: number, strip: Strip, normals: readonly Point[], tilt: number): void {
  const { top, topDepth, bottom, bottomDepth } = strip
  const [cos, sin] = [Math.cos(tilt), Math.sin(tilt)]
  const first = sink.vertexCount
  for (let i = 0; i < top.length; i++) {
    const n = normals[i]!
    sink.vertex(top[i]!, topDepth, n.x * cos, n.y * cos, sin)
    sink.vertex(bottom[i]!, bottomDepth, n.x * cos, n.y * cos, sin)
  }
  addQuads(sink, face, first, top.length)
}

/**
 * A wall that blends: at each point the normal is (n, w) of unit length, n square to the contour there and w how fast
 * the wall moves along n with depth, the tangent of the local tilt. `arc`: its centre, and its sweep at both depths.
 */
function addTwisted(
  sink: MeshSink,
  face: number,
  { top, topDepth, bottom, bottomDepth }: Strip,
  arc: { readonly centre: Point; readonly above: number; readonly below: number } | null,
): void {
  const first = sink.vertexCount
  for (let i = 0; i < top.length; i++) {
    const [t, b] = [top[i]!, bottom[i]!]
    const [dx, dy] = [(b.x - t.x) / (bottomDepth - topDepth), (b.y - t.y) / (bottomDepth - topDepth)]
    for (const [run, depth, sweep] of [
      [top, topDepth, arc?.above ?? 0],
      [bottom, bottomDepth, arc?.below ?? 0],
    ] as const) {
      const n = arc ? outwardOfSpiral(run, i, arc.centre, sweep) : outward(run[0]!, run.at(-1)!)
      const w = n.x * dx + n.y * dy
      const size = Math.hypot(1, w)
      sink.vertex(run[i]!, depth, n.x / size, n.y / size, w / size)
    }
  }
  addQuads(sink, face, first, top.length)
}

/** Right of a spiral's travel: along it the radius changes by (r₁ − r₀)/sweep for each radian. */
function outwardOfSpiral(run: readonly Point[], i: number, centre: Point, sweep: number): Point {
  const [from, at, to] = [run[0]!, run[i]!, run.at(-1)!].map(({ x, y }) => ({
    x: x - centre.x,
    y: y - centre.y,
  })) as [Point, Point, Point]
  const radius = Math.hypot(at.x, at.y)
  if (!(radius > 0)) return outward(run[0]!, run.at(-1)!)
  const change = Math.hypot(to.x, to.y) - Math.hypot(from.x, from.y)
  const [rx, ry] = [at.x / radius, at.y / radius]
  return outward(
    { x: 0, y: 0 },
    { x: change * rx - sweep * radius * ry, y: change * ry + sweep * radius * rx },
  )
}

/** Quads between the pairs of vertices laid down from `first`, each cut into two triangles, counter-clockwise seen from outside. */
function addQuads(sink: MeshSink, face: number, first: number, pairs: number): void {
  for (let i = 0; i + 1 < pairs; i++) {
    const [t0, b0, t1, b1] = [first + 2 * i, first + 2 * i + 1, first + 2 * i + 2, first + 2 * i + 3]
    sink.triangle(face, b0, b1, t1)
    sink.triangle(face, b0, t1, t0)
  }
}

function outward(from: Point, to: Point): Point {
  const [dx, dy] = [to.x - from.x, to.y - from.y]
  const size = Math.hypot(dx, dy)
  return { x: dy / size, y: -dx / size }
}
