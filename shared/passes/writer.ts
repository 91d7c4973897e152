import { MoveKind, type JetPath } from './types.ts'

/** Jet path columns that grow as stations are written; `at` is the place of the next one, so that one can go back and patch. */
export interface PathWriter {
  at: number
  capacity: number
  x: Float64Array
  y: Float64Array
  p: Float64Array
  q: Float64Array
  move: Uint8Array
  edge: Int32Array
  facet: Uint8Array
  sweep: Float64Array
  cx: Float64Array
  cy: Float64Array
}

export function makeWriter(capacity: number): PathWriter {
  const numbers = () => new Float64Array(capacity)
  return {
    at: 0,
    capacity,
    x: numbers(),
    y: numbers(),
    p: numbers(),
    q: numbers(),
    move: new Uint8Array(capacity),
    edge: new Int32Array(capacity),
    facet: new Uint8Array(capacity),
    sweep: numbers(),
    cx: numbers(),
    cy: numbers(),
  }
}

/** Writes a station from which a straight move begins. */
export function put(
  w: PathWriter,
  x: number,
  y: number,
  p: number,
  q: number,
  move: number,
  edge: number,
  facet: number,
): void {
  if (w.at === w.capacity) grow(w)
  const i = w.at++
  w.x[i] = x
  w.y[i] = y
  w.p[i] = p
  w.q[i] = q
  w.move[i] = move
  w.edge[i] = edge
  w.facet[i] = facet
  // Columns are zero to begin with; only what is written over may hold a bend.
  if (w.sweep[i] !== 0) w.sweep[i] = w.cx[i] = w.cy[i] = 0
}

/** Makes the move from the station written last a round one. */
export function bend(w: PathWriter, sweep: number, cx: number, cy: number): void {
  const i = w.at - 1
  w.sweep[i] = sweep
  w.cx[i] = cx
  w.cy[i] = cy
}

/** Makes the station written last the end of its pass. */
export function finish(w: PathWriter): void {
  const i = w.at - 1
  w.move[i] = MoveKind.end
  w.edge[i] = -1
  w.sweep[i] = w.cx[i] = w.cy[i] = 0
}

export function pathOf(w: PathWriter): JetPath {
  const count = w.at
  return {
    count,
    x: w.x.subarray(0, count),
    y: w.y.subarray(0, count),
    p: w.p.subarray(0, count),
    q: w.q.subarray(0, count),
    move: w.move.subarray(0, count),
    edge: w.edge.subarray(0, count),
    facet: w.facet.subarray(0, count),
    sweep: w.sweep.subarray(0, count),
    cx: w.cx.subarray(0, count),
    cy: w.cy.subarray(0, count),
  }
}

function grow(w: PathWriter): void {
  const capacity = Math.max(16, 2 * w.capacity)
  const numbers = (old: Float64Array) => {
    const out = new Float64Array(capacity)
    out.set(old)
    return out
  }
  const bytes = (old: Uint8Array) => {
    const out = new Uint8Array(capacity)
    out.set(old)
    return out
  }
  w.x = numbers(w.x)
  w.y = numbers(w.y)
  w.p = numbers(w.p)
  w.q = numbers(w.q)
  w.sweep = numbers(w.sweep)
  w.cx = numbers(w.cx)
  w.cy = numbers(w.cy)
  w.move = bytes(w.move)
  w.facet = bytes(w.facet)
  const edges = new Int32Array(capacity)
  edges.set(w.edge)
  w.edge = edges
  w.capacity = capacity
}
