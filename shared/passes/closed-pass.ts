import { makeEdgePlan, planEdge, type EdgePlan } from './edge-plan.ts'
import { turnAt, type Level } from './level.ts'
import type { Start } from './starts.ts'
import { bendAlong, putSquare, writeEnd, writeStart } from './stations.ts'
import { writeStraightEdges } from './straight-edge.ts'
import { CornerMove, MoveKind } from './types.ts'
import { finish, put, type PathWriter } from './writer.ts'

/**
 * Writes a pass all the way round a loop. `firstStation`, where given, gets the place of each edge's first
 * station. `move`: the corner moves; a start at a corner makes that corner a run out.
 */
export function writeClosedPass(
  w: PathWriter,
  level: Level,
  move: Uint8Array,
  start: Start,
  firstStation: Int32Array | null,
): void {
  const plan = makeEdgePlan()
  const { g: g0 } = start
  const writeEdges = (from: number) => {
    let g = from
    do {
      const { at } = w
      g = writeStraightEdges(w, level, move, g, g0, firstStation)
      if (g === g0 && w.at > at) return
      if (firstStation) firstStation[g] = w.at
      planEdge(level, move, g, plan)
      writeStart(w, level, plan)
      writeEnd(w, level, plan)
      g = level.next[g]!
    } while (g !== g0)
  }
  switch (start.kind) {
    case 'corner': {
      move[g0] = CornerMove.runOut
      const first = w.at
      writeEdges(g0)
      finish(w)
      lengthenRunIn(w, level, move, first, start.leadIn)
      return
    }
    case 'seam': {
      const way = outwardBetween(level, g0)
      const [x, y, p, q] = [level.x[g0]!, level.y[g0]!, level.p[g0]!, level.q[g0]!]
      const { leadIn, leadOut } = start
      put(w, x + leadIn * way.x, y + leadIn * way.y, p, q, MoveKind.leadIn, -1, level.facet[g0]!)
      writeEdges(g0)
      put(w, x, y, p, q, MoveKind.leadOut, -1, level.facet[g0]!)
      put(w, x + leadOut * way.x, y + leadOut * way.y, p, q, MoveKind.end, -1, level.facet[g0]!)
      return
    }
    case 'edge': {
      planEdge(level, move, g0, plan)
      const { at, leadIn, leadOut, overlap } = start
      putOutside(w, level, plan, at, leadIn, MoveKind.leadIn)
      const first = w.at
      putSquare(w, level, plan, at, MoveKind.cut)
      bendAlong(w, plan, at, plan.to - plan.leanTo)
      writeEnd(w, level, plan)
      if (level.next[g0] !== g0) writeEdges(level.next[g0]!)
      planEdge(level, move, g0, plan)
      writeStart(w, level, plan, at + overlap)
      if (firstStation) firstStation[g0] = first
      putSquare(w, level, plan, at + overlap, MoveKind.leadOut)
      w.edge[w.at - 1] = -1
      putOutside(w, level, plan, at + overlap, leadOut, MoveKind.end)
      return
    }
  }
}

/** A station off the wall by `out`, its jet parallel to the one on the wall, so that it is clear of it at every depth. */
export function putOutside(
  w: PathWriter,
  level: Level,
  plan: EdgePlan,
  at: number,
  out: number,
  move: number,
): void {
  putSquare(w, level, plan, at, move)
  const i = w.at - 1
  const { axis } = plan
  w.edge[i] = -1
  if (axis.arc) {
    const dx = w.x[i]! - axis.cx
    const dy = w.y[i]! - axis.cy
    const scale = (axis.grow * out) / Math.hypot(dx, dy)
    w.x[i]! += dx * scale
    w.y[i]! += dy * scale
  } else {
    w.x[i]! += out * axis.uy
    w.y[i]! -= out * axis.ux
  }
}

/** The first station of a pass that starts at a corner moves back along the prolongation, by the lead's length. */
export function lengthenRunIn(
  w: PathWriter,
  level: Level,
  move: Uint8Array,
  first: number,
  leadIn: number,
): void {
  const plan = planEdge(level, move, w.edge[first]!, makeEdgePlan())
  const end = w.at
  w.at = first
  const from = plan.from - plan.runIn - leadIn
  putSquare(w, level, plan, from, MoveKind.leadIn)
  bendAlong(w, plan, from, plan.from)
  w.at = end
}

/** Unit direction into the waste half way between the outward normals at a corner. */
export function outwardBetween(level: Level, g: number): { readonly x: number; readonly y: number } {
  const { frame } = level
  const half = turnAt(level, g) / 2
  // The edge's own outward normal, turned back by half the corner's turn.
  const [nx, ny] = [frame.uy[g]!, -frame.ux[g]!]
  const [c, s] = [Math.cos(half), Math.sin(half)]
  return { x: nx * c + ny * s, y: ny * c - nx * s }
}
