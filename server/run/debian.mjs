import { execFileSync } from 'node:child_process'
import fs from 'node:fs'
import path from 'node:path'
import { run } from './processes.mjs'
import { say, StartError } from './say.mjs'

const searchPath = [...(process.env.PATH ?? '').split(':'), '/usr/sbin', '/usr/local/sbin', '/sbin']

/** Full path of a command, also where only root looks; null when it is missing. @param {string} command */
export function findCommand(command) {
  for (const folder of searchPath) {
    const file = path.join(folder, command)
    if (folder && fs.existsSync(file)) return file
  }
  return null
}

/** @typedef {{ package: string, isThere: () => boolean }} Need */

/** @type {Record<'mariadb' | 'chromium' | 'ezdxf', Need>} */
export const needs = {
  mariadb: {
    package: 'mariadb-server',
    isThere: () => findCommand('mariadbd') !== null && findCommand('mariadb-install-db') !== null,
  },
  chromium: { package: 'chromium', isThere: () => fs.existsSync('/usr/bin/chromium') },
  ezdxf: {
    package: 'python3-ezdxf',
    isThere: () => {
      try {
        execFileSync('/usr/bin/python3', ['-c', 'import ezdxf'], { stdio: 'ignore' })
        return true
      } catch {
        return false
      }
    },
  },
}

/**
 * Sees to it that Debian packages are there: installs them as root, else says what to install.
 * @param {Need[]} wanted
 * @throws {StartError} when something is missing and may not be installed
 */
export async function ensureDebian(wanted) {
  const missing = wanted.filter((need) => !need.isThere()).map((need) => need.package)
  if (missing.length === 0) return
  const isRoot = process.getuid?.() === 0
  if (!isRoot || !findCommand('apt-get')) {
    throw new StartError(
      `Missing: ${missing.join(', ')}.\nInstall with:  sudo apt-get install --no-install-recommends ${missing.join(' ')}\nthen run the same command again.`,
    )
  }
  say(`installing ${missing.join(', ')} (about a minute)`)
  forbidSystemServers()
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  const apt = ['-qq', '-o', 'DPkg::Lock::Timeout=300', '-o', 'Acquire::Retries=3']
  await run('apt-get', [...apt, 'update'], { env, quiet: true })
  await run('apt-get', [...apt, 'install', '-y', '--no-install-recommends', ...missing], { env, quiet: true })
  const still = wanted.filter((need) => !need.isThere()).map((need) => need.package)
  if (still.length > 0) throw new StartError(`Still missing after installing: ${still.join(', ')}.`)
}

/** Keeps the package from starting a system-wide database; ours is private to the checkout. */
function forbidSystemServers() {
  const policy = '/usr/sbin/policy-rc.d'
  if (!fs.existsSync(policy)) fs.writeFileSync(policy, '#!/bin/sh\nexit 101\n', { mode: 0o755 })
}
