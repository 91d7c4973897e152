import { firstEvent } from '../events/event.ts'
import { edgeName } from '../walls/names.ts'
import type { Body, EdgeRef, Wall } from '../walls/types.ts'
import type { BodyEvent } from '../events/types.ts'
import type { Cure } from '../findings/schema.ts'
import { degrees, radians } from '../units/angle.ts'
import { formatAngle } from '../units/format.ts'
import { sameFacets } from './preps.ts'

/** Above this many edges the search is left out, so that every keystroke stays quick. */
const MOST_EDGES = 300
/** Tilts are tried in tenths of a degree. */
const STEP = 0.1

/**
 * The largest tilt of the walls that meet in an event at which it no longer happens. Only single-facet walls
 * that share one prep: then one number cures. Null where no such number is found. `body` runs in its own
 * numbering; `nameOf` gives the caller's edge.
 */
export function cureEvent(body: Body, event: BodyEvent, nameOf: (edge: EdgeRef) => EdgeRef): Cure | null {
  if (body.loops.reduce((sum, loop) => sum + loop.length, 0) > MOST_EDGES) return null
  for (const edges of candidates(body, event)) {
    const tilt = largestSoundTilt(body, edges)
    if (tilt === null) continue
    const named = edges.map(nameOf).sort((a, b) => a.loop - b.loop || a.edge - b.edge)
    return {
      message: `Set ${namesText(named)} to ${formatAngle(tilt)}.`,
      set: { edges: named, facet: 0, tilt },
    }
  }
  return null
}

/** Sets of edges to change together, the smallest first: the wall itself, with the one it meets, its neighbours, its loop. */
function candidates(body: Body, event: BodyEvent): EdgeRef[][] {
  const own = { loop: event.loop, edge: event.edge }
  const n = body.loops[own.loop]?.length ?? 0
  const neighbours = [-1, 1].map((by) => ({ loop: own.loop, edge: (own.edge + by + n) % n }))
  const loop = Array.from({ length: n }, (_, edge) => ({ loop: own.loop, edge }))
  const other = event.other
  const otherLoop = other ? (body.loops[other.loop] ?? []).map((_, edge) => ({ loop: other.loop, edge })) : []
  return [
    [own],
    ...(other ? [[own, other]] : []),
    neighbours,
    [own, ...neighbours],
    loop,
    ...(other && other.loop !== own.loop ? [[...loop, ...otherLoop]] : []),
  ].flatMap((edges) => {
    const first = edges.map((edge) => wallOf(body, edge)).find(isTilted)
    if (!first) return []
    const alike = edges.filter((edge) => sameFacets(wallOf(body, edge).facets, first.facets))
    return [unique(alike)]
  })
}

function isTilted({ facets }: Wall): boolean {
  return facets.length === 1 && facets[0]?.tilt !== 0
}

/** Bisection over tenths of a degree between square and the present tilt; null when even square does not cure. */
function largestSoundTilt(body: Body, edges: readonly EdgeRef[]): number | null {
  const [edge] = edges
  const present = edge ? degrees(wallOf(body, edge).facets[0]?.tilt ?? 0) : 0
  const sign = Math.sign(present)
  const tiltOf = (steps: number) => (steps === 0 ? 0 : (sign * steps) / Math.round(1 / STEP))
  const sound = (steps: number) => firstEvent(withTilt(body, edges, radians(tiltOf(steps)))) === null
  if (!sound(0)) return null
  let low = 0
  let high = Math.ceil(Math.abs(present) / STEP)
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2)
    if (sound(middle)) low = middle
    else high = middle
  }
  return tiltOf(low)
}

function withTilt(body: Body, edges: readonly EdgeRef[], tilt: number): Body {
  const wall: Wall = { facets: [{ depth: body.thickness, tilt }] }
  const walls = body.walls.map((ofLoop) => [...ofLoop])
  for (const { loop, edge } of edges) {
    const ofLoop = walls[loop]
    if (ofLoop) ofLoop[edge] = wall
  }
  return { ...body, walls }
}

function wallOf(body: Body, { loop, edge }: EdgeRef): Wall {
  const wall = body.walls[loop]?.[edge]
  if (!wall) throw new Error('every edge has a wall')
  return wall
}

function unique(edges: readonly EdgeRef[]): EdgeRef[] {
  return edges.filter(
    ({ loop, edge }, i) => edges.findIndex((other) => other.loop === loop && other.edge === edge) === i,
  )
}

/** `e3`, `e3 and e4`, `e1, e2 and 6 more`. */
function namesText(edges: readonly EdgeRef[]): string {
  const names = edges.map(edgeName)
  if (names.length <= 3) return names.join(', ').replace(/, ([^,]*)$/, ' and $1')
  return `${names.slice(0, 2).join(', ')} and ${names.length - 2} more`
}
