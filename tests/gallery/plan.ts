import type { Point } from '../../shared/geometry/types.ts'
import { cornersOf } from '../../shared/seams/corners.ts'
import { CornerMove, MoveKind } from '../../shared/passes/types.ts'
import { axisAt, jetsAlong, pointsOf } from './curves.ts'
import type { Scene } from './scene.ts'
import { circle, element, group, line, points, text } from './svg.ts'

/** The part from above. */

/** From mm to the page. */
export interface View {
  readonly scale: number
  readonly left: number
  readonly top: number
}

export function onPage({ scale, left, top }: View, { x, y }: Point): Point {
  return { x: left + scale * x, y: top - scale * y }
}

export interface Box {
  minX: number
  minY: number
  maxX: number
  maxY: number
}

/** All that the plan shows, mm. */
export function planBounds({ contours, passes: { path }, body }: Scene): Box {
  const box = { minX: Infinity, minY: Infinity, maxX: -Infinity, maxY: -Infinity }
  const include = ({ x, y }: Point) => {
    box.minX = Math.min(box.minX, x)
    box.minY = Math.min(box.minY, y)
    box.maxX = Math.max(box.maxX, x)
    box.maxY = Math.max(box.maxY, y)
  }
  for (const { loops } of contours) for (const loop of loops) pointsOf(loop).forEach(include)
  for (const loop of body.loops) for (const { from } of loop) include(from)
  for (let i = 0; i < path.count; i++) {
    const jet = { x: path.x[i]!, y: path.y[i]!, p: path.p[i]!, q: path.q[i]! }
    include(axisAt(jet, 0))
    include(axisAt(jet, body.thickness))
  }
  return box
}

/** Lines only: what can be drawn again larger, in a glass. */
export function planLines(scene: Scene, view: View): string {
  return [contourLines(scene, view), seamLines(scene, view), passLines(scene, view)].join('\n')
}

function contourLines({ contours, body, range }: Scene, view: View): string {
  const top = contours[0]
  const metal =
    top && top.loops.map((loop) => `M${points(pointsOf(loop).map((p) => onPage(view, p)))}Z`).join('')
  const drawn = contours.flatMap(({ depth, loops }) => {
    const face = depth === 0 ? ' top' : depth === body.thickness ? ' bottom' : ''
    const atEvent = range.event && depth === range.event.depth ? ' at-event' : ''
    return loops.map((loop, l) =>
      element('polyline', {
        class: `contour${face}${atEvent}`,
        'data-depth': String(depth),
        'data-loop': l,
        points: points(pointsOf(loop).map((p) => onPage(view, p))),
      }),
    )
  })
  // The faces last, so that they lie over the levels between.
  const faces = drawn.filter((one) => /class="contour (top|bottom)/.test(one))
  const levels = drawn.filter((one) => !faces.includes(one))
  return group('contours', [
    ...(metal ? [element('path', { class: 'metal', d: metal })] : []),
    ...levels,
    ...faces,
  ])
}

/** From the corner at the top to the corner at the bottom, through every depth that is drawn. */
function seamLines(scene: Scene, view: View): string {
  const seams = cornersOf(scene.body).filter(({ kind, step }) => kind !== 'smooth' || step)
  return group(
    'seams',
    seams.flatMap(({ loop, vertex }) => {
      const run = scene.contours.flatMap((contour) => {
        const at = cornerOf(scene, contour.loops[loop]!, loop, vertex)
        return at ? [onPage(view, at)] : []
      })
      return run.length < 2 ? [] : [element('polyline', { class: 'seam', points: points(run) })]
    }),
  )
}

/** Contours have a vertex more where walls step: a corner is found where the count fits. */
function cornerOf({ body }: Scene, loop: readonly Point[], l: number, vertex: number): Point | null {
  return loop.length === body.loops[l]!.length ? loop[vertex]! : null
}

function passLines({ passes: { path, passes }, body, jet }: Scene, view: View): string {
  const drawn = passes.map(({ first, last }) => {
    const runs: string[] = []
    let [kind, top, bottom]: [string, Point[], Point[]] = ['', [], []]
    const flush = () => {
      if (top.length < 2) return
      const swath = view.scale * jet.kerf
      runs.push(element('polyline', { class: 'kerf', 'stroke-width': swath, points: points(top) }))
      runs.push(element('polyline', { class: `axis-bottom${kind}`, points: points(bottom) }))
      runs.push(element('polyline', { class: `axis-top${kind}`, points: points(top) }))
    }
    for (let i = first; i < last; i++) {
      const move = path.move[i]!
      const own = move === MoveKind.leadIn || move === MoveKind.leadOut ? ' lead' : ''
      const along = jetsAlong(path, i)
      if (own !== kind || top.length === 0) {
        flush()
        kind = own
        top = [onPage(view, axisAt(along[0]!, 0))]
        bottom = [onPage(view, axisAt(along[0]!, body.thickness))]
      }
      for (const one of along.slice(1)) {
        top.push(onPage(view, axisAt(one, 0)))
        bottom.push(onPage(view, axisAt(one, body.thickness)))
      }
    }
    flush()
    return group('pass', runs)
  })
  return group('passes', drawn)
}

/** Marks and words, which keep their size: corner moves, pierce points with the pass' number, events, bites, ways out. */
export function planMarks(scene: Scene, view: View): string {
  return [
    cornerMarks(scene, view),
    wayMarks(scene, view),
    pierceMarks(scene, view),
    alarms(scene, view),
  ].join('\n')
}

/** Half the size of a corner's mark. */
const MARK = 4

function cornerMarks({ passes: { path, firstStation, cornerMoves } }: Scene, view: View): string {
  const marks: string[] = []
  for (let g = 0; g < cornerMoves.length; g++) {
    const station = firstStation[g]!
    if (station < 0) continue
    const at = onPage(view, { x: path.x[station]!, y: path.y[station]! })
    const mark = cornerMark(cornerMoves[g]!, at)
    if (mark) marks.push(mark)
  }
  return group('corner-moves', marks)
}

/** A wedge for a lean, a square for a run out, a dot for a pivot, a stroke for a step. */
export function cornerMark(move: number, { x, y }: Point): string | null {
  switch (move) {
    case CornerMove.lean:
      return polygon([
        { x: x - MARK, y: y + MARK },
        { x: x + MARK, y: y + MARK },
        { x, y: y - MARK },
      ])
    case CornerMove.runOut:
      return polygon([
        { x: x - MARK, y: y - MARK },
        { x: x + MARK, y: y - MARK },
        { x: x + MARK, y: y + MARK },
        { x: x - MARK, y: y + MARK },
      ])
    case CornerMove.pivot:
      return circle({ x, y }, MARK, { class: 'move' })
    case CornerMove.step:
      return line({ x: x - MARK, y: y - MARK }, { x: x + MARK, y: y + MARK }, { class: 'move' })
    default:
      return null
  }
}

function polygon(corners: readonly Point[]): string {
  return element('polygon', { class: 'move', points: points(corners) })
}

function pierceMarks({ passes: { path, passes }, body }: Scene, view: View): string {
  const taken: Point[] = []
  const spots = passes.map(({ first }) => onPage(view, { x: path.x[first]!, y: path.y[first]! }))
  const drawn = spots.flatMap((at, i) => {
    const { first } = passes[i]!
    const lead = jetsAlong(path, first).flatMap((jet) =>
      [0, body.thickness].map((d) => onPage(view, axisAt(jet, d))),
    )
    const label = freeSpot(at, [...spots, ...taken, ...lead])
    taken.push(label)
    return [
      circle(at, 3.5, { class: 'pierce' }),
      text({ x: label.x, y: label.y + 5 }, String(i + 1), { class: 'order', 'text-anchor': 'middle' }),
    ]
  })
  return group('pierces', drawn)
}

/** The place round a mark that is farthest from all other marks and words, as near as it may be. */
function freeSpot(at: Point, taken: readonly Point[]): Point {
  let best = { x: at.x + 14, y: at.y }
  let room = -1
  for (const radius of [14, 24, 36]) {
    for (let k = 0; k < 12; k++) {
      const spot = { x: at.x + radius * Math.cos(k * 0.5236), y: at.y + radius * Math.sin(k * 0.5236) }
      const own = Math.min(...taken.map(({ x, y }) => Math.hypot(x - spot.x, y - spot.y)))
      if (own > room + 1e-6) [best, room] = [spot, own]
    }
    if (room >= 14) break
  }
  return best
}

function wayMarks(scene: Scene, view: View): string {
  const { body, waysOut, contours } = scene
  const top = contours[0]?.loops.map((loop) => pointsOf(loop).map((point) => onPage(view, point)))
  const drawn = [waysOut.part, ...waysOut.slugs].flatMap(({ loop, withinKerf: { verdict, direction } }) => {
    // The part's word stands where there is most metal, a slug's in the middle of its hole.
    const spot = top && roomiest(loop === 0 ? top : [top[loop]!])
    if (!spot) return []
    // Where a hole is too small for its word, the word stands below it.
    const at =
      loop === 0 || spot.room > WORD_ROOM ? spot.at : { x: spot.at.x, y: lowestOf(scene, view, loop) + 16 }
    const way = verdict === 'slides' ? `slides ${direction!.z > 0 ? 'up' : 'down'}` : verdict
    const word = body.loops.length > 1 ? `${loop === 0 ? 'part' : `slug ${loop}`} ${way}` : way
    const label = text({ x: at.x, y: at.y + 5 }, word, { class: 'way-word', 'text-anchor': 'middle' })
    return direction && direction.heading !== null ? [label, arrow(at, direction.heading)] : [label]
  })
  return group('ways-out', drawn)
}

/** Half the room that a word needs. */
const WORD_ROOM = 52

/** The lowest place on the page that a loop comes to at any depth. */
function lowestOf({ contours }: Scene, view: View, loop: number): number {
  return Math.max(
    ...contours.flatMap(({ loops }) => pointsOf(loops[loop]!).map((point) => onPage(view, point).y)),
  )
}

/** Places looked at in each direction; odd, so that the middle is one. */
const GRID = 29

/** The place inside closed runs of points that is farthest from all of them; of nearly equal ones the one nearest the middle. */
function roomiest(runs: readonly (readonly Point[])[]): { readonly at: Point; readonly room: number } | null {
  const all = runs.flat()
  const [xs, ys] = [all.map(({ x }) => x), all.map(({ y }) => y)]
  const [left, top] = [Math.min(...xs), Math.min(...ys)]
  const [width, height] = [Math.max(...xs) - left, Math.max(...ys) - top]
  let best: { readonly at: Point; readonly room: number } | null = null
  let most = -Infinity
  for (let k = 0; k < GRID * GRID; k++) {
    const at = {
      x: left + ((k % GRID) + 0.5) * (width / GRID),
      y: top + (Math.floor(k / GRID) + 0.5) * (height / GRID),
    }
    let inside = false
    let room = Infinity
    for (const run of runs) {
      for (let i = 1; i < run.length; i++) {
        const [a, b] = [run[i - 1]!, run[i]!]
        if (a.y > at.y !== b.y > at.y && at.x < a.x + ((at.y - a.y) / (b.y - a.y)) * (b.x - a.x))
          inside = !inside
        const square = (b.x - a.x) ** 2 + (b.y - a.y) ** 2
        const along = square > 0 ? ((at.x - a.x) * (b.x - a.x) + (at.y - a.y) * (b.y - a.y)) / square : 0
        const part = Math.min(1, Math.max(0, along))
        room = Math.min(room, Math.hypot(a.x + part * (b.x - a.x) - at.x, a.y + part * (b.y - a.y) - at.y))
      }
    }
    const score = room - 0.05 * Math.hypot(at.x - left - width / 2, at.y - top - height / 2)
    if (inside && score > most) [best, most] = [{ at, room }, score]
  }
  return best
}

/** Beside the word, away from it. */
function arrow({ x, y }: Point, heading: number): string {
  const [c, s] = [Math.cos(heading), -Math.sin(heading)]
  const tail = { x: x + 78 * c, y: y + 20 * s }
  const tip = { x: tail.x + 46 * c, y: tail.y + 46 * s }
  const barb = (side: number) => ({ x: tip.x - 11 * c - side * 6 * s, y: tip.y - 11 * s + side * 6 * c })
  return element('polyline', { class: 'way', points: points([tail, tip, barb(1), tip, barb(-1)]) })
}

/** Where the walls end, and where a jet bites. */
function alarms({ range: { event }, interference }: Scene, view: View): string {
  const drawn: string[] = []
  if (event) {
    const at = onPage(view, event.at)
    drawn.push(circle(at, 9, { class: 'event' }), circle(at, 2, { class: 'event' }))
  }
  for (const { x, y } of interference.bites.slice(0, 12)) {
    const at = onPage(view, { x, y })
    for (const side of [1, -1]) {
      drawn.push(
        line({ x: at.x - 5, y: at.y - 5 * side }, { x: at.x + 5, y: at.y + 5 * side }, { class: 'bite' }),
      )
    }
  }
  return group('alarms', drawn)
}
