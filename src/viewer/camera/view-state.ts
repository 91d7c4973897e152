/**
 * Where the part is looked at from, and how that is mapped to the screen. Orthographic, z up, millimetres,
 * radians, CSS pixels with y downward. Pure: nothing here knows about three or the DOM.
 */
export type Vec3 = readonly [number, number, number]

export interface ViewState {
  /** Turn about z: 0 looks from the front (from −Y), positive walks round to the right (+X). */
  readonly azimuth: number
  /** Height of the eye: π/2 looks straight down, −π/2 straight up. */
  readonly elevation: number
  /** The point that stays in the middle while turning. */
  readonly target: Vec3
  /** Millimetres that span the smaller side of the free area. */
  readonly span: number
}

/** The part of the viewer that the drawing may use. */
export interface Frame {
  readonly width: number
  readonly height: number
  readonly centreX: number
  readonly centreY: number
  /** Free width and height, what the insets leave. */
  readonly freeWidth: number
  readonly freeHeight: number
}

/** Axes of the screen in the plate's frame: rightward, upward, and out of the screen toward the eye. */
export interface Basis {
  readonly right: Vec3
  readonly up: Vec3
  readonly toward: Vec3
}

/** A point on screen; `nearness` grows toward the eye, mm from the target's plane. */
export interface ScreenPoint {
  readonly x: number
  readonly y: number
  readonly nearness: number
}

/** Smallest free side that is still drawn in, px: insets larger than the viewer are cut to it. */
const LEAST_FREE_SIDE = 40

export function frameOf(
  width: number,
  height: number,
  insets: { top: number; right: number; bottom: number; left: number },
): Frame {
  const freeWidth = Math.max(LEAST_FREE_SIDE, width - insets.left - insets.right)
  const freeHeight = Math.max(LEAST_FREE_SIDE, height - insets.top - insets.bottom)
  return {
    width,
    height,
    freeWidth,
    freeHeight,
    centreX: insets.left + (width - insets.left - insets.right) / 2,
    centreY: insets.top + (height - insets.top - insets.bottom) / 2,
  }
}

/** Pixels per millimetre. */
export function scaleOf(view: ViewState, frame: Frame): number {
  return Math.min(frame.freeWidth, frame.freeHeight) / view.span
}

export function basisOf({ azimuth, elevation }: Pick<ViewState, 'azimuth' | 'elevation'>): Basis {
  const sa = Math.sin(azimuth)
  const ca = Math.cos(azimuth)
  const se = Math.sin(elevation)
  const ce = Math.cos(elevation)
  return { right: [ca, sa, 0], up: [-sa * se, ca * se, ce], toward: [sa * ce, -ca * ce, se] }
}

export function dot(a: Vec3, b: Vec3): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2]
}

/** Projects points of the plate's frame to the screen. */
export function projector(view: ViewState, frame: Frame): (p: Vec3) => ScreenPoint {
  const { right, up, toward } = basisOf(view)
  const scale = scaleOf(view, frame)
  const origin = [dot(view.target, right), dot(view.target, up), dot(view.target, toward)] as const
  return (p) => ({
    x: frame.centreX + (dot(p, right) - origin[0]) * scale,
    y: frame.centreY - (dot(p, up) - origin[1]) * scale,
    nearness: dot(p, toward) - origin[2],
  })
}

/** The point under a pixel, in the plane through the target that faces the eye. */
export function unproject(view: ViewState, frame: Frame, x: number, y: number): Vec3 {
  const { right, up } = basisOf(view)
  const scale = scaleOf(view, frame)
  const r = (x - frame.centreX) / scale
  const u = (frame.centreY - y) / scale
  return along(along(view.target, right, r), up, u)
}

/** Turns; the elevation stops at straight down and straight up. */
export function orbit(view: ViewState, byAzimuth: number, byElevation: number): ViewState {
  const elevation = Math.min(Math.PI / 2, Math.max(-Math.PI / 2, view.elevation + byElevation))
  return { ...view, azimuth: wrapTurn(view.azimuth + byAzimuth), elevation }
}

/** Moves the part by pixels of the screen. */
export function pan(view: ViewState, frame: Frame, dx: number, dy: number): ViewState {
  const { right, up } = basisOf(view)
  const scale = scaleOf(view, frame)
  return { ...view, target: along(along(view.target, right, -dx / scale), up, dy / scale) }
}

/** Zooms by a factor (above 1 is closer), keeping the point under the pixel where it is. */
export function zoomAt(
  view: ViewState,
  frame: Frame,
  factor: number,
  x: number,
  y: number,
  limits: { least: number; most: number },
): ViewState {
  const span = Math.min(limits.most, Math.max(limits.least, view.span / factor))
  const under = unproject(view, frame, x, y)
  const share = 1 - span / view.span
  const target = view.target.map((t, i) => t + (under[i]! - t) * share) as unknown as Vec3
  return { ...view, span, target }
}

/** The view a share of the way from one to another, by the shorter turn and with an even zoom. */
export function between(from: ViewState, to: ViewState, share: number): ViewState {
  const mix = (a: number, b: number) => a + (b - a) * share
  return {
    azimuth: wrapTurn(from.azimuth + wrapTurn(to.azimuth - from.azimuth) * share),
    elevation: mix(from.elevation, to.elevation),
    target: [0, 1, 2].map((i) => mix(from.target[i]!, to.target[i]!)) as unknown as Vec3,
    span: from.span * (to.span / from.span) ** share,
  }
}

export function along(p: Vec3, direction: Vec3, distance: number): Vec3 {
  return [p[0] + direction[0] * distance, p[1] + direction[1] * distance, p[2] + direction[2] * distance]
}

/** The same turn in (−π, π]. */
export function wrapTurn(angle: number): number {
  const turn = angle - Math.round(angle / (2 * Math.PI)) * 2 * Math.PI
  return turn <= -Math.PI ? turn + 2 * Math.PI : turn
}
