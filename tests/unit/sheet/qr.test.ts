import jsqr from 'jsqr'
import { describe, expect, it } from 'vitest'
import { QUIET_ZONE, qrMatrix, qrPath, qrTarget } from '../../../src/features/sheet/qr.ts'
import type { SheetRow } from '../../../src/features/sheet/sheet-model.ts'
import { cssString } from '../../../src/features/sheet/use-running-heads.ts'

const URL_TEXT = 'http://127.0.0.1:4600/setups/7c0a9c66-0d0e-4a35-8f5b-7b8f0f5f6a01/joint/0-3?rev=7'

/** Paints the path's runs, `M x y h n …`, four pixels to a module. */
function paint(path: string, side: number): { data: Uint8ClampedArray; size: number } {
  const size = side * 4
  const data = new Uint8ClampedArray(size * size * 4).fill(255)
  for (const [, x, y, run] of path.matchAll(/M(\d+) (\d+)h(\d+)v1h-\d+z/g)) {
    for (let row = Number(y) * 4; row < Number(y) * 4 + 4; row += 1) {
      for (let column = Number(x) * 4; column < (Number(x) + Number(run)) * 4; column += 1) {
        data.fill(0, (row * size + column) * 4, (row * size + column) * 4 + 3)
      }
    }
  }
  return { data, size }
}

describe('the QR code', () => {
  it('is read back by an independent reader from the path that is drawn', () => {
    const matrix = qrMatrix(URL_TEXT)
    const { data, size } = paint(qrPath(matrix), matrix.size + 2 * QUIET_ZONE)
    // Its CommonJS default sits one level down under NodeNext.
    const read = jsqr as unknown as typeof jsqr.default
    expect(read(data, size, size)?.data).toBe(URL_TEXT)
  })

  it('opens the first joint of the revision, or its bench where there is none', () => {
    const row = (edge: number, joint: SheetRow['joint']) =>
      ({ name: `e${edge + 1}`, loop: 0, edge, joint }) as SheetRow
    const joint = { loop: 0, edge: 1, label: 'J1', rootOpening: 2, mate: 'same' } as const
    expect(qrTarget('abc', 7, [row(0, null), row(1, joint)]).path).toBe('/setups/abc/joint/0-1?rev=7')
    expect(qrTarget('abc', 7, [row(0, null)]).path).toBe('/setups/abc?rev=7')
  })
})

describe('running heads', () => {
  it('are CSS strings that no name can break out of', () => {
    expect(cssString('Plate "A" \\ B\nC')).toBe('"Plate \\22 A\\22  \\5c  B\\a C"')
  })
})
