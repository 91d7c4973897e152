import type { RequestHandler } from 'express'
import { Refusal } from './refusal.ts'

const READING = new Set(['GET', 'HEAD', 'OPTIONS'])

/**
 * Writes are taken from our own pages only: browsers say where a request comes from in Sec-Fetch-Site, older
 * ones in Origin. A program that sends neither carries no one's cookie by accident.
 */
export const sameSiteWrites: RequestHandler = (req, _res, next) => {
  if (
    !READING.has(req.method) &&
    !fromOurPages(req.get('sec-fetch-site'), req.get('origin'), req.get('host'))
  ) {
    throw new Refusal('cross-site', 'This request came from another site. Open the page here and try again.')
  }
  next()
}

function fromOurPages(
  site: string | undefined,
  origin: string | undefined,
  host: string | undefined,
): boolean {
  if (site !== undefined) return site === 'same-origin'
  if (origin === undefined) return true
  return URL.canParse(origin) && new URL(origin).host === host
}
