import { expect, test } from 'vitest'
import { soundRange } from '../../../shared/events/range.ts'
import { bodyOf } from '../../../shared/evaluate/evaluate.ts'
import type { Segment } from '../../../shared/geometry/types.ts'
import { passesOf } from '../../../shared/passes/passes.ts'
import { MoveKind, type JetPath } from '../../../shared/passes/types.ts'
import type { Body, Wall } from '../../../shared/walls/types.ts'
import { randomRequest } from '../../support/requests.ts'
import { DEGREE } from '../../support/plates.ts'
import { coneAt, dot, lastsFor, movesOf, nearSide, rulingAt, type Cone, type Vector } from './cone.ts'

/** A second or two on a quiet core: room for a busy one. */
const TIMEOUT = 60_000

/** Promised of every jet that cuts a wall, mm. */
const ON_THE_WALL = 1e-9

/** How far a facet's line, prolonged, stands outside the drawn edge at a depth: section by section, from the datum. */
function facetOffset(body: Body, wall: Wall, facet: number, depth: number): number {
  const ends: (readonly [depth: number, out: number])[] = [[0, 0]]
  for (const { depth: end, tilt } of wall.facets) {
    const [above, out] = ends.at(-1)!
    ends.push([end, out + (end - above) * Math.tan(tilt)])
  }
  const datum =
    body.datum === 'top'
      ? 0
      : body.datum === 'bottom'
        ? ends.at(-1)![1]
        : Math.max(...ends.map(([, out]) => out))
  const [top, out] = ends[facet]!
  return out - datum + (depth - top) * Math.tan(wall.facets[facet]!.tilt)
}

/** Outward unit normal of the drawn edge nearest to a point. */
function outwardAt(edge: Segment, [x, y]: Vector): readonly [number, number] {
  if (edge.kind === 'line') {
    const [dx, dy] = [edge.to.x - edge.from.x, edge.to.y - edge.from.y]
    const length = Math.hypot(dx, dy)
    return [dy / length, -dx / length]
  }
  const [dx, dy] = [x - edge.centre.x, y - edge.centre.y]
  const out = Math.sign(edge.sweep) / Math.hypot(dx, dy)
  return [dx * out, dy * out]
}

/** How far a point stands outside the facet, square to it, mm. */
function outsideFacet(body: Body, edge: Segment, wall: Wall, facet: number, point: Vector): number {
  const [nx, ny] = outwardAt(edge, point)
  const beside =
    edge.kind === 'line'
      ? (point[0] - edge.from.x) * nx + (point[1] - edge.from.y) * ny
      : Math.sign(edge.sweep) * (Math.hypot(point[0] - edge.centre.x, point[1] - edge.centre.y) - edge.radius)
  return (beside - facetOffset(body, wall, facet, point[2])) * Math.cos(wall.facets[facet]!.tilt)
}

/** Of all points of the jet's near side within the plate, how far the worst stands off the facet, mm. */
function worstOff(body: Body, edge: Segment, wall: Wall, facet: number, cone: Cone): number {
  const [nx, ny] = outwardAt(edge, cone.at)
  const { tilt } = wall.facets[facet]!
  // Outward normal of the facet with depth downward: a wall that goes outward looks up.
  const near = nearSide(cone, [nx * Math.cos(tilt), ny * Math.cos(tilt), -Math.sin(tilt)])
  let worst = 0
  for (const part of [0, 0.23, 0.5, 0.81, 1]) {
    const point = rulingAt(cone, near, part * body.thickness)
    const s = dot([point[0] - cone.at[0], point[1] - cone.at[1], point[2]], cone.axis)
    if (s < lastsFor(cone)) worst = Math.max(worst, Math.abs(outsideFacet(body, edge, wall, facet, point)))
  }
  return worst
}

test(
  'every jet that cuts a wall lies on it, taper of both signs, lines and arcs, 120 set-ups',
  { timeout: TIMEOUT },
  () => {
    let set = 0
    let leans = 0
    const cuts = { line: 0, arc: 0 }
    const facets = new Set<number>()
    let worst = 0
    for (let seed = 1; set < 120; seed++) {
      const request = randomRequest(seed, { steepest: 50, arcs: seed % 2 === 0, cuttable: true })
      if (!request) continue
      const body = bodyOf(request)
      if (soundRange(body).event) continue
      set++
      const jet = { kerf: request.jet!.kerf!, taper: (seed % 3 === 0 ? 0 : request.jet!.taper!) * DEGREE }
      const { path } = passesOf(body, jet, { tilt: seed % 5 === 0 ? 30 * DEGREE : null })
      const edges = body.loops.flatMap((loop, l) =>
        loop.map((edge, e) => ({ edge, wall: body.walls[l]![e]! })),
      )
      for (const i of movesOf(path)) {
        const { edge, wall } = edges[path.edge[i]!] ?? {}
        if (!edge || !wall) continue
        const lean = path.move[i] === MoveKind.lean
        // A jet that leans on a cone leaves it by the second order; with taper a lean stands off by a stated little.
        if (lean ? edge.kind === 'arc' || jet.taper !== 0 : path.move[i] !== MoveKind.cut) continue
        if (lean) leans++
        else cuts[edge.kind]++
        facets.add(path.facet[i]!)
        for (const part of [0, 0.37, 0.5, 0.9, 1]) {
          worst = Math.max(worst, worstOff(body, edge, wall, path.facet[i]!, coneAt(path, jet, i, part)))
        }
      }
    }
    expect(Math.min(cuts.line, cuts.arc, leans)).toBeGreaterThan(100)
    expect([...facets].sort()).toEqual([0, 1, 2])
    expect(worst).toBeLessThan(ON_THE_WALL)
  },
)

/** What a lean with taper may stand off its wall at its worst, mm (see the passes' notes). */
const LEAN_STANDS_OFF = 0.005

/**
 * Where the near side meets the top face above the axis' own crossing, the bend of a lean works the other way round:
 * there the jet enters by up to 8.2e-5 mm up to 60°, as measured. Only to be made less.
 */
const ENTERS_AT_TOP = 1e-4

/** A common head's limit, radians (common practice, no source). */
const STEEPEST = 60 * DEGREE

/** The whole tilt at the steeper end of a move. */
function steepestOf({ p, q }: JetPath, i: number): number {
  return Math.atan(Math.max(Math.hypot(p[i]!, q[i]!), Math.hypot(p[i + 1]!, q[i + 1]!)))
}

test('a lean with taper keeps outside its wall, and near it, 60 set-ups', { timeout: TIMEOUT }, () => {
  let set = 0
  let [deepest, atTop, farthest] = [0, 0, 0]
  for (let seed = 1; set < 60; seed++) {
    const request = randomRequest(seed, { steepest: 45, arcs: false, cuttable: true })
    if (!request || request.jet!.taper === 0) continue
    const body = bodyOf(request)
    if (soundRange(body).event) continue
    set++
    const jet = { kerf: request.jet!.kerf!, taper: request.jet!.taper! * DEGREE }
    const { path } = passesOf(body, jet, { tilt: STEEPEST })
    const edges = body.loops.flatMap((loop, l) => loop.map((edge, e) => ({ edge, wall: body.walls[l]![e]! })))
    for (const i of movesOf(path)) {
      const { edge, wall } = edges[path.edge[i]!] ?? {}
      if (!edge || !wall || path.move[i] !== MoveKind.lean) continue
      // Where no way round a corner is within the limit the path leans past it, and that is told.
      if (steepestOf(path, i) > STEEPEST) continue
      for (const part of [0, 0.25, 0.5, 0.75, 1]) {
        const cone = coneAt(path, jet, i, part)
        const [nx, ny] = outwardAt(edge, cone.at)
        const { tilt } = wall.facets[path.facet[i]!]!
        const near = nearSide(cone, [nx * Math.cos(tilt), ny * Math.cos(tilt), -Math.sin(tilt)])
        for (const depth of [0, body.thickness / 2, body.thickness]) {
          const point = rulingAt(cone, near, depth)
          const off = outsideFacet(body, edge, wall, path.facet[i]!, point)
          const s = dot([point[0] - cone.at[0], point[1] - cone.at[1], point[2]], cone.axis)
          if (s < 0) atTop = Math.max(atTop, -off)
          else deepest = Math.max(deepest, -off)
          farthest = Math.max(farthest, off)
        }
      }
    }
  }
  expect(deepest).toBeLessThan(ON_THE_WALL)
  expect(atTop).toBeLessThan(ENTERS_AT_TOP)
  expect(farthest).toBeGreaterThan(0)
  expect(farthest).toBeLessThan(LEAN_STANDS_OFF)
})
