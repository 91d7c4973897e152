import { expect, test } from 'vitest'
import { contourAt } from '../../../shared/contours/contour.ts'
import { contourVertices } from '../../../shared/evaluate/contours.ts'
import { bodyOf } from '../../../shared/evaluate/evaluate.ts'
import type { EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import { soundRange } from '../../../shared/events/range.ts'
import { interferencesOf } from '../../../shared/interference/interference.ts'
import { passesOf } from '../../../shared/passes/passes.ts'
import { MoveKind, type Jet, type JetPath } from '../../../shared/passes/types.ts'
import type { Body } from '../../../shared/walls/types.ts'
import { cornersOf } from '../../../shared/seams/corners.ts'
import { DEGREE } from '../../support/plates.ts'
import { randomRequest } from '../../support/requests.ts'
import { acrossAxis, coneAt, depthInCone, movesOf, rulingAt, type Vector } from './cone.ts'
import { depthInside, outlineOf } from './outline.ts'

/**
 * No jet of a set-up of which nothing bad is said enters the part. Looked at from both sides, by points alone: the
 * rim of the jet against the contour, and the contour's corners and points along its edges against the jet.
 */

/** Promised, mm. */
const ENTERS = 1e-6

const ROUND = Array.from({ length: 20 }, (_, k) => (k * Math.PI) / 10)
const PLACES = [0, 0.06, 0.5, 0.94, 1]
const DEPTHS = [0, 0.2, 0.55, 0.85, 1]

interface Slice {
  readonly depth: number
  readonly outline: ReturnType<typeof outlineOf>
  /** Corners, and points along the edges between them. */
  readonly points: readonly Vector[]
}

function slicesOf(body: Body): Slice[] {
  const levels = body.walls.flat().flatMap(({ facets }) => facets.map(({ depth }) => depth))
  const depths = new Set([...DEPTHS.map((part) => part * body.thickness), ...levels])
  return [...depths].map((depth) => {
    const outline = outlineOf(contourVertices(contourAt(body, depth)))
    const points = outline.flatMap(({ a, b, arc }): Vector[] => [
      [a[0], a[1], depth],
      ...(arc ? [] : [0.02, 0.3, 0.7, 0.98]).map((part): Vector => [
        a[0] + part * (b[0] - a[0]),
        a[1] + part * (b[1] - a[1]),
        depth,
      ]),
    ])
    return { depth, outline, points }
  })
}

/** The deepest that the moves stand in the part, mm, and which move it is. */
function deepestEntry(body: Body, jet: Jet, path: JetPath): { deepest: number; move: number } {
  const slices = slicesOf(body)
  let [deepest, move] = [0, -1]
  const note = (entry: number, i: number) => {
    if (entry > deepest) [deepest, move] = [entry, i]
  }
  for (const i of movesOf(path)) {
    for (const part of PLACES) {
      const cone = coneAt(path, jet, i, part)
      const [first, second] = acrossAxis(cone)
      for (const { depth, outline, points } of slices) {
        for (const point of points) note(depthInCone(cone, point), i)
        const away = depth / cone.axis[2]
        if (cone.radius - away * cone.narrows <= 0) continue
        for (const angle of ROUND) {
          const [c, s] = [Math.cos(angle), Math.sin(angle)]
          const out: Vector = [
            c * first[0] + s * second[0],
            c * first[1] + s * second[1],
            c * first[2] + s * second[2],
          ]
          const rim = rulingAt(cone, out, depth)
          note(depthInside(outline, [rim[0], rim[1]], deepest), i)
        }
      }
    }
  }
  return { deepest, move }
}

/**
 * Arcs that meet others at an angle have bent seams and unlike halves of a circle a step, both of which are findings:
 * only circles stay round, and have the wall of their first half all round.
 */
function roundHolesOnly(request: EvaluationRequest): EvaluationRequest {
  const loops = request.loops.map((loop) => (loop.length === 2 ? loop : loop.map(({ x, y }) => ({ x, y }))))
  const walls = request.walls.flatMap((wall) => {
    if (loops[wall.loop]!.length > 2) return [wall]
    return wall.edge === 0 ? [wall, { ...wall, edge: 1 }] : []
  })
  return { ...request, loops, walls }
}

interface SetUp {
  readonly seed: number
  readonly body: Body
  readonly jet: Jet
  readonly path: JetPath
}

/** Set-ups of which neither the passes nor the search for bites has anything to say. */
function* quietSetUps(): Generator<SetUp> {
  for (let seed = 1; ; seed++) {
    // With arcs: square walls on one half of the plates, on the other round holes alone, each with one wall.
    const arcs = seed % 2 === 0
    const random = randomRequest(seed, { steepest: seed % 4 < 2 ? 15 : 35, arcs, cuttable: true })
    if (!random) continue
    const request = !arcs ? random : seed % 4 === 0 ? { ...random, walls: [] } : roundHolesOnly(random)
    const body = bodyOf(request)
    // Walls that end within the plate and steps between smooth walls are findings by themselves.
    if (soundRange(body).event || cornersOf(body).some(({ step }) => step)) continue
    const jet = { kerf: request.jet!.kerf!, taper: request.jet!.taper! * DEGREE }
    const passes = passesOf(body, jet, { tilt: (seed % 3 === 0 ? 20 : 60) * DEGREE })
    if (passes.problems.length > 0) continue
    const { pairs, undecided } = interferencesOf(body, passes, jet)
    if (pairs > 0 || undecided > 0) continue
    yield { seed, body, jet, path: passes.path }
  }
}

test('no jet of a set-up without a finding enters the part, 100 set-ups', { timeout: 60_000 }, () => {
  const kinds = new Set<number>()
  let tapered = 0
  let arcs = 0
  let set = 0
  for (const { seed, body, jet, path } of quietSetUps()) {
    const { deepest, move } = deepestEntry(body, jet, path)
    expect(deepest, `seed ${seed}, move ${move} of kind ${path.move[move]}`).toBeLessThan(ENTERS)
    for (const i of movesOf(path)) kinds.add(path.move[i]!)
    if (jet.taper !== 0) tapered++
    if (body.loops.some((loop) => loop.some(({ kind }) => kind === 'arc'))) arcs++
    if (++set === 100) break
  }
  const { leadIn, cut, lean, runOut, turn, runIn, leadOut } = MoveKind
  expect([...kinds].sort()).toEqual(expect.arrayContaining([leadIn, cut, lean, runOut, turn, runIn, leadOut]))
  expect(Math.min(tapered, arcs)).toBeGreaterThan(12)
})
