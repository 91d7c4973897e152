import { createHash } from 'node:crypto'
import fs from 'node:fs'
import path from 'node:path'
import { root } from './paths.mjs'
import { run } from './processes.mjs'
import { say } from './say.mjs'

const stamp = path.join(root, 'node_modules', '.undercant-installed')

/** Installs the npm packages when the lock file is not the one that was installed last. */
export async function ensurePackages() {
  const wanted = createHash('sha256')
    .update(fs.readFileSync(path.join(root, 'package-lock.json')))
    .digest('hex')
  if (fs.existsSync(stamp) && fs.readFileSync(stamp, 'utf8') === wanted) return
  say('installing npm packages (about a minute the first time)')
  await run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'], { cwd: root })
  fs.writeFileSync(stamp, wanted)
}
