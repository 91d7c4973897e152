import { DrawingError } from './errors.ts'
import { MAX_SPLINE_DEGREE } from './limits.ts'
import type { GeometryType, RawEntity } from './structure.ts'
import { integerOf, numberOf, type Tag } from './tags.ts'

/**
 * One geometry entity, checked and written anew in the order and with the counts that dxf-parser needs, plus
 * what dxf-parser drops (`weights`, `normal`) or would have to be trusted with (`points`).
 */
export interface EntityRecord {
  readonly type: GeometryType
  readonly layer: string
  readonly line: number
  /** The entity's groups as DXF text, without a handle. */
  readonly text: string
  /** Vertices, control points and fit points that a reader must give back. */
  readonly points: number
  readonly weights: readonly number[]
  readonly normal: Normal
  /** Not drawn in one plane parallel to the page, so that its projection is read. */
  readonly spatial: boolean
  /** The file's own count of points was wrong. */
  readonly corrected: boolean
}

/** Direction of extrusion: towards the viewer, away (mirrored), or askew. */
export type Normal = 'up' | 'down' | 'askew'

/** How far an extrusion may lean and still be taken for vertical; exporters round to about 1e-9. */
const NORMAL_SLACK = 1e-6

type Pair = readonly [code: number, value: number | string]

/** Null for a mesh, which draws no outline. @throws DrawingError drawing-number, drawing-malformed */
export function recordOf(raw: RawEntity, type: GeometryType): EntityRecord | null {
  const groups = new Groups(raw)
  const body = bodyOf(type, groups, raw)
  if (body === null) return null
  const layer = groups.text(8) || '0'
  const pairs: Pair[] = [[8, layer], ...body.pairs]
  return {
    type,
    layer,
    line: raw.line,
    text: pairs.map(([code, value]) => `${code}\n${value}\n`).join(''),
    points: body.points,
    weights: body.weights ?? [],
    normal: normalOf(groups),
    spatial: body.spatial,
    corrected: body.corrected ?? false,
  }
}

interface Body {
  readonly pairs: readonly Pair[]
  readonly points: number
  readonly spatial: boolean
  readonly weights?: readonly number[]
  readonly corrected?: boolean
}

function bodyOf(type: GeometryType, groups: Groups, raw: RawEntity): Body | null {
  switch (type) {
    case 'LINE': {
      const [from, to] = [groups.point(10), groups.point(11)]
      return { pairs: [...xy(10, from), ...xy(11, to)], points: 2, spatial: from.z !== to.z }
    }
    case 'ARC':
      return {
        pairs: [...xy(10, groups.point(10)), ...groups.required(40, 50, 51)],
        points: 1,
        spatial: false,
      }
    case 'CIRCLE':
      return { pairs: [...xy(10, groups.point(10)), ...groups.required(40)], points: 1, spatial: false }
    case 'ELLIPSE': {
      const axis = groups.point(11)
      const angles: Pair[] = [
        [41, groups.number(41) ?? 0],
        [42, groups.number(42) ?? 2 * Math.PI],
      ]
      return {
        pairs: [...xy(10, groups.point(10)), ...xy(11, axis), ...groups.required(40), ...angles],
        points: 2,
        spatial: axis.z !== 0,
      }
    }
    case 'INSERT':
      return {
        pairs: [
          [2, groups.text(2)],
          ...xy(10, groups.point(10)),
          ...groups.given(41, 42, 43, 44, 45, 50, 70, 71),
        ],
        points: 1,
        spatial: false,
      }
    case 'LWPOLYLINE':
      return lightPolyline(groups)
    case 'POLYLINE':
      return polyline(groups, raw)
    case 'SPLINE':
      return spline(groups)
  }
}

/** A vertex begins at its x; whatever follows up to the next x belongs to it, in any order. */
function lightPolyline(groups: Groups): Body {
  const vertices = groups.series(10, [42])
  const declared = groups.integer(90)
  return {
    pairs: [
      [90, vertices.length],
      [70, groups.integer(70) ?? 0],
      ...vertices.flatMap((v) => [...xy(10, v), ...(v.extra ? [[42, v.extra] as const] : [])]),
    ],
    points: vertices.length,
    spatial: false,
    corrected: declared !== vertices.length,
  }
}

const CLOSED = 1
const SPATIAL_POLYLINE = 8
const MESHES = 16 | 64
/** Vertex flag: a point of the frame that a fitted polyline only leans towards. */
const FRAME_POINT = 16

function polyline(groups: Groups, raw: RawEntity): Body | null {
  const flags = groups.integer(70) ?? 0
  if ((flags & MESHES) !== 0) return null
  const all = raw.vertices.map((tags) => new Groups({ ...raw, tags }))
  const drawn = all.filter((vertex) => ((vertex.integer(70) ?? 0) & FRAME_POINT) === 0)
  const points = drawn.map((vertex) => vertex.point(10))
  const inSpace = (flags & SPATIAL_POLYLINE) !== 0
  return {
    pairs: [
      [66, 1],
      [70, flags & (CLOSED | SPATIAL_POLYLINE)],
      ...drawn.flatMap((vertex, i): Pair[] => [
        [0, 'VERTEX'],
        ...xy(10, points[i] ?? vertex.point(10)),
        [42, inSpace ? 0 : (vertex.number(42) ?? 0)],
      ]),
      [0, 'SEQEND'],
    ],
    points: drawn.length,
    spatial: inSpace && points.some((point) => point.z !== points[0]?.z),
  }
}

function spline(groups: Groups): Body {
  const degree = groups.integer(71) ?? 3
  if (degree < 1 || degree > MAX_SPLINE_DEGREE) {
    throw new DrawingError(
      'drawing-malformed',
      `A SPLINE of degree ${degree} cannot be read. Export it as arcs.`,
    )
  }
  const knots = groups.numbers(40)
  const weights = groups.numbers(41)
  const control = groups.series(10, [])
  const fit = groups.series(11, [])
  const wrong = (code: number, count: number) => {
    const declared = groups.integer(code)
    return declared !== null && declared !== count
  }
  const all = [...control, ...fit]
  return {
    pairs: [
      [70, groups.integer(70) ?? 0],
      [71, degree],
      ...knots.map((knot): Pair => [40, knot]),
      ...control.flatMap((point) => xy(10, point)),
      ...fit.flatMap((point) => xy(11, point)),
    ],
    points: control.length + fit.length,
    spatial: all.some((point) => point.z !== all[0]?.z),
    weights,
    corrected: wrong(72, knots.length) || wrong(73, control.length) || wrong(74, fit.length),
  }
}

function normalOf(groups: Groups): Normal {
  const [x, y, z] = [groups.number(210) ?? 0, groups.number(220) ?? 0, groups.number(230) ?? 1]
  const length = Math.hypot(x, y, z)
  if (length === 0) return 'up'
  if (Math.hypot(x, y) > NORMAL_SLACK * length) return 'askew'
  return z > 0 ? 'up' : 'down'
}

interface PointGroups {
  readonly x: number
  readonly y: number
  readonly z: number
}

function xy(code: number, point: PointGroups): Pair[] {
  return [
    [code, point.x],
    [code + 10, point.y],
  ]
}

const TEXT_CODES = 9

/** An entity's groups by code. Every number among them is checked, used or not. */
class Groups {
  readonly #raw: RawEntity
  readonly #first = new Map<number, Tag>()

  constructor(raw: RawEntity) {
    this.#raw = raw
    for (const tag of raw.tags) {
      if (holdsNumber(tag.code)) numberOf(tag)
      if (!this.#first.has(tag.code)) this.#first.set(tag.code, tag)
    }
  }

  text(code: number): string {
    return this.#first.get(code)?.value ?? ''
  }

  number(code: number): number | null {
    const tag = this.#first.get(code)
    return tag ? numberOf(tag) : null
  }

  integer(code: number): number | null {
    const tag = this.#first.get(code)
    return tag ? integerOf(tag) : null
  }

  numbers(code: number): number[] {
    return this.#raw.tags.filter((tag) => tag.code === code).map(numberOf)
  }

  /** A point wherever its groups stand: 10, 11, 20, 21 is as good as 10, 20, 11, 21. */
  point(code: number): PointGroups {
    const [x, y] = [this.number(code), this.number(code + 10)]
    if (x === null || y === null) throw this.#missing(x === null ? code : code + 10)
    return { x, y, z: this.number(code + 20) ?? 0 }
  }

  required(...codes: number[]): Pair[] {
    return codes.map((code) => {
      const value = this.number(code)
      if (value === null) throw this.#missing(code)
      return [code, value]
    })
  }

  given(...codes: number[]): Pair[] {
    return codes.flatMap((code): Pair[] => {
      const value = this.number(code)
      return value === null ? [] : [[code, value]]
    })
  }

  /** Points that each begin at group `code`; one of the codes `extra` may follow a point and belong to it. */
  series(code: number, extra: readonly number[]): (PointGroups & { extra: number })[] {
    const points: { x: number; y: number | null; z: number; extra: number }[] = []
    for (const tag of this.#raw.tags) {
      const last = points.at(-1)
      if (tag.code === code) points.push({ x: numberOf(tag), y: null, z: 0, extra: 0 })
      else if (!last) continue
      else if (tag.code === code + 10) last.y = numberOf(tag)
      else if (tag.code === code + 20) last.z = numberOf(tag)
      else if (extra.includes(tag.code)) last.extra = numberOf(tag)
    }
    return points.map((point) => {
      if (point.y === null) throw this.#missing(code + 10)
      return { ...point, y: point.y }
    })
  }

  #missing(code: number): DrawingError {
    const { type, line } = this.#raw
    return new DrawingError(
      'drawing-malformed',
      `The ${type} at line ${line} lacks group ${code}. Export the drawing again.`,
      line,
    )
  }
}

function holdsNumber(code: number): boolean {
  return (code > TEXT_CODES && code < 100) || (code >= 110 && code < 150) || (code >= 210 && code < 240)
}
