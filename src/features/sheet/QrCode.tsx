import { useMemo } from 'react'
import { QUIET_ZONE, qrMatrix, qrPath } from './qr.ts'

interface QrCodeProps {
  readonly text: string
  /** CSS length of a side. */
  readonly size: string
  readonly label: string
}

/** A QR code as vectors, made here. */
export function QrCode({ text, size, label }: QrCodeProps) {
  const { path, side } = useMemo(() => {
    const matrix = qrMatrix(text)
    return { path: qrPath(matrix), side: matrix.size + 2 * QUIET_ZONE }
  }, [text])
  return (
    <svg
      role="img"
      aria-label={`QR code. ${label}`}
      viewBox={`0 0 ${side} ${side}`}
      style={{ width: size, height: size }}
      shapeRendering="crispEdges"
    >
      <path d={path} className="fill-black" />
    </svg>
  )
}
