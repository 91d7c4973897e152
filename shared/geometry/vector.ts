import type { Point } from './types.ts'

/** Plane vectors. Points and vectors share one shape; angles are radians, counter-clockwise. */

export function add(a: Point, b: Point): Point {
  return { x: a.x + b.x, y: a.y + b.y }
}

export function subtract(a: Point, b: Point): Point {
  return { x: a.x - b.x, y: a.y - b.y }
}

export function scale(a: Point, factor: number): Point {
  return { x: a.x * factor, y: a.y * factor }
}

/** a + factor·b. */
export function addScaled(a: Point, b: Point, factor: number): Point {
  return { x: a.x + factor * b.x, y: a.y + factor * b.y }
}

export function dot(a: Point, b: Point): number {
  return a.x * b.x + a.y * b.y
}

/** z of the cross product: positive when b lies to the left of a. */
export function cross(a: Point, b: Point): number {
  return a.x * b.y - a.y * b.x
}

export function norm(a: Point): number {
  return Math.hypot(a.x, a.y)
}

export function distance(a: Point, b: Point): number {
  return Math.hypot(b.x - a.x, b.y - a.y)
}

/** Unit vector along a; the zero vector has no direction and is returned as it is. */
export function unit(a: Point): Point {
  const length = norm(a)
  return length === 0 ? a : { x: a.x / length, y: a.y / length }
}

/** A quarter turn counter-clockwise. */
export function leftOf(a: Point): Point {
  return { x: -a.y, y: a.x }
}

export function middle(a: Point, b: Point): Point {
  return { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 }
}

/** Signed turn from direction a to direction b, in (−π, π]. */
export function turnBetween(a: Point, b: Point): number {
  return Math.atan2(cross(a, b), dot(a, b))
}
