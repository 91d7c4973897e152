import { existsSync } from 'node:fs'
import { readFile } from 'node:fs/promises'
import path from 'node:path'
import { promisify } from 'node:util'
import zlib from 'node:zlib'
import express, { type Express, type Request, type Response } from 'express'

const brotli = promisify(zlib.brotliCompress)
const gzip = promisify(zlib.gzip)

const TEXT = new Map([
  ['.html', 'text/html; charset=utf-8'],
  ['.js', 'text/javascript; charset=utf-8'],
  ['.css', 'text/css; charset=utf-8'],
  ['.svg', 'image/svg+xml'],
])
/** File names in here carry a hash of their content. */
const HASHED = '/assets/'
const A_YEAR = 'public, max-age=31536000, immutable'
const BROTLI_QUALITY = 8

/** The pages: hashed files for ever, everything else asked about again, every unknown path the shell. */
export function serveWeb(app: Express, folder: string): void {
  const packed = new PackedFiles(folder)
  app.get('/{*path}', async (req, res, next) => {
    const wanted = path.posix.normalize(req.path)
    const type = TEXT.get(path.posix.extname(wanted))
    if (!type || !(await packed.send(req, res, wanted, type))) next()
  })
  app.use(
    express.static(folder, {
      index: false,
      setHeaders: (res, file) => res.setHeader('Cache-Control', cacheFor(file.split(path.sep).join('/'))),
    }),
  )
  app.get('/{*path}', async (req, res, next) => {
    if (path.posix.extname(req.path) !== '' || !req.accepts('html')) next()
    else if (!(await packed.send(req, res, '/index.html', 'text/html; charset=utf-8'))) next()
  })
}

function cacheFor(file: string): string {
  return file.includes(HASHED) ? A_YEAR : 'no-cache'
}

interface Packed {
  readonly plain: Buffer
  readonly br: Buffer
  readonly gzip: Buffer
}

/** Text files of the build, read and compressed once each. */
class PackedFiles {
  readonly #folder: string
  readonly #files = new Map<string, Promise<Packed>>()

  constructor(folder: string) {
    this.#folder = path.resolve(folder)
  }

  async send(req: Request, res: Response, name: string, type: string): Promise<boolean> {
    const file = path.join(this.#folder, name)
    if (!file.startsWith(this.#folder + path.sep) || !existsSync(file)) return false
    const packed = await this.#load(file)
    const encoding = req.acceptsEncodings('br', 'gzip')
    const bytes = encoding === 'br' ? packed.br : encoding === 'gzip' ? packed.gzip : packed.plain
    if (encoding) res.setHeader('Content-Encoding', encoding)
    res.setHeader('Vary', 'Accept-Encoding')
    res.setHeader('Cache-Control', cacheFor(name))
    res.setHeader('Content-Type', type)
    res.send(bytes)
    return true
  }

  #load(file: string): Promise<Packed> {
    const known = this.#files.get(file)
    if (known) return known
    const loading = pack(file)
    this.#files.set(file, loading)
    loading.catch(() => this.#files.delete(file))
    return loading
  }
}

async function pack(file: string): Promise<Packed> {
  const plain = await readFile(file)
  const params = { [zlib.constants.BROTLI_PARAM_QUALITY]: BROTLI_QUALITY }
  return { plain, br: await brotli(plain, { params }), gzip: await gzip(plain) }
}
