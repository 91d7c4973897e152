import type { Bounds, Point, VertexLoop } from '../../shared/geometry/types.ts'

/** Decimals in a path: a thousandth of a millimetre. */
const DECIMALS = 3
const figure = (value: number) => String(Number(value.toFixed(DECIMALS)))

/**
 * SVG path of closed loops, Y turned to point up: `(x, y)` of the drawing stands at `(x, -y)`. An edge with a
 * bulge is one arc of radius `|chord| (1 + b²) / 4|b|`; counter-clockwise in the drawing is SVG's sweep 0
 * once Y is turned, and more than half a turn (|b| > 1) is the large arc.
 */
export function outlinePath(loops: readonly VertexLoop[]): string {
  return loops.map(loopPath).join('')
}

function loopPath(loop: VertexLoop): string {
  const first = loop[0]
  if (first === undefined) return ''
  const steps = loop.map((from, i) => {
    const to = loop[(i + 1) % loop.length]!
    const bulge = from.bulge ?? 0
    const target = `${figure(to.x)} ${figure(-to.y)}`
    if (bulge === 0) return `L${target}`
    const chord = Math.hypot(to.x - from.x, to.y - from.y)
    const radius = figure((chord * (1 + bulge * bulge)) / (4 * Math.abs(bulge)))
    return `A${radius} ${radius} 0 ${Math.abs(bulge) > 1 ? 1 : 0} ${bulge > 0 ? 0 : 1} ${target}`
  })
  return `M${figure(first.x)} ${figure(-first.y)}${steps.join('')}Z`
}

/** Path of an open run of points. */
export function polylinePath(points: readonly Point[]): string {
  return points.map((p, i) => `${i === 0 ? 'M' : 'L'}${figure(p.x)} ${figure(-p.y)}`).join('')
}

/** The `viewBox` that shows the bounds with a margin, given as a share of the longer side. */
export function viewBoxOf(bounds: Bounds, margin = 0.06): string {
  const width = bounds.maxX - bounds.minX
  const height = bounds.maxY - bounds.minY
  const room = Math.max(width, height, Number.MIN_VALUE) * margin
  return [bounds.minX - room, -bounds.maxY - room, width + 2 * room, height + 2 * room].map(figure).join(' ')
}
