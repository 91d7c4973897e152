import { boundsOf } from '../geometry/loop.ts'
import { sampleArc } from '../geometry/sample.ts'
import { segmentLength } from '../geometry/segment.ts'
import { signedArea } from '../geometry/loop.ts'
import type { Bounds, Point } from '../geometry/types.ts'
import type { Chain, DrawnSegment } from './chain.ts'
import { noteCrossings } from './crossings.ts'
import { curvesOf, hasOwnPlane } from './curves.ts'
import { decodeDrawing } from './decode.ts'
import { readDocument, type DrawingDocument } from './document.ts'
import { dropRepeatedCircles } from './duplicates.ts'
import { DrawingError } from './errors.ts'
import { expandBlocks, type PlacedEntity } from './expand.ts'
import { MAX_COORDINATE, MAX_SEGMENTS } from './limits.ts'
import { linkSegments } from './link.ts'
import { NoticeBook } from './notices.ts'
import { sortIntoParts } from './profile.ts'
import { recogniseArcs } from './recognise.ts'
import { readingOptionsSchema, type LengthUnit, type Reading, type ReadingOptions } from './schema.ts'
import { MILLIMETRES, suggestUnit, unitQuestion } from './units.ts'

/** Ends nearer than this share of the drawing's size are one point: files carry six digits or more. */
const COINCIDENT_SHARE = 1e-6

/** The least share: what the arithmetic of arcs and blocks leaves, with room. */
const ROUNDING_SHARE = 1e-11

type Options = ReturnType<typeof readingOptionsSchema.parse>

/**
 * Reads a DXF drawing of flat parts: closed loops of lines and arcs, sorted into parts, and a report of
 * everything that was read, joined, dropped or left aside. Millimetres; outlines counter-clockwise, holes
 * clockwise. Pure and synchronous; time and memory are bounded by caps, yet give it a worker with a deadline.
 *
 * @throws DrawingError, and nothing else for whatever bytes
 */
export function readDrawing(bytes: Uint8Array, options: ReadingOptions): Reading {
  const chosen = readingOptionsSchema.parse(options)
  const document = readDocument(decodeDrawing(bytes))
  let unit = chosen.unit ?? document.unit ?? 'mm'
  let drawing = drawnIn(document, unit, chosen)
  // A file that declares metres and means millimetres must still come up, so that a person can choose.
  const other = suggestFor(drawing, unit, chosen, document)
  if (other && !chosen.unit && sizeOf(drawing.bounds) > MAX_COORDINATE) {
    unit = other
    drawing = drawnIn(document, unit, chosen)
  }
  if (!drawing.anyGeometry) {
    throw new DrawingError(
      'drawing-no-geometry',
      'The drawing holds no lines or arcs. Export the outline of the part as DXF.',
    )
  }
  const { segments, notices, bounds } = drawing
  const move = intoReach(bounds, notices)
  noteUnit(document, chosen, unit, other, bounds, notices)

  const size = sizeOf(bounds)
  const coincident = Math.max(
    Math.min(chosen.joinTolerance, COINCIDENT_SHARE * size),
    ROUNDING_SHARE * extent(bounds),
  )
  const chains = linkSegments(segments, { coincident, join: chosen.joinTolerance }, notices)
  const rings = closedRings(chains, chosen, coincident, notices)
  noteCrossings(
    rings.map((ring) => ring.map((drawn) => drawn.segment)),
    coincident,
    notices,
  )
  const shifted = rings.map((ring) => ring.map((drawn) => shift(drawn, move)))
  const { loops, parts } = sortIntoParts(shifted)
  return {
    unit: { declared: document.unit, used: unit, suggested: unit === other ? null : other },
    bounds: bounds && shiftBounds(bounds, move),
    layers: drawing.layers,
    entities: drawing.entities,
    loops,
    parts,
    open: openChains(chains, Math.max(chosen.arcTolerance, size / 2000), move),
    notices: notices.list(move),
  }
}

interface Drawing {
  readonly segments: readonly DrawnSegment[]
  readonly bounds: Bounds | null
  readonly anyGeometry: boolean
  readonly layers: Reading['layers']
  readonly entities: Reading['entities']
  readonly notices: NoticeBook
}

/** Everything on the layers to read, in place, as lines and arcs in mm. */
function drawnIn(document: DrawingDocument, unit: LengthUnit, options: Options): Drawing {
  const notices = new NoticeBook()
  const segments: DrawnSegment[] = []
  const layers = new Map<string, { name: string; entities: number; read: boolean }>()
  const entities = new Map<string, { type: string; read: number; ignored: number }>()
  const wanted = options.layers && new Set(options.layers)
  let entity = 0
  let anyGeometry = false
  const count = (type: string, key: 'read' | 'ignored') => {
    const entry = entities.get(type) ?? { type, read: 0, ignored: 0 }
    entry[key] += 1
    entities.set(type, entry)
  }

  expandBlocks(document, MILLIMETRES[unit], notices, {
    ignored(type) {
      count(type, 'ignored')
      notices.note('entity-ignored', null, { entity: type })
    },
    placed(placed) {
      const { layer } = placed
      const { type } = placed.entity.record
      const read = wanted?.has(layer) ?? true
      const onLayer = layers.get(layer) ?? { name: layer, entities: 0, read }
      onLayer.entities += 1
      layers.set(layer, onLayer)
      entity += 1
      if (!read) {
        anyGeometry = true
        count(type, 'ignored')
        notices.note('layer-left-out', null, { layer })
        return
      }
      if (!takeEntity(placed, entity, options, segments, notices)) return count(type, 'ignored')
      count(type, 'read')
    },
  })
  return {
    segments,
    bounds: segments.length === 0 ? null : boundsOf(segments.map((drawn) => drawn.segment)),
    anyGeometry: anyGeometry || segments.length > 0,
    layers: [...layers.values()],
    entities: [...entities.values()],
    notices,
  }
}

/** Adds the entity's curves; false when it is drawn askew and cannot be read. */
function takeEntity(
  placed: PlacedEntity,
  number: number,
  options: Options,
  segments: DrawnSegment[],
  notices: NoticeBook,
): boolean {
  const { record } = placed.entity
  const { segments: curves, approximated } = curvesOf(placed, options.arcTolerance)
  const at = curves[0]?.from ?? null
  if (record.normal === 'askew' && (hasOwnPlane(placed.entity) || placed.entity.type === 'ELLIPSE')) {
    notices.note('not-planar', at)
    return false
  }
  if (curves.length === 0) notices.note('zero-length-dropped', at)
  if (record.spatial) notices.note('not-planar', at)
  if (record.corrected) notices.note('count-corrected', at, { entity: record.type })
  if (record.normal === 'down' && hasOwnPlane(placed.entity)) notices.note('extrusion-mirrored', at)
  if (approximated === 'spline') notices.note('spline-approximated', at)
  if (approximated === 'ellipse') notices.note('ellipse-approximated', at)
  for (const segment of curves) segments.push({ segment, layer: placed.layer, entity: number })
  if (segments.length > MAX_SEGMENTS) {
    throw new DrawingError(
      'drawing-too-many-entities',
      `The drawing comes to more than ${MAX_SEGMENTS} lines and arcs. Export only the part.`,
    )
  }
  return true
}

function suggestFor(
  drawing: Drawing,
  unit: LengthUnit,
  options: Options,
  document: DrawingDocument,
): LengthUnit | null {
  if (!drawing.bounds) return null
  const hint = document.unit === null && !options.unit && document.system === 'imperial' ? 'in' : null
  return suggestUnit(sizeOf(drawing.bounds) / MILLIMETRES[unit], unit, hint)
}

function noteUnit(
  document: DrawingDocument,
  options: Options,
  used: LengthUnit,
  other: LengthUnit | null,
  bounds: Bounds | null,
  notices: NoticeBook,
): void {
  if (document.unit === null && !options.unit) notices.note('unit-undeclared')
  if (other === null) return
  const size = sizeOf(bounds) / MILLIMETRES[used]
  const asked = used === other && document.unit ? document.unit : other
  notices.note('unit-improbable', null, {
    message: unitQuestion(size, used, asked),
    severity: used === other ? 'error' : 'warning',
  })
}

/** Rings without a branch, runs of short lines read as arcs where asked, rings without area left out. */
function closedRings(
  chains: readonly Chain[],
  options: Options,
  coincident: number,
  notices: NoticeBook,
): (readonly DrawnSegment[])[] {
  const rings: (readonly DrawnSegment[])[] = []
  for (const { segments, closed, branched } of chains) {
    if (!closed || branched) continue
    const recognised = options.recogniseArcs
      ? recogniseArcs(segments, options.arcTolerance)
      : { segments, places: [] }
    const ring = recognised.segments.map((drawn) => drawn.segment)
    const length = ring.reduce((sum, segment) => sum + segmentLength(segment), 0)
    if (Math.abs(signedArea(ring)) <= coincident * length) {
      notices.note('zero-length-dropped', ring[0]?.from ?? null)
      continue
    }
    for (const place of recognised.places) notices.note('arc-recognised', place)
    rings.push(recognised.segments)
  }
  return dropRepeatedCircles(rings, coincident, notices)
}

function openChains(
  chains: readonly Chain[],
  chordTolerance: number,
  move: (p: Point) => Point,
): Reading['open'] {
  return chains
    .filter((chain) => !chain.closed || chain.branched)
    .map(({ segments, branched }) => ({
      points: segments
        .flatMap(({ segment }, i) => {
          const points =
            segment.kind === 'arc' ? sampleArc(segment, chordTolerance) : [segment.from, segment.to]
          return i === 0 ? points : points.slice(1)
        })
        .map(move),
      branched,
      layer: segments[0]?.layer ?? '0',
    }))
}

/**
 * How to bring the drawing within the coordinates that a set-up accepts: not at all when it is there already,
 * else by whole millimetres to the origin.
 *
 * @throws DrawingError drawing-too-large
 */
function intoReach(bounds: Bounds | null, notices: NoticeBook): (point: Point) => Point {
  if (!bounds || extent(bounds) <= MAX_COORDINATE) return (point) => point
  if (!(sizeOf(bounds) < MAX_COORDINATE)) {
    throw new DrawingError(
      'drawing-too-large',
      `The drawing is more than ${MAX_COORDINATE / 1000} m long. Choose another unit, or remove what lies far off.`,
    )
  }
  notices.note('origin-moved')
  const [x, y] = [Math.floor(bounds.minX), Math.floor(bounds.minY)]
  return (point) => ({ ...point, x: point.x - x, y: point.y - y })
}

function shift(drawn: DrawnSegment, move: (point: Point) => Point): DrawnSegment {
  const { segment } = drawn
  const ends = { from: move(segment.from), to: move(segment.to) }
  return segment.kind === 'line'
    ? { ...drawn, segment: { ...segment, ...ends } }
    : { ...drawn, segment: { ...segment, ...ends, centre: move(segment.centre) } }
}

function shiftBounds(bounds: Bounds, move: (point: Point) => Point): Bounds {
  const [low, high] = [move({ x: bounds.minX, y: bounds.minY }), move({ x: bounds.maxX, y: bounds.maxY })]
  return { minX: low.x, minY: low.y, maxX: high.x, maxY: high.y }
}

/** Longest side, mm. */
function sizeOf(bounds: Bounds | null): number {
  return bounds ? Math.max(bounds.maxX - bounds.minX, bounds.maxY - bounds.minY) : 0
}

/** Largest coordinate, either sign, mm. */
function extent(bounds: Bounds | null): number {
  return bounds ? Math.max(...Object.values(bounds).map(Math.abs)) : 0
}
