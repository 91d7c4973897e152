import type { Point } from '../../shared/geometry/types.ts'
import { axisOffset } from '../../shared/jet/axis.ts'
import { jetAt } from '../../shared/passes/jet-at.ts'
import { MoveKind } from '../../shared/passes/types.ts'
import { datumReach } from '../../shared/walls/datum.ts'
import type { EdgeEnd, Wall } from '../../shared/walls/types.ts'
import { blends, facetTilt, reachAt } from '../../shared/walls/wall.ts'
import { DEGREE } from '../support/plates.ts'
import type { Scene } from './scene.ts'
import { element, figure, group, line, points, text } from './svg.ts'

/** A cross-section of every distinct wall, metal on the left, with the jets that cut its facets. */

export interface Section {
  readonly wall: Wall
  /** Edges that have it, numbered through all loops. */
  readonly edges: readonly number[]
}

/** Size of one section's panel on the page, its words below included. */
export const PANEL = { width: 320, height: 236, drawing: 170 } as const

/** Walls that differ, by what they are. */
export function sectionsOf({ body }: Scene): Section[] {
  const found = new Map<string, { wall: Wall; edges: number[] }>()
  let g = 0
  for (const walls of body.walls) {
    for (const wall of walls) {
      const key = JSON.stringify(wall)
      const known = found.get(key)
      if (known) known.edges.push(g)
      else found.set(key, { wall, edges: [g] })
      g++
    }
  }
  return [...found.values()]
}

export function drawSection(scene: Scene, section: Section, left: number, top: number): string {
  const { body } = scene
  const { wall, edges } = section
  const t = body.thickness
  const ends: EdgeEnd[] = blends(wall) ? ['start', 'end'] : ['start']
  const outlines = ends.map((end) =>
    [0, ...wall.facets.map(({ depth }) => depth)].map((depth) => ({
      x: reachAt(wall, depth, end) - datumReach(wall, body.datum, t, end),
      y: -depth,
    })),
  )
  const reaches = outlines.flat().map(({ x }) => x)
  const [least, most] = [Math.min(...reaches), Math.max(...reaches)]
  const body0 = Math.max(0.35 * t, 0.25 * (most - least))
  const scale = Math.min(
    (PANEL.drawing - 40) / t,
    (PANEL.width - 90) / (most - least + body0 + 2 * scene.jet.kerf),
  )
  const at = ({ x, y }: Point) => ({
    x: left + 16 + scale * (x - least + body0),
    y: top + 22 - scale * y,
  })
  const metal = outlines[0]!
  const inner = least - body0
  const drawn = [
    element('polygon', {
      class: 'metal',
      points: points([{ x: inner, y: 0 }, ...metal, { x: inner, y: -t }].map(at)),
    }),
    ...[0, -t].map((y) =>
      line(at({ x: inner, y }), at({ x: metal.find((p) => p.y === y)!.x, y }), { class: 'face' }),
    ),
    ...jetsOf(scene, section, (point) => at(point), scale),
    ...outlines.map((outline, i) =>
      element('polyline', { class: i === 0 ? 'wall' : 'wall blend', points: points(outline.map(at)) }),
    ),
  ]
  const words = [
    `${edges.length === 1 ? 'edge' : 'edges'} ${shortList(edges)}`,
    wall.facets.map((facet) => `to ${round(facet.depth)} mm: ${tilts(facet, ends)}`).join(' · '),
  ]
  const below = Math.min(PANEL.drawing, 22 + scale * t + 18) + 20
  const label = words.map((word, i) =>
    text({ x: left + 16, y: top + below + i * 18 }, word, { class: i === 0 ? 'head' : 'note' }),
  )
  // A page of its own cuts off jets that run far to the side.
  const frame = { x: left, y: top, width: PANEL.width - 16, height: below - 18 }
  const box = [frame.x, frame.y, frame.width, frame.height].map((value) => figure(value)).join(' ')
  return group('section', [element('svg', { ...frame, viewBox: box }, drawn.join('\n')), ...label])
}

function tilts(facet: Wall['facets'][number], ends: readonly EdgeEnd[]): string {
  return ends.map((end) => `${round(facetTilt(facet, end) / DEGREE)}°`).join(' → ')
}

function round(value: number): string {
  return String(Number(value.toFixed(2)))
}

function shortList(edges: readonly number[]): string {
  return edges.length > 6 ? `${edges.slice(0, 5).join(', ')} … (${edges.length})` : edges.join(', ')
}

/** For each facet a jet that cuts it, halfway along its move, square to the edge: body and axis, from the path itself. */
function jetsOf(
  scene: Scene,
  { wall, edges }: Section,
  at: (point: Point) => Point,
  scale: number,
): string[] {
  const { body, jet, passes } = scene
  const { path } = passes
  const t = body.thickness
  const flat = body.loops.flat()
  return wall.facets.flatMap((_, facet) => {
    const move = Array.from(path.move).findIndex(
      (kind, i) => kind === MoveKind.cut && path.facet[i] === facet && edges.includes(path.edge[i]!),
    )
    if (move < 0) return []
    const edge = flat[path.edge[move]!]!
    const { x, y, p, q } = jetAt(path, move, 0.5)
    // The jet's place and slope square to the edge.
    let out: number
    let slope: number
    if (edge.kind === 'line') {
      const length = Math.hypot(edge.to.x - edge.from.x, edge.to.y - edge.from.y)
      const [nx, ny] = [(edge.to.y - edge.from.y) / length, -(edge.to.x - edge.from.x) / length]
      out = (x - edge.from.x) * nx + (y - edge.from.y) * ny
      slope = p * nx + q * ny
    } else {
      const [rx, ry] = [x - edge.centre.x, y - edge.centre.y]
      const side = Math.sign(edge.sweep)
      const far = Math.hypot(rx, ry)
      out = side * (far - edge.radius)
      slope = (side * (p * rx + q * ry)) / far
    }
    // Sides of the cone in this section: tilted by the taper to either side of the axis.
    const lean = Math.atan(slope)
    const [above, below] = [-Math.min(0.12 * t, 20 / scale), t + Math.min(0.12 * t, 14 / scale)]
    const side = (sign: number, depth: number) => ({
      x:
        out +
        sign * axisOffset(jet.kerf, lean - sign * jet.taper, jet.taper) +
        depth * Math.tan(lean - sign * jet.taper),
      y: -depth,
    })
    return [
      element('polygon', {
        class: 'jet',
        points: points([side(-1, above), side(1, above), side(1, below), side(-1, below)].map(at)),
      }),
      line(at({ x: out + above * slope, y: -above }), at({ x: out + below * slope, y: -below }), {
        class: 'side',
      }),
    ]
  })
}
