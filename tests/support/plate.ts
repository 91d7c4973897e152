/** A plate as the smallest sound DXF: an outline of four lines and one round hole, millimetres. */
export function plateDxf({ width = 200, height = 100, hole = 30 } = {}): string {
  const corners = [
    [0, 0],
    [width, 0],
    [width, height],
    [0, height],
  ] as const
  const lines = corners.map(([x, y], i) => {
    const [x2, y2] = corners[(i + 1) % corners.length] ?? [0, 0]
    return ['0', 'LINE', '8', 'CUT', '10', x, '20', y, '30', '0', '11', x2, '21', y2, '31', '0'].join('\n')
  })
  const circle = [
    '0',
    'CIRCLE',
    '8',
    'CUT',
    '10',
    width / 2,
    '20',
    height / 2,
    '30',
    '0',
    '40',
    hole / 2,
  ].join('\n')
  const header = ['0', 'SECTION', '2', 'HEADER', '9', '$INSUNITS', '70', '4', '0', 'ENDSEC'].join('\n')
  const start = ['0', 'SECTION', '2', 'ENTITIES'].join('\n')
  return [header, start, ...lines, circle, '0', 'ENDSEC', '0', 'EOF', ''].join('\n')
}
