import type { EvaluatedContour, Evaluation } from '../evaluate/schema.ts'
import { loopFromVertices } from '../geometry/bulge.ts'
import { boundsOf } from '../geometry/loop.ts'
import { formatNumber } from '../units/format.ts'
import { cautions } from './cautions.ts'
import { dxfText, type DxfLayer } from './dxf-document.ts'

/** What the head of a file says about where it comes from. */
export interface FileInfo {
  /** Number and name. */
  readonly part: string
  readonly setup: string
  readonly revision: number
  /** For example `approved` or `draft`. */
  readonly state: string
  /** SHA-256 of the content, hex. */
  readonly hash: string
  readonly material: string
  /** mm. */
  readonly thickness: number
}

/** Colour numbers of the format's index: top blue, bottom red, levels between green. */
const COLOURS = { top: 5, bottom: 1, level: 3 } as const

/**
 * Top, bottom and every level between as closed polylines, flat in one plane, each depth on its own layer (`TOP`,
 * `LEVEL_12.5`, `BOTTOM`), arcs as bulges, millimetres. Depths below a first event are left out and said so.
 */
export function contoursDxf(evaluation: Evaluation, info: FileInfo): string {
  const { contours, firstEvent } = evaluation
  const layers = layerNames(contours, info.thickness)
  const segments = contours.flatMap(({ loops }) => loops.flatMap(loopFromVertices))
  return dxfText({
    comments: [...headLines(info), ...eventLines(firstEvent), ...cautions],
    layers,
    polylines: contours.flatMap(({ loops }, i) => {
      const layer = layers[i]?.name ?? '0'
      return loops.map((vertices) => ({ layer, vertices }))
    }),
    bounds: segments.length > 0 ? boundsOf(segments) : { minX: 0, minY: 0, maxX: 0, maxY: 0 },
  })
}

function headLines(info: FileInfo): string[] {
  return [
    'Undercant: contours of a bevelled plate by depth below the top face, millimetres.',
    `Part ${info.part}; set-up ${info.setup}, revision ${info.revision}, ${info.state}.`,
    `${info.material}, ${formatNumber(info.thickness, { decimals: 4 })} mm. Content SHA-256 ${info.hash}.`,
  ]
}

function eventLines(event: Evaluation['firstEvent']): string[] {
  return event
    ? [
        `NOT COMPLETE: the walls run into each other at a depth of ${event.depth} mm. Depths past it are left out.`,
      ]
    : []
}

function layerNames(contours: readonly EvaluatedContour[], thickness: number): DxfLayer[] {
  const taken = new Set<string>()
  return contours.map(({ depth }): DxfLayer => {
    if (depth === 0) return { name: 'TOP', colour: COLOURS.top }
    if (depth === thickness) return { name: 'BOTTOM', colour: COLOURS.bottom }
    const short = `LEVEL_${formatNumber(depth, { decimals: 4 })}`
    const name = taken.has(short) ? `LEVEL_${depth}` : short
    taken.add(name)
    return { name, colour: COLOURS.level }
  })
}
