import { triangulate } from '../geometry/triangulate.ts'
import type { Point } from '../geometry/types.ts'
import { CornerMode, frameOf, type Frame } from '../contours/frame.ts'
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
    if (segment.kind === 'line') return [start, end]
    const { x: cx, y: cy } = segment.centre
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
    const tilt = wall.facets[facet]!.tilt
    const normals = runs[i - 1]![g]!.map((point): Point => {
      if (segment.kind === 'line') return outward(segment.from, segment.to)
      const out = Math.sign(segment.sweep)
      const [dx, dy] = [(point.x - segment.centre.x) * out, (point.y - segment.centre.y) * out]
      const size = Math.hypot(dx, dy)
      return size > 0 ? { x: dx / size, y: dy / size } : outward(segment.from, segment.to)
    })
    addStrip(sink, face, runs[i - 1]![g]!, above.depth, runs[i]![g]!, below.depth, normals, tilt)
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
    addStrip(sink, face, top, above.depth, bottom, below.depth, [normal, normal], 0)
  }
}

function isSpot([a, b]: readonly [Point, Point]): boolean {
  return a.x === b.x && a.y === b.y
}

/** Quads between two runs of as many points, each cut into two triangles, counter-clockwise seen from outside. */
function addStrip(
  sink: MeshSink,
  face: number,
  top: readonly Point[],
  topDepth: number,
  bottom: readonly Point[],
  bottomDepth: number,
  normals: readonly Point[],
  tilt: number,
): void {
  const [cos, sin] = [Math.cos(tilt), Math.sin(tilt)]
  const first = sink.vertexCount
  for (let i = 0; i < top.length; i++) {
    const n = normals[i]!
    sink.vertex(top[i]!, topDepth, n.x * cos, n.y * cos, sin)
    sink.vertex(bottom[i]!, bottomDepth, n.x * cos, n.y * cos, sin)
  }
  for (let i = 0; i + 1 < top.length; i++) {
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
