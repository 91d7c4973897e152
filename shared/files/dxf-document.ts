import type { Bounds } from '../geometry/types.ts'
import { handles, plainLine, real, tagsText, type Tag } from './dxf-tags.ts'

/**
 * The least R2000 (AC1015) drawing that readers take without mending: header, tables, the two standard blocks,
 * closed polylines on named layers, and a root dictionary. Millimetres.
 */

export interface DxfPolyline {
  readonly layer: string
  readonly vertices: readonly { readonly x: number; readonly y: number; readonly bulge?: number }[]
}

export interface DxfLayer {
  readonly name: string
  /** Colour number of the format's index, 1 to 255. */
  readonly colour: number
}

export interface DxfDrawing {
  /** Lines that readers skip, at the head of the file. */
  readonly comments: readonly string[]
  readonly layers: readonly DxfLayer[]
  readonly polylines: readonly DxfPolyline[]
  readonly bounds: Bounds
}

const MILLIMETRES = 4

export function dxfText({ comments, layers, polylines, bounds }: DxfDrawing): string {
  const ids = handles()
  const modelRecord = ids.next()
  const paperRecord = ids.next()
  const sections = [
    tables(ids.next, layers, modelRecord, paperRecord),
    section('BLOCKS', [
      ...block(ids.next, '*Model_Space', modelRecord, false),
      ...block(ids.next, '*Paper_Space', paperRecord, true),
    ]),
    section(
      'ENTITIES',
      polylines.flatMap((polyline) => polylineTags(ids.next(), modelRecord, polyline)),
    ),
    objects(ids.next),
  ]
  return tagsText([
    ...comments.map((comment): Tag => [999, plainLine(comment)]),
    ...header(ids.peek(), bounds),
    ...section('CLASSES', []),
    ...sections.flat(),
    [0, 'EOF'],
  ])
}

function section(name: string, tags: readonly Tag[]): Tag[] {
  return [[0, 'SECTION'], [2, name], ...tags, [0, 'ENDSEC']]
}

function header(handSeed: string, { minX, minY, maxX, maxY }: Bounds): Tag[] {
  const point = (name: string, x: number, y: number): Tag[] => [
    [9, name],
    [10, real(x)],
    [20, real(y)],
    [30, '0.0'],
  ]
  return section('HEADER', [
    [9, '$ACADVER'],
    [1, 'AC1015'],
    [9, '$DWGCODEPAGE'],
    [3, 'ANSI_1252'],
    [9, '$HANDSEED'],
    [5, handSeed],
    [9, '$INSUNITS'],
    [70, MILLIMETRES],
    [9, '$MEASUREMENT'],
    [70, 1],
    ...point('$EXTMIN', minX, minY),
    ...point('$EXTMAX', maxX, maxY),
  ])
}

function tables(
  next: () => string,
  layers: readonly DxfLayer[],
  modelRecord: string,
  paperRecord: string,
): Tag[] {
  const table = (name: string, entries: (owner: string) => Tag[][], extra: Tag[] = []): Tag[] => {
    const owner = next()
    const made = entries(owner)
    return [
      [0, 'TABLE'],
      [2, name],
      [5, owner],
      [330, '0'],
      [100, 'AcDbSymbolTable'],
      [70, made.length],
      ...extra,
      ...made.flat(),
      [0, 'ENDTAB'],
    ]
  }
  const entry = (
    kind: string,
    owner: string,
    subclass: string,
    name: string,
    tags: Tag[],
    code = 5,
  ): Tag[] => [
    [0, kind],
    [code, next()],
    [330, owner],
    [100, 'AcDbSymbolTableRecord'],
    [100, subclass],
    [2, name],
    ...tags,
  ]
  const lineType = (owner: string, name: string, description: string) =>
    entry('LTYPE', owner, 'AcDbLinetypeTableRecord', name, [
      [70, 0],
      [3, description],
      [72, 65],
      [73, 0],
      [40, '0.0'],
    ])
  const layer = (owner: string, { name, colour }: DxfLayer) =>
    entry('LAYER', owner, 'AcDbLayerTableRecord', name, [
      [70, 0],
      [62, colour],
      [6, 'Continuous'],
    ])
  const record = (owner: string, handle: string, name: string): Tag[] => [
    [0, 'BLOCK_RECORD'],
    [5, handle],
    [330, owner],
    [100, 'AcDbSymbolTableRecord'],
    [100, 'AcDbBlockTableRecord'],
    [2, name],
    [340, '0'],
  ]
  return section('TABLES', [
    ...table('VPORT', () => []),
    ...table('LTYPE', (owner) => [
      lineType(owner, 'ByBlock', ''),
      lineType(owner, 'ByLayer', ''),
      lineType(owner, 'Continuous', 'Solid line'),
    ]),
    ...table('LAYER', (owner) => [{ name: '0', colour: 7 }, ...layers].map((own) => layer(owner, own))),
    ...table('STYLE', (owner) => [
      entry('STYLE', owner, 'AcDbTextStyleTableRecord', 'Standard', [
        [70, 0],
        [40, '0.0'],
        [41, '1.0'],
        [50, '0.0'],
        [71, 0],
        [42, '2.5'],
        [3, 'txt'],
        [4, ''],
      ]),
    ]),
    ...table('VIEW', () => []),
    ...table('UCS', () => []),
    ...table('APPID', (owner) => [entry('APPID', owner, 'AcDbRegAppTableRecord', 'ACAD', [[70, 0]])]),
    ...table(
      'DIMSTYLE',
      (owner) => [entry('DIMSTYLE', owner, 'AcDbDimStyleTableRecord', 'Standard', [[70, 0]], 105)],
      [[100, 'AcDbDimStyleTable']],
    ),
    ...table('BLOCK_RECORD', (owner) => [
      record(owner, modelRecord, '*Model_Space'),
      record(owner, paperRecord, '*Paper_Space'),
    ]),
  ])
}

function block(next: () => string, name: string, record: string, paper: boolean): Tag[] {
  const space: Tag[] = paper ? [[67, 1]] : []
  return [
    [0, 'BLOCK'],
    [5, next()],
    [330, record],
    [100, 'AcDbEntity'],
    ...space,
    [8, '0'],
    [100, 'AcDbBlockBegin'],
    [2, name],
    [70, 0],
    [10, '0.0'],
    [20, '0.0'],
    [30, '0.0'],
    [3, name],
    [1, ''],
    [0, 'ENDBLK'],
    [5, next()],
    [330, record],
    [100, 'AcDbEntity'],
    ...space,
    [8, '0'],
    [100, 'AcDbBlockEnd'],
  ]
}

const CLOSED = 1

function polylineTags(handle: string, owner: string, { layer, vertices }: DxfPolyline): Tag[] {
  return [
    [0, 'LWPOLYLINE'],
    [5, handle],
    [330, owner],
    [100, 'AcDbEntity'],
    [8, layer],
    [100, 'AcDbPolyline'],
    [90, vertices.length],
    [70, CLOSED],
    [43, '0.0'],
    ...vertices.flatMap(({ x, y, bulge }): Tag[] => [
      [10, real(x)],
      [20, real(y)],
      ...(bulge ? [[42, real(bulge)] as Tag] : []),
    ]),
  ]
}

function objects(next: () => string): Tag[] {
  const [root, group] = [next(), next()]
  return section('OBJECTS', [
    [0, 'DICTIONARY'],
    [5, root],
    [330, '0'],
    [100, 'AcDbDictionary'],
    [281, 1],
    [3, 'ACAD_GROUP'],
    [350, group],
    [0, 'DICTIONARY'],
    [5, group],
    [330, root],
    [100, 'AcDbDictionary'],
    [281, 1],
  ])
}
