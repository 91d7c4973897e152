import { MotionLimit } from './motion.ts'
import type { HeadSpec } from './types.ts'

/**
 * The lines of a program, in columns; line i tells a place, and the move from it to line i + 1. mm, radians, minutes.
 */
export interface HeadProgram {
  readonly count: number
  /** Index of the line after the last one of each pass; the last line of a pass has no move. */
  readonly ends: Int32Array
  /** Station of the jet path that the line's move belongs to, and the part of its move. */
  readonly station: Int32Array
  readonly part: Float64Array
  /** Nozzle tip, on the axis at the stand-off above the top face. */
  readonly x: Float64Array
  readonly y: Float64Array
  readonly z: Float64Array
  /** Pivot: a pivot length further along the commanded tool vector. */
  readonly pivotX: Float64Array
  readonly pivotY: Float64Array
  readonly pivotZ: Float64Array
  readonly outer: Float64Array
  readonly inner: Float64Array
  readonly minutes: Float64Array
  /** Along the tip's way, mm/min, as if the rotary axes were still (RS274/NGC); 0 where the tip stands still. */
  readonly feed: Float64Array
  /** A `MotionLimit`. */
  readonly limit: Uint8Array
  readonly totalMinutes: number
}

/** The columns that grow while lines are written. */
export interface ProgramWriter {
  count: number
  readonly ends: number[]
  station: Int32Array
  part: Float64Array
  x: Float64Array
  y: Float64Array
  z: Float64Array
  outer: Float64Array
  inner: Float64Array
}

export function programColumns(capacity: number): ProgramWriter {
  const numbers = () => new Float64Array(capacity)
  return {
    count: 0,
    ends: [],
    station: new Int32Array(capacity),
    part: numbers(),
    x: numbers(),
    y: numbers(),
    z: numbers(),
    outer: numbers(),
    inner: numbers(),
  }
}

export function putStation(
  w: ProgramWriter,
  station: number,
  part: number,
  x: number,
  y: number,
  z: number,
  outer: number,
  inner: number,
): void {
  if (w.count === w.station.length) grow(w)
  const i = w.count++
  w.station[i] = station
  w.part[i] = part
  w.x[i] = x
  w.y[i] = y
  w.z[i] = z
  w.outer[i] = outer
  w.inner[i] = inner
}

function grow(w: ProgramWriter): void {
  const capacity = 2 * w.station.length
  const numbers = (old: Float64Array) => {
    const out = new Float64Array(capacity)
    out.set(old)
    return out
  }
  const stations = new Int32Array(capacity)
  stations.set(w.station)
  w.station = stations
  w.part = numbers(w.part)
  w.x = numbers(w.x)
  w.y = numbers(w.y)
  w.z = numbers(w.z)
  w.outer = numbers(w.outer)
  w.inner = numbers(w.inner)
}

/** Places of the pivot, times and feeds, line by line; `pace`: wished minutes of every whole move. Each line takes the longest of the wish and what each axis needs. */
export function timesOf(
  { kind, outer: outerAxis, inner: innerAxis, pivotLength, linearSpeed }: HeadSpec,
  pace: Float64Array,
  w: ProgramWriter,
): HeadProgram {
  const { count } = w
  const [station, part] = [w.station.slice(0, count), w.part.slice(0, count)]
  const [x, y, z] = [w.x.slice(0, count), w.y.slice(0, count), w.z.slice(0, count)]
  const [outer, inner] = [w.outer.slice(0, count), w.inner.slice(0, count)]
  const numbers = () => new Float64Array(count)
  const [pivotX, pivotY, pivotZ, minutes, feed] = [numbers(), numbers(), numbers(), numbers(), numbers()]
  const limit = new Uint8Array(count)
  for (let i = 0; i < count; i++) {
    const [so, co, si, ci] = [
      Math.sin(outer[i]!),
      Math.cos(outer[i]!),
      Math.sin(inner[i]!),
      Math.cos(inner[i]!),
    ]
    pivotX[i] = x[i]! + pivotLength * (kind === 'C-A' ? so * si : si)
    pivotY[i] = y[i]! - pivotLength * (kind === 'C-A' ? co * si : so * ci)
    pivotZ[i] = z[i]! + pivotLength * (kind === 'C-A' ? ci : co * ci)
  }
  let total = 0
  let begin = 0
  for (const end of w.ends) {
    for (let i = begin; i + 1 < end; i++) {
      const j = i + 1
      const until = station[j] === station[i] ? part[j]! : 1
      const tip = Math.hypot(x[j]! - x[i]!, y[j]! - y[i]!, z[j]! - z[i]!)
      const pivot = Math.hypot(pivotX[j]! - pivotX[i]!, pivotY[j]! - pivotY[i]!, pivotZ[j]! - pivotZ[i]!)
      const wished = pace[station[i]!]! * (until - part[i]!)
      const rotary = Math.max(
        Math.abs(outer[j]! - outer[i]!) / (60 * outerAxis.speed),
        Math.abs(inner[j]! - inner[i]!) / (60 * innerAxis.speed),
      )
      const linear = Math.max(tip, pivot) / linearSpeed
      const time = Math.max(wished, rotary, linear)
      if (time > wished) limit[i] = rotary >= linear ? MotionLimit.rotary : MotionLimit.linear
      minutes[i] = time
      feed[i] = time > 0 ? tip / time : 0
      total += time
    }
    begin = end
  }
  return {
    count,
    ends: Int32Array.from(w.ends),
    station,
    part,
    x,
    y,
    z,
    pivotX,
    pivotY,
    pivotZ,
    outer,
    inner,
    minutes,
    feed,
    limit,
    totalMinutes: total,
  }
}
