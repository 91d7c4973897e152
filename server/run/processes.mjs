import { spawn } from 'node:child_process'
import { StartError } from './say.mjs'

/**
 * Runs a command to its end. Output is shown, or kept and shown only when it fails.
 * @param {string} command
 * @param {string[]} args
 * @param {{ cwd?: string, env?: NodeJS.ProcessEnv, quiet?: boolean }} [options]
 * @returns {Promise<void>}
 */
export function run(command, args, { cwd, env, quiet = false } = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, {
      cwd,
      env: env ?? process.env,
      stdio: ['ignore', quiet ? 'pipe' : 'inherit', quiet ? 'pipe' : 'inherit'],
    })
    let output = ''
    child.stdout?.on('data', (chunk) => (output += chunk))
    child.stderr?.on('data', (chunk) => (output += chunk))
    child.on('error', (error) => reject(new StartError(`${command} could not be run: ${error.message}`)))
    child.on('close', (code, signal) => {
      if (code === 0) return resolve()
      const tail = output.split('\n').slice(-30).join('\n')
      reject(new StartError(`${command} ${args.join(' ')} ended with ${signal ?? code}\n${tail}`))
    })
  })
}

/** @param {number} pid */
export function isAlive(pid) {
  try {
    process.kill(pid, 0)
    return true
  } catch (error) {
    return /** @type {NodeJS.ErrnoException} */ (error).code === 'EPERM'
  }
}

/**
 * Waits until a process is gone.
 * @param {number} pid
 * @param {number} timeoutMs
 * @returns {Promise<boolean>} false when it is still there
 */
export async function waitUntilGone(pid, timeoutMs) {
  const end = Date.now() + timeoutMs
  while (isAlive(pid)) {
    if (Date.now() > end) return false
    await new Promise((resolve) => setTimeout(resolve, 50))
  }
  return true
}
