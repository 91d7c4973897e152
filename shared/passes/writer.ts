import { MoveKind, type JetPath } from './types.ts'

/**
 * Jet path columns that grow as stations are written; `at` is the place of the next one, so that one can go back and
 * patch. Those of round moves are made with the first of them.
 */
export interface PathWriter {
  at: number
  capacity: number
  x: Float64Array
  y: Float64Array
  p: Float64Array
  q: Float64Array
  edge: Int32Array
  move: Uint8Array
  facet: Uint8Array
  round: { readonly sweep: Float64Array; readonly cx: Float64Array; readonly cy: Float64Array } | null
}

export function makeWriter(capacity: number): PathWriter {
  return { at: 0, capacity, ...columns(capacity), round: null }
}

/** Bytes of a station: four numbers, an edge, a move and a facet. */
const STATION = 4 * 8 + 4 + 1 + 1

/** One buffer for all columns, which is asked for and cleared in one go. */
function columns(capacity: number): Pick<PathWriter, 'x' | 'y' | 'p' | 'q' | 'edge' | 'move' | 'facet'> {
  const buffer = new ArrayBuffer(capacity * STATION)
  const numbers = (column: number) => new Float64Array(buffer, column * 8 * capacity, capacity)
  return {
    x: numbers(0),
    y: numbers(1),
    p: numbers(2),
    q: numbers(3),
    edge: new Int32Array(buffer, 32 * capacity, capacity),
    move: new Uint8Array(buffer, 36 * capacity, capacity),
    facet: new Uint8Array(buffer, 37 * capacity, capacity),
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
  if (w.round) straighten(w, i)
}

/** Makes the move from the station written last a round one. */
export function bend(w: PathWriter, sweep: number, cx: number, cy: number): void {
  const i = w.at - 1
  const numbers = () => new Float64Array(w.capacity)
  w.round ??= { sweep: numbers(), cx: numbers(), cy: numbers() }
  w.round.sweep[i] = sweep
  w.round.cx[i] = cx
  w.round.cy[i] = cy
}

/** Makes the station written last the end of its pass. */
export function finish(w: PathWriter): void {
  const i = w.at - 1
  w.move[i] = MoveKind.end
  w.edge[i] = -1
  straighten(w, i)
}

function straighten({ round }: PathWriter, i: number): void {
  if (round) round.sweep[i] = round.cx[i] = round.cy[i] = 0
}

export function pathOf(w: PathWriter): JetPath {
  const count = w.at
  // Without round moves one column of zeros stands for all that only they have.
  const zeros = w.round ? null : new Float64Array(count)
  return {
    count,
    x: w.x.subarray(0, count),
    y: w.y.subarray(0, count),
    p: w.p.subarray(0, count),
    q: w.q.subarray(0, count),
    move: w.move.subarray(0, count),
    edge: w.edge.subarray(0, count),
    facet: w.facet.subarray(0, count),
    sweep: zeros ?? w.round!.sweep.subarray(0, count),
    cx: zeros ?? w.round!.cx.subarray(0, count),
    cy: zeros ?? w.round!.cy.subarray(0, count),
  }
}

/** Makes room for more stations, at least twice as many as before. */
export function grow(w: PathWriter): void {
  const { x, y, p, q, edge, move, facet, round } = w
  w.capacity = Math.max(16, 2 * w.capacity)
  Object.assign(w, columns(w.capacity))
  w.x.set(x)
  w.y.set(y)
  w.p.set(p)
  w.q.set(q)
  w.edge.set(edge)
  w.move.set(move)
  w.facet.set(facet)
  if (!round) return
  const longer = (old: Float64Array) => {
    const out = new Float64Array(w.capacity)
    out.set(old)
    return out
  }
  w.round = { sweep: longer(round.sweep), cx: longer(round.cx), cy: longer(round.cy) }
}
