import dxfParserModule, {
  type IArcEntity,
  type ICircleEntity,
  type IEllipseEntity,
  type IEntity,
  type IInsertEntity,
  type ILineEntity,
  type ILwpolylineEntity,
  type IPolylineEntity,
  type ISplineEntity,
} from 'dxf-parser'
import type { Point } from '../geometry/types.ts'
import { DrawingError } from './errors.ts'
import type { EntityRecord } from './records.ts'

/** An entity as typed values, still in its own coordinates and the drawing's unit. Angles in radians. */
export type DrawnEntity = { readonly record: EntityRecord } & Shape

export type Shape =
  | { readonly type: 'LINE'; readonly from: Point; readonly to: Point }
  | {
      readonly type: 'ARC'
      readonly centre: Point
      readonly radius: number
      readonly start: number
      readonly end: number
    }
  | { readonly type: 'CIRCLE'; readonly centre: Point; readonly radius: number }
  | { readonly type: 'POLYLINE'; readonly vertices: readonly BulgedPoint[]; readonly closed: boolean }
  | {
      readonly type: 'ELLIPSE'
      readonly centre: Point
      readonly major: Point
      readonly ratio: number
      readonly start: number
      readonly end: number
    }
  | SplineShape
  | InsertShape

export type BulgedPoint = Point & { readonly bulge: number }

export interface SplineShape {
  readonly type: 'SPLINE'
  readonly degree: number
  readonly knots: readonly number[]
  readonly control: readonly Point[]
  readonly fit: readonly Point[]
  readonly closed: boolean
}

export interface InsertShape {
  readonly type: 'INSERT'
  readonly block: string
  readonly at: Point
  readonly scale: Point
  readonly rotation: number
  readonly columns: number
  readonly rows: number
  readonly spacing: Point
}

// At run time the default import is the class itself; the package's types describe a module around it.
const DxfParser = dxfParserModule as unknown as typeof dxfParserModule.DxfParser

/** Entities handed to the parser at once: its memory grows with the text, and nothing is kept between batches. */
const BATCH = 4_000

/**
 * Reads checked records with dxf-parser and makes sure that it gave back every point it was given.
 *
 * @throws DrawingError drawing-lost-vertices
 */
export function readEntities(records: readonly EntityRecord[]): DrawnEntity[] {
  const drawn: DrawnEntity[] = []
  for (let start = 0; start < records.length; start += BATCH) {
    const batch = records.slice(start, start + BATCH)
    const body = batch.map((record) => `0\n${record.type}\n${record.text}`).join('')
    const parsed = new DxfParser().parseSync(`0\nSECTION\n2\nENTITIES\n${body}0\nENDSEC\n0\nEOF\n`)
    const entities = parsed?.entities ?? []
    if (entities.length !== batch.length) throw lost(batch[0])
    batch.forEach((record, i) => {
      const entity = entities[i]
      if (!entity || entity.type !== record.type) throw lost(record)
      const shape = shapeOf(entity)
      if (pointCount(shape) !== record.points || !allFinite(shape)) throw lost(record)
      drawn.push({ record, ...shape })
    })
  }
  return drawn
}

function shapeOf(entity: IEntity): Shape {
  switch (entity.type) {
    case 'LINE': {
      const [from, to] = (entity as ILineEntity).vertices
      return { type: 'LINE', from: point(from), to: point(to) }
    }
    case 'ARC': {
      const arc = entity as IArcEntity
      return {
        type: 'ARC',
        centre: point(arc.center),
        radius: arc.radius,
        start: arc.startAngle,
        end: arc.endAngle,
      }
    }
    case 'CIRCLE': {
      const circle = entity as ICircleEntity
      return { type: 'CIRCLE', centre: point(circle.center), radius: circle.radius }
    }
    case 'LWPOLYLINE':
    case 'POLYLINE': {
      const { vertices, shape } = entity as ILwpolylineEntity | IPolylineEntity
      return {
        type: 'POLYLINE',
        vertices: vertices.map((vertex) => ({ ...point(vertex), bulge: vertex.bulge ?? 0 })),
        closed: shape ?? false,
      }
    }
    case 'ELLIPSE': {
      const ellipse = entity as IEllipseEntity
      return {
        type: 'ELLIPSE',
        centre: point(ellipse.center),
        major: point(ellipse.majorAxisEndPoint),
        ratio: ellipse.axisRatio,
        start: ellipse.startAngle,
        end: ellipse.endAngle,
      }
    }
    case 'SPLINE': {
      const spline = entity as ISplineEntity
      return {
        type: 'SPLINE',
        degree: spline.degreeOfSplineCurve,
        knots: spline.knotValues ?? [],
        control: (spline.controlPoints ?? []).map(point),
        fit: (spline.fitPoints ?? []).map(point),
        closed: spline.closed ?? false,
      }
    }
    default:
      return insertOf(entity as IInsertEntity)
  }
}

function insertOf(insert: IInsertEntity): InsertShape {
  return {
    type: 'INSERT',
    block: insert.name,
    at: point(insert.position),
    scale: { x: insert.xScale ?? 1, y: insert.yScale ?? 1 },
    rotation: ((insert.rotation ?? 0) * Math.PI) / 180,
    columns: Math.max(1, Math.trunc(insert.columnCount ?? 1)),
    rows: Math.max(1, Math.trunc(insert.rowCount ?? 1)),
    spacing: { x: insert.columnSpacing ?? 0, y: insert.rowSpacing ?? 0 },
  }
}

function point(raw: Point | undefined): Point {
  return raw ? { x: raw.x, y: raw.y } : { x: Number.NaN, y: Number.NaN }
}

function pointCount(shape: Shape): number {
  switch (shape.type) {
    case 'LINE':
    case 'ELLIPSE':
      return 2
    case 'POLYLINE':
      return shape.vertices.length
    case 'SPLINE':
      return shape.control.length + shape.fit.length
    case 'ARC':
    case 'CIRCLE':
    case 'INSERT':
      return 1
  }
}

function allFinite(value: unknown): boolean {
  if (typeof value === 'number') return Number.isFinite(value)
  if (typeof value !== 'object' || value === null) return true
  return Object.values(value).every(allFinite)
}

function lost(record: EntityRecord | undefined): DrawingError {
  return new DrawingError(
    'drawing-lost-vertices',
    `Points of the ${record?.type ?? 'entity'} at line ${record?.line ?? 0} were lost in reading. Export it again.`,
    record?.line,
  )
}
