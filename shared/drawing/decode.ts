import { DrawingError } from './errors.ts'
import { MAX_BYTES } from './limits.ts'

/** First bytes of packed files, and what people call them. */
const PACKED: readonly (readonly [name: string, magic: readonly number[]])[] = [
  ['gzip', [0x1f, 0x8b]],
  ['zip', [0x50, 0x4b, 0x03, 0x04]],
  ['zip', [0x50, 0x4b, 0x05, 0x06]],
  ['bzip2', [0x42, 0x5a, 0x68]],
  ['xz', [0xfd, 0x37, 0x7a, 0x58, 0x5a]],
  ['7z', [0x37, 0x7a, 0xbc, 0xaf]],
  ['zstd', [0x28, 0xb5, 0x2f, 0xfd]],
  ['rar', [0x52, 0x61, 0x72, 0x21]],
]

/** How DXF names its code pages ($DWGCODEPAGE, in lower case) and how the platform's decoder does. */
const CODE_PAGES: Readonly<Record<string, string>> = {
  ansi_874: 'windows-874',
  ansi_932: 'shift_jis',
  ansi_936: 'gbk',
  ansi_949: 'euc-kr',
  ansi_950: 'big5',
}

/**
 * The text of a drawing. UTF-8 where the bytes are UTF-8, else the code page that the header names, else
 * Windows-1252. Judged by content, never by name.
 *
 * @throws DrawingError drawing-empty, drawing-too-large, drawing-compressed, drawing-binary, drawing-not-dxf
 */
export function decodeDrawing(bytes: Uint8Array): string {
  if (bytes.length === 0)
    throw new DrawingError('drawing-empty', 'The file is empty. Export the drawing again.')
  if (bytes.length > MAX_BYTES) {
    throw new DrawingError(
      'drawing-too-large',
      `The file is larger than ${MAX_BYTES / 1024 / 1024} MB. Export only the part as DXF.`,
    )
  }
  const packed = PACKED.find(([, magic]) => magic.every((byte, i) => bytes[i] === byte))
  if (packed) {
    throw new DrawingError(
      'drawing-compressed',
      `This is a ${packed[0]} file. Unpack it and choose the DXF inside.`,
    )
  }
  refuseBinary(bytes)
  const text = decodeText(bytes)
  if (text.trim() === '') {
    throw new DrawingError('drawing-empty', 'The file holds no text. Export the drawing again.')
  }
  return text
}

function refuseBinary(bytes: Uint8Array): void {
  const start = ascii(bytes.subarray(0, 32))
  if (/^AC(10\d\d|1\.\d|2\.\d)/.test(start)) {
    throw new DrawingError('drawing-binary', 'This is a DWG file. Save the drawing as DXF in text form.')
  }
  if (start.startsWith('AutoCAD Binary DXF')) {
    throw new DrawingError(
      'drawing-binary',
      'This is a binary DXF file. Save the drawing as DXF in text form.',
    )
  }
  if (start.startsWith('%PDF')) {
    throw new DrawingError('drawing-not-dxf', 'This is a PDF file. Export the drawing as DXF.')
  }
  if (bytes.includes(0)) {
    throw new DrawingError(
      'drawing-binary',
      'The file holds bytes that no text file has. Save the drawing as DXF in text form (8-bit text).',
    )
  }
}

function decodeText(bytes: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes)
  } catch {
    return new TextDecoder(codePage(bytes)).decode(bytes)
  }
}

/** Only names of layers and blocks depend on it. The header comes early: 64 kB are searched. */
function codePage(bytes: Uint8Array): string {
  const head = ascii(bytes.subarray(0, 65_536))
  const name = /\$DWGCODEPAGE\s+3\s+(\S+)/.exec(head)?.[1]?.toLowerCase() ?? ''
  const windows = /^ansi_(125[0-8])$/.exec(name)?.[1]
  if (windows) return `windows-${windows}`
  return CODE_PAGES[name] ?? 'windows-1252'
}

function ascii(bytes: Uint8Array): string {
  return new TextDecoder('windows-1252').decode(bytes)
}
