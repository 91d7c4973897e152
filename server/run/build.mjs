import { createHash } from 'node:crypto'
import fs from 'node:fs'
import path from 'node:path'
import { root } from './paths.mjs'
import { run } from './processes.mjs'
import { say } from './say.mjs'

const dist = path.join(root, 'dist')
const stamp = path.join(dist, 'built-from')
const sources = ['src', 'server', 'shared', 'public']
const files = [
  'index.html',
  'package-lock.json',
  'tailwind.config.ts',
  'tsconfig.json',
  'tsconfig.server.json',
  'vite.config.ts',
]

/** Builds server and pages into `dist/` when a source differs from what was built. */
export async function ensureBuild() {
  const wanted = fingerprint()
  if (fs.existsSync(stamp) && fs.readFileSync(stamp, 'utf8') === wanted) return
  fs.rmSync(dist, { recursive: true, force: true })
  const bin = path.join(root, 'node_modules')
  say('building the server')
  await run(process.execPath, [path.join(bin, 'typescript/bin/tsc'), '-p', 'tsconfig.server.json'], {
    cwd: root,
    quiet: true,
  })
  say('building the pages')
  await run(process.execPath, [path.join(bin, 'vite/bin/vite.js'), 'build', '--logLevel', 'warn'], {
    cwd: root,
    // Whoever calls may run as 'test' or 'development'; what is built is always what is shipped.
    env: { ...process.env, NODE_ENV: 'production' },
    quiet: true,
  })
  fs.writeFileSync(stamp, wanted)
}

function fingerprint() {
  const hash = createHash('sha256')
  const walk = (/** @type {string} */ entry) => {
    const full = path.join(root, entry)
    if (!fs.existsSync(full)) return
    if (fs.statSync(full).isDirectory()) {
      for (const name of fs.readdirSync(full).sort()) walk(path.join(entry, name))
    } else {
      hash.update(entry).update('\0').update(fs.readFileSync(full)).update('\0')
    }
  }
  for (const entry of [...sources, ...files]) walk(entry)
  return hash.digest('hex')
}
