import type { Response } from 'express'

/** A file to take away. */
export interface Download {
  readonly fileName: string
  readonly bytes: Uint8Array
}

const NAME_LENGTH = 120

/** A file name that no system trips over: no paths, controls, quotes; at most 120 characters. */
export function safeFileName(name: string, fallback: string): string {
  const base = name.split(/[/\\]/).at(-1) ?? ''
  const clean = base
    .replace(/\p{Surrogate}/gu, '_')
    // eslint-disable-next-line no-control-regex -- control characters are exactly what is taken out
    .replace(/[\u0000-\u001f\u007f-\u009f"'<>:|?*;%]/g, '_')
    .replace(/^[.\s]+|[.\s]+$/g, '')
  if (clean === '') return fallback
  const dot = clean.lastIndexOf('.')
  const extension = dot > 0 && clean.length - dot <= 10 ? clean.slice(dot) : ''
  const stem = extension ? clean.slice(0, dot) : clean
  return [...stem].slice(0, NAME_LENGTH - extension.length).join('') + extension
}

/** Always an attachment with a fixed type (RFC 6266: a plain name, and the full one in UTF-8). */
export function sendDownload(res: Response, mediaType: string, { fileName, bytes }: Download): void {
  const plain = fileName.replace(/[^\x20-\x7e]/g, '_')
  const full = encodeURIComponent(fileName).replace(/['()*]/g, (c) => `%${c.charCodeAt(0).toString(16)}`)
  res.setHeader('Content-Type', mediaType.startsWith('text/') ? `${mediaType}; charset=utf-8` : mediaType)
  res.setHeader('Content-Disposition', `attachment; filename="${plain}"; filename*=UTF-8''${full}`)
  res.setHeader('Content-Length', String(bytes.byteLength))
  res.end(bytes)
}
