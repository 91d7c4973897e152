import { taperFromCoupon, type Coupon } from '../jet/taper.ts'
import { FEED_POWER } from './feed.ts'

/**
 * Taper and kerf from a shop's own coupons, between them over path and feed. A coupon cut at a feed u over a path h
 * is laid at e = u·h^1.15: cuts of like e have like quality (the feed equation), so that thick and thin coupons stand
 * beside each other and not, as by feed, far apart.
 *
 * Coupons of one path form a row. Along a row figures run straight from coupon to coupon over e, and straight from row
 * to row over h at the same e. So the answer is exact at every coupon, lies between the coupons it is drawn from, and
 * rises or falls with feed wherever the coupons do. Outside a row, and outside all rows, the nearest figure is held
 * and the answer says that it is extrapolated: nothing is ever prolonged.
 */

export interface CouponRow extends Coupon {
  readonly name: string
  readonly material: string
  /** mm/min */
  readonly feed: number
  /**
   * Taper of the side that is the part, radians, measured square to the plate; the waste side has the rest. Where left
   * out the two sides share the difference of the widths alike.
   */
  readonly partSide?: number | undefined
}

export type TaperKind = 'measured' | 'interpolated' | 'extrapolated'

export interface TaperFound {
  readonly kind: TaperKind
  /** Of the wall left on the part, per side, radians; positive where the kerf narrows downward. */
  readonly partSide: number
  readonly wasteSide: number
  /** Part side less waste side. */
  readonly difference: number
  /** Kerf at the top face, mm. */
  readonly widthTop: number
  /** Coupon nearest in path and e, by ratio; and those that the answer is drawn from. */
  readonly nearest: string
  readonly from: readonly string[]
}

export const taperRefusalCodes = ['no-coupon-of-material', 'coupon-unsound', 'query-out-of-range'] as const
export type TaperRefusalCode = (typeof taperRefusalCodes)[number]

export interface TaperRefusal {
  readonly kind: 'refused'
  readonly code: TaperRefusalCode
  /** Name of the unsound coupon. */
  readonly coupon: string | null
}

/**
 * Feeds within this share of each other are the same one: our own choice, the size of what a feed dial steps by. It
 * moves no answer at a coupon; it lets rows of one coupon each, cut for one quality, be joined.
 */
export const SAME_FEED = 0.02

/** Taper of one material at a path through it, mm, and a feed, mm/min. */
export function taperFor(
  coupons: readonly CouponRow[],
  material: string,
  path: number,
  feed: number,
): TaperFound | TaperRefusal {
  if (!isPositive(path) || !isPositive(feed)) return refused('query-out-of-range')
  const own = coupons.filter((coupon) => coupon.material === material)
  const unsound = own.find((coupon) => !isSound(coupon))
  if (unsound) return refused('coupon-unsound', unsound.name)
  const points = own.map(pointOf)
  const nearest = nearestOf(points, path, feed)
  if (!nearest) return refused('no-coupon-of-material')
  const e = feed * path ** FEED_POWER
  const paths = [...new Set(points.map((point) => point.path))].sort((a, b) => a - b)
  const above = paths.find((h) => h >= path) ?? paths.at(-1)!
  const below = paths.findLast((h) => h <= path) ?? paths[0]!
  const a = alongRow(
    points.filter((point) => point.path === below),
    e,
  )
  const b =
    above === below
      ? a
      : alongRow(
          points.filter((point) => point.path === above),
          e,
        )
  const share = above === below ? 0 : (path - below) / (above - below)
  const mix = (of: (figures: Figures) => number) => of(a) + share * (of(b) - of(a))
  const partSide = mix((figures) => figures.partSide)
  const wasteSide = mix((figures) => figures.wasteSide)
  const outside = a.held || b.held || path < below || path > above
  const at = points.some((point) => point.path === path && point.e === e)
  return {
    kind: outside ? 'extrapolated' : at ? 'measured' : 'interpolated',
    partSide,
    wasteSide,
    difference: partSide - wasteSide,
    widthTop: mix((figures) => figures.widthTop),
    nearest: nearest.name,
    from: [...new Set([...a.names, ...b.names])],
  }
}

/** Tangents of both sides' tapers add up to the difference of the widths over the path. */
export function sidesOf(coupon: CouponRow): { readonly partSide: number; readonly wasteSide: number } {
  const mean = taperFromCoupon(coupon)
  const { partSide } = coupon
  if (partSide === undefined) return { partSide: mean, wasteSide: mean }
  return { partSide, wasteSide: Math.atan(2 * Math.tan(mean) - Math.tan(partSide)) }
}

interface Point {
  readonly name: string
  readonly path: number
  readonly e: number
  readonly partSide: number
  readonly wasteSide: number
  readonly widthTop: number
}

interface Figures {
  readonly partSide: number
  readonly wasteSide: number
  readonly widthTop: number
  readonly names: readonly string[]
  /** The row does not reach to e: the figure of its nearer end is held. */
  readonly held: boolean
}

function pointOf(coupon: CouponRow): Point {
  const { name, path, feed, widthTop } = coupon
  return { name, path, e: feed * path ** FEED_POWER, widthTop, ...sidesOf(coupon) }
}

/** Straight between the neighbours over e; coupons cut alike count with their mean. */
function alongRow(row: readonly Point[], e: number): Figures {
  const places = [...new Set(row.map((point) => point.e))].sort((a, b) => a - b)
  const high = places.find((place) => place >= e) ?? places.at(-1)!
  const low = places.findLast((place) => place <= e) ?? places[0]!
  const [a, b] = [meanAt(row, low), meanAt(row, high)]
  const share = high === low ? 0 : (e - low) / (high - low)
  const mix = (of: (figures: Figures) => number) => of(a) + share * (of(b) - of(a))
  return {
    partSide: mix((figures) => figures.partSide),
    wasteSide: mix((figures) => figures.wasteSide),
    widthTop: mix((figures) => figures.widthTop),
    names: high === low ? a.names : [...a.names, ...b.names],
    held: e > high * (1 + SAME_FEED) || e < low * (1 - SAME_FEED),
  }
}

function meanAt(row: readonly Point[], e: number): Figures {
  const alike = row.filter((point) => point.e === e)
  const mean = (of: (point: Point) => number) =>
    alike.reduce((sum, point) => sum + of(point), 0) / alike.length
  return {
    partSide: mean((point) => point.partSide),
    wasteSide: mean((point) => point.wasteSide),
    widthTop: mean((point) => point.widthTop),
    names: alike.map((point) => point.name),
    held: false,
  }
}

function nearestOf(points: readonly Point[], path: number, feed: number): Point | null {
  const e = feed * path ** FEED_POWER
  const apart = (point: Point) => Math.hypot(Math.log(point.path / path), Math.log(point.e / e))
  return points.reduce<Point | null>(
    (best, point) => (best && apart(best) <= apart(point) ? best : point),
    null,
  )
}

function isSound({ widthTop, widthBottom, path, feed, partSide = 0 }: CouponRow): boolean {
  return (
    isPositive(widthTop) &&
    widthBottom >= 0 &&
    widthBottom < Infinity &&
    isPositive(path) &&
    isPositive(feed) &&
    Math.abs(partSide) < Math.PI / 2
  )
}

function isPositive(value: number): boolean {
  return value > 0 && value < Infinity
}

function refused(code: TaperRefusalCode, coupon: string | null = null): TaperRefusal {
  return { kind: 'refused', code, coupon }
}
