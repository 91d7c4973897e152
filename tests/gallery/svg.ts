import type { Point } from '../../shared/geometry/types.ts'

/** Pieces of SVG as text. A figure that is not finite throws: a picture shows nothing rather than something wrong. */

/** Coordinates in thousandths of a page unit: finer than any screen. */
const DIGITS = 3

export function figure(value: number, digits = DIGITS): string {
  if (!Number.isFinite(value)) throw new RangeError('a figure in a picture that is not finite')
  return String(Number(value.toFixed(digits)))
}

export type Attributes = Readonly<Record<string, string | number | undefined>>

export function element(name: string, attributes: Attributes, content?: string): string {
  const own = Object.entries(attributes).flatMap(([key, value]) =>
    value === undefined ? [] : [` ${key}="${typeof value === 'number' ? figure(value, 9) : escaped(value)}"`],
  )
  return content === undefined ? `<${name}${own.join('')}/>` : `<${name}${own.join('')}>${content}</${name}>`
}

export function group(name: string, content: readonly string[]): string {
  return content.length === 0 ? '' : element('g', { class: name }, content.join('\n'))
}

export function points(list: readonly Point[]): string {
  return list.map(({ x, y }) => `${figure(x)},${figure(y)}`).join(' ')
}

export function line(from: Point, to: Point, attributes: Attributes): string {
  const at = { x1: figure(from.x), y1: figure(from.y), x2: figure(to.x), y2: figure(to.y) }
  return element('line', { ...at, ...attributes })
}

export function circle(at: Point, radius: number, attributes: Attributes): string {
  return element('circle', { cx: figure(at.x), cy: figure(at.y), r: figure(radius), ...attributes })
}

export function text(at: Point, content: string, attributes: Attributes = {}): string {
  return element('text', { x: figure(at.x), y: figure(at.y), ...attributes }, escaped(content))
}

function escaped(value: string): string {
  return value.replace(/[&<>"]/g, (sign) => `&#${sign.charCodeAt(0)};`)
}
