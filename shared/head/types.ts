/**
 * The head that carries the nozzle: two rotary axes, the outer one carrying the inner one, over linear axes that carry
 * the **pivot**, the point where the two rotary axes cross. mm, radians, seconds for rotary speeds, minutes for times.
 */

/**
 * C-A: C turns about Z and carries A, which tilts about the turned X. Tool vector Rz(C)·Rx(A)·z
 * = (sin C sin A, −cos C sin A, cos A).
 * A-B: two crossed tilts; A tilts about X and carries B, which tilts about the tilted Y. Tool vector Rx(A)·Ry(B)·z
 * = (sin B, −sin A cos B, cos A cos B).
 * Axes are positive counter-clockwise seen from the positive end (ISO 841).
 */
export const headKinds = ['C-A', 'A-B'] as const
export type HeadKind = (typeof headKinds)[number]

export type AxisName = 'A' | 'B' | 'C'

export interface RotaryAxis {
  /** Travel, radians; −Infinity and Infinity for an axis that turns endlessly. */
  readonly from: number
  readonly to: number
  /** Greatest speed, rad/s; above 0, Infinity where none is known. */
  readonly speed: number
}

export interface HeadSpec {
  readonly kind: HeadKind
  /** From the nozzle tip to the pivot along the nozzle, mm. */
  readonly pivotLength: number
  /** C of a C-A head, A of an A-B head. */
  readonly outer: RotaryAxis
  /** A of a C-A head, B of an A-B head. */
  readonly inner: RotaryAxis
  /** Mechanical limit of the whole tilt, radians. */
  readonly tilt: number
  /** Greatest speed of the nozzle tip and of the pivot, mm/min; acceleration is left out. */
  readonly linearSpeed: number
}

export interface MotionTolerance {
  /** Greatest angle between the nozzle as commanded and the jet as wanted, radians. */
  readonly direction: number
  /** How far the nozzle tip may stand from where it should be at that moment, mm. */
  readonly position: number
}

/** 0.01°, ours: it moves the lower edge of a plate of 25 mm by 0.0044 mm, a sixth of the repeatability of common practice (0.025 mm, no source). */
export const DIRECTION_TOLERANCE = (0.01 * Math.PI) / 180
/** Ours: a fifth of the same repeatability. */
export const POSITION_TOLERANCE = 0.005

/**
 * The share of the direction's tolerance that holding C near vertical may use; the other half is left to the way from
 * station to station. Ours.
 */
export const HOLD_SHARE = 0.5

export const headProblemCodes = [
  /** An axis would leave its travel; `value`: the angle farthest out, `limit`: the end of travel, radians. */
  'travel-exceeded',
  /** `value`: the jet's whole tilt, `limit`: the mechanical limit, radians. */
  'tilt-over-mechanical',
  /** A rotary axis is too slow for the wished feed; `value`: the feed that is left, `limit`: the wished one, mm/min (minutes per move where the jet's top point stands still). */
  'feed-limited-by-rotary',
  /** The tip or the pivot would be faster than the linear axes; figures as above. */
  'feed-limited-by-linear',
] as const
export type HeadProblemCode = (typeof headProblemCodes)[number]

/** The worst of an unbroken stretch along one edge; a pass out of travel has one for each end of each axis. */
export interface HeadProblem {
  readonly code: HeadProblemCode
  /** Where it is worst; for travel, where the axis first leaves it. */
  readonly station: number
  /** Numbered through all loops; −1 off every edge. */
  readonly edge: number
  readonly axis: AxisName | null
  readonly value: number
  readonly limit: number
  /** travel-exceeded: the last station before, in that pass, from which a turn through the waste sets out, where C could be unwound; −1 for none. */
  readonly unwindAt: number
}

/** Column i tells station i of a jet path. */
export interface HeadAxes {
  readonly kind: HeadKind
  /** As the head leaves the station, radians, unwound through the pass. */
  readonly outer: Float64Array
  readonly inner: Float64Array
  /** Turn of the outer axis at a standstill on arriving at the station, radians: it arrives at outer − dwell. */
  readonly dwell: Float64Array
  /** Part of the move at which the jet passes the vertical so closely that C may be turned there; 0 for none. */
  readonly crossing: Float64Array
  /** 1 where the jet is so near vertical that C is free and is held. */
  readonly held: Uint8Array
  readonly problems: readonly HeadProblem[]
}
