import QRCode from 'qrcode'
import { edgeKey } from '../../../shared/walls/names.ts'
import type { SheetRow } from './sheet-model.ts'

/** What the code opens: the first joint of this revision, or its bench where there is none. */
export function qrTarget(
  setupId: string,
  revision: number,
  rows: readonly SheetRow[],
): { readonly path: string; readonly label: string } {
  const first = rows.find(({ joint }) => joint !== null)
  return first
    ? {
        path: `/setups/${setupId}/joint/${edgeKey(first)}?rev=${revision}`,
        label: `Opens joint ${first.name}, revision ${revision}`,
      }
    : { path: `/setups/${setupId}?rev=${revision}`, label: `Opens the bench at revision ${revision}` }
}

/** Light modules that readers need round the code. */
export const QUIET_ZONE = 4

export interface QrMatrix {
  /** Modules on a side. */
  readonly size: number
  readonly dark: (row: number, column: number) => boolean
}

/** The code's modules; error correction M stands a smudge of 15 %. */
export function qrMatrix(text: string): QrMatrix {
  const { modules } = QRCode.create(text, { errorCorrectionLevel: 'M' })
  return { size: modules.size, dark: (row, column) => modules.get(row, column) !== 0 }
}

/** SVG path of the dark modules, one unit each, quiet zone included: runs along each row. */
export function qrPath({ size, dark }: QrMatrix): string {
  const runs: string[] = []
  for (let row = 0; row < size; row += 1) {
    for (let column = 0; column < size; column += 1) {
      if (!dark(row, column)) continue
      const start = column
      while (column + 1 < size && dark(row, column + 1)) column += 1
      const length = column - start + 1
      runs.push(`M${start + QUIET_ZONE} ${row + QUIET_ZONE}h${length}v1h-${length}z`)
    }
  }
  return runs.join('')
}
