/** Small DXF files, written group by group: the demo's drawings, and what tests read. */

export type Group = readonly [code: number, value: string | number]

export interface DxfParts {
  /** $INSUNITS: 1 inch, 4 millimetre. */
  readonly units?: number
  readonly layers?: readonly string[]
  readonly blocks?: readonly string[]
  readonly entities: readonly string[]
}

export function groups(...pairs: readonly Group[]): string {
  return pairs.map(([code, value]) => `${code}\n${value}\n`).join('')
}

export function dxfText({ units, layers = [], blocks = [], entities }: DxfParts): string {
  const header =
    units === undefined
      ? ''
      : groups([0, 'SECTION'], [2, 'HEADER'], [9, '$INSUNITS'], [70, units], [0, 'ENDSEC'])
  const definitions =
    blocks.length === 0 ? '' : groups([0, 'SECTION'], [2, 'BLOCKS']) + blocks.join('') + groups([0, 'ENDSEC'])
  const tables =
    layers.length === 0
      ? ''
      : groups(
          [0, 'SECTION'],
          [2, 'TABLES'],
          [0, 'TABLE'],
          [2, 'LAYER'],
          [70, layers.length],
          ...layers.flatMap((name): Group[] => [
            [0, 'LAYER'],
            [2, name],
            [70, 0],
            [62, 7],
            [6, 'CONTINUOUS'],
          ]),
          [0, 'ENDTAB'],
          [0, 'ENDSEC'],
        )
  return (
    header +
    tables +
    definitions +
    groups([0, 'SECTION'], [2, 'ENTITIES']) +
    entities.join('') +
    groups([0, 'ENDSEC'], [0, 'EOF'])
  )
}

export function dxfBytes(parts: DxfParts | string): Uint8Array {
  return new TextEncoder().encode(typeof parts === 'string' ? parts : dxfText(parts))
}

export function line(x1: number, y1: number, x2: number, y2: number, layer = '0'): string {
  return groups([0, 'LINE'], [8, layer], [10, x1], [20, y1], [11, x2], [21, y2])
}

export function arc(x: number, y: number, radius: number, start: number, end: number, layer = '0'): string {
  return groups([0, 'ARC'], [8, layer], [10, x], [20, y], [40, radius], [50, start], [51, end])
}

export function circle(x: number, y: number, radius: number, layer = '0'): string {
  return groups([0, 'CIRCLE'], [8, layer], [10, x], [20, y], [40, radius])
}

/** A closed polyline; each corner may carry the bulge of the edge that starts there. */
export function polyline(corners: readonly (readonly [number, number, number?])[], layer = '0'): string {
  return groups(
    [0, 'LWPOLYLINE'],
    [8, layer],
    [90, corners.length],
    [70, 1],
    ...corners.flatMap(([x, y, bulge]): Group[] => [
      [10, x],
      [20, y],
      ...(bulge === undefined ? [] : [[42, bulge] as const]),
    ]),
  )
}

/** The same as POLYLINE, VERTEX, SEQEND. */
export function oldPolyline(corners: readonly (readonly [number, number, number?])[], flags = 1): string {
  return (
    groups([0, 'POLYLINE'], [8, '0'], [66, 1], [70, flags], [10, 0], [20, 0], [30, 0]) +
    corners
      .map(([x, y, bulge]) => groups([0, 'VERTEX'], [8, '0'], [10, x], [20, y], [42, bulge ?? 0]))
      .join('') +
    groups([0, 'SEQEND'])
  )
}

export function square(x: number, y: number, side: number, layer = '0'): string {
  return polyline(
    [
      [x, y],
      [x + side, y],
      [x + side, y + side],
      [x, y + side],
    ],
    layer,
  )
}

export function block(
  name: string,
  entities: readonly string[],
  base: readonly [number, number] = [0, 0],
): string {
  return (
    groups([0, 'BLOCK'], [8, '0'], [2, name], [70, 0], [10, base[0]], [20, base[1]]) +
    entities.join('') +
    groups([0, 'ENDBLK'], [8, '0'])
  )
}

export function text(x: number, y: number, height: number, words: string, layer = '0'): string {
  return groups([0, 'TEXT'], [8, layer], [10, x], [20, y], [40, height], [1, words])
}

export function insert(name: string, x: number, y: number, ...more: readonly Group[]): string {
  return groups([0, 'INSERT'], [8, '0'], [2, name], [10, x], [20, y], ...more)
}
