/**
 * Drawings for tests, written by hand: an inch drawing with a bulge, loose lines and an arc that must be
 * joined, and holes that come from a block inserted twice, once scaled.
 *
 * The outline is a 6 × 4 in plate with one corner rounded by a bulge (radius 1 in) and one by an ARC of 0.5 in.
 */
const pairs = (...values: (string | number)[]) => values.map(String).join('\n')

function section(name: string, body: string): string {
  return pairs(0, 'SECTION', 2, name) + '\n' + (body ? body + '\n' : '') + pairs(0, 'ENDSEC')
}

/** tan(90°/4): the bulge of a quarter circle. */
const QUARTER = Math.tan(Math.PI / 8)

export function inchPlateDxf(): string {
  const header = pairs(9, '$ACADVER', 1, 'AC1015', 9, '$INSUNITS', 70, 1)
  const block = [
    pairs(0, 'BLOCK', 8, '0', 2, 'BOLT', 70, 0, 10, 0, 20, 0, 30, 0, 3, 'BOLT'),
    pairs(0, 'CIRCLE', 8, '0', 10, 0, 20, 0, 30, 0, 40, 0.25),
    pairs(0, 'ENDBLK', 8, '0'),
  ].join('\n')
  const entities = [
    // bottom, right, and the top edge up to the arc, as one open polyline with a bulge at the lower right
    pairs(0, 'LWPOLYLINE', 8, 'CUT', 90, 5, 70, 0),
    pairs(10, 0, 20, 0),
    pairs(10, 5, 20, 0, 42, QUARTER),
    pairs(10, 6, 20, 1),
    pairs(10, 6, 20, 4),
    pairs(10, 0.5, 20, 4),
    // the upper left corner, an ARC from 90° to 180°
    pairs(0, 'ARC', 8, 'CUT', 10, 0.5, 20, 3.5, 30, 0, 40, 0.5, 50, 90, 51, 180),
    // and the left edge, drawn the other way round
    pairs(0, 'LINE', 8, 'CUT', 10, 0, 20, 0, 30, 0, 11, 0, 21, 3.5, 31, 0),
    pairs(0, 'INSERT', 8, 'CUT', 2, 'BOLT', 10, 1.5, 20, 1.5, 30, 0),
    pairs(0, 'INSERT', 8, 'CUT', 2, 'BOLT', 10, 4, 20, 2.5, 30, 0, 41, 2, 42, 2, 43, 1),
  ].join('\n')
  return (
    [
      section('HEADER', header),
      section('BLOCKS', block),
      section('ENTITIES', entities),
      pairs(0, 'EOF'),
    ].join('\n') + '\n'
  )
}
