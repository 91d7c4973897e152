import { fileURLToPath } from 'node:url'
import path from 'node:path'

/** The checkout. */
export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..')

/** Everything that a run leaves behind; never committed. */
export const dataDir = path.join(root, '.data')
