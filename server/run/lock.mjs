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

/** Gives the lock back; one that another start holds is left alone. */
export function releaseLock() {
  if (readPid() === process.pid) fs.rmSync(file, { force: true })
}

/** @returns {number | null} */
function readPid() {
  try {
    return JSON.parse(fs.readFileSync(file, 'utf8')).pid
  } catch {
    return null
  }
}

/** @returns {{ pid: number } | null} the live holder */
function readHolder() {
  const pid = readPid()
  if (pid === null || pid === process.pid || !isAlive(pid)) return null
  try {
    const command = fs.readFileSync(`/proc/${pid}/cmdline`, 'utf8')
    return command.includes('server/run/') ? { pid } : null
  } catch {
    return null
  }
}
