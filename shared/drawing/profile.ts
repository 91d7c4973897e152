import { verticesFromLoop } from '../geometry/bulge.ts'
import { boundsOf, loopLength, reverseLoop, signedArea } from '../geometry/loop.ts'
import { pointAt } from '../geometry/segment.ts'
import type { Loop } from '../geometry/types.ts'
import type { DrawnSegment } from './chain.ts'
import { DrawingError } from './errors.ts'
import { MAX_LOOP_VERTICES } from './limits.ts'
import { nestLoops } from './nest.ts'
import type { ReadLoop, ReadPart } from './schema.ts'

/**
 * Loops sorted into parts: an outline at an even depth of nesting is a part, one right inside it a hole, and an
 * island in a hole a part again. Parts come largest first, each outline before its holes.
 *
 * @throws DrawingError drawing-too-many-entities for an outline with more corners than a set-up accepts
 */
export function sortIntoParts(rings: readonly (readonly DrawnSegment[])[]): {
  loops: ReadLoop[]
  parts: ReadPart[]
} {
  const loops = rings.map((ring) => halvedIfSingle(ring.map((drawn) => drawn.segment)))
  const areas = loops.map(signedArea)
  const size = (index: number) => Math.abs(areas[index] ?? 0)
  const largestFirst = (a: number, b: number) => size(b) - size(a)
  const parents = nestLoops(loops, areas)
  const roles = rolesOf(parents, [...loops.keys()].sort(largestFirst))

  const holesOf = new Map<number, number[]>()
  parents.forEach((parent, i) => {
    if (parent === null || roles[i] !== 'hole') return
    const holes = holesOf.get(parent)
    if (holes) holes.push(i)
    else holesOf.set(parent, [i])
  })
  const net = (outer: number) =>
    size(outer) - (holesOf.get(outer) ?? []).reduce((sum, hole) => sum + size(hole), 0)
  const outers = [...loops.keys()].filter((i) => roles[i] === 'outer').sort((a, b) => net(b) - net(a))
  const order = outers.flatMap((outer) => [outer, ...(holesOf.get(outer) ?? []).sort(largestFirst)])
  const placeOf = new Map(order.map((index, place) => [index, place]))

  const sorted = order.map((index): ReadLoop => {
    const drawn = loops[index] ?? []
    if (drawn.length > MAX_LOOP_VERTICES) throw tooManyCorners(drawn.length)
    const role = roles[index] ?? 'outer'
    const loop: Loop = (areas[index] ?? 0) > 0 === (role === 'outer') ? drawn : reverseLoop(drawn)
    const parent = parents[index] ?? null
    return {
      vertices: [...verticesFromLoop(loop)].map((vertex) => ({ ...vertex })),
      area: size(index),
      length: loopLength(loop),
      bounds: boundsOf(loop),
      layer: rings[index]?.[0]?.layer ?? '0',
      role,
      parent: parent === null ? null : (placeOf.get(parent) ?? null),
    }
  })
  const parts = outers.map((outer): ReadPart => {
    const place = placeOf.get(outer) ?? 0
    const holes = (holesOf.get(outer) ?? []).map((_, i) => place + 1 + i)
    return { outer: place, holes, area: net(outer), bounds: boundsOf(loops[outer] ?? []) }
  })
  return { loops: sorted, parts }
}

/** A ring of one arc (its ends were brought together) becomes two, so that it has two corners. */
function halvedIfSingle(loop: Loop): Loop {
  const [only] = loop
  if (loop.length !== 1 || only?.kind !== 'arc') return loop
  const half = pointAt(only, 0.5)
  return [
    { ...only, to: half, sweep: only.sweep / 2 },
    { ...only, from: half, sweep: only.sweep / 2 },
  ]
}

/** An outline that lies free or in a hole is a part's; one right inside a part's outline is a hole. */
function rolesOf(parents: readonly (number | null)[], largestFirst: readonly number[]): ReadLoop['role'][] {
  const roles: ReadLoop['role'][] = []
  for (const index of largestFirst) {
    const parent = parents[index] ?? null
    roles[index] = parent !== null && roles[parent] === 'outer' ? 'hole' : 'outer'
  }
  return roles
}

function tooManyCorners(count: number): DrawingError {
  return new DrawingError(
    'drawing-too-many-entities',
    `An outline has ${count} corners; at most ${MAX_LOOP_VERTICES} can be used. Recognise arcs with a larger tolerance.`,
  )
}
