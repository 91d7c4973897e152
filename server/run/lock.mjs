import fs from 'node:fs'
import path from 'node:path'
import { dataDir } from './paths.mjs'
import { isAlive } from './processes.mjs'
import { StartError } from './say.mjs'

const file = path.join(dataDir, 'running.json')

/** One start per checkout; a lock left by a killed start is taken over. */
export function takeLock() {
  fs.mkdirSync(dataDir, { recursive: true })
  const holder = readHolder()
  if (holder) {
    throw new StartError(
      `Undercant already runs from this folder (process ${holder.pid}). Stop it first: kill ${holder.pid}`,
    )
  }
  fs.writeFileSync(file, JSON.stringify({ pid: process.pid }))
}

export function releaseLock() {
  fs.rmSync(file, { force: true })
}

/** @returns {{ pid: number } | null} the live holder */
function readHolder() {
  try {
    const holder = JSON.parse(fs.readFileSync(file, 'utf8'))
    if (holder.pid === process.pid || !isAlive(holder.pid)) return null
    const command = fs.readFileSync(`/proc/${holder.pid}/cmdline`, 'utf8')
    return command.includes('server/run/') ? holder : null
  } catch {
    return null
  }
}
