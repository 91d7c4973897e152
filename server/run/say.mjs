const started = Date.now()

/** One line of progress with the seconds since the start. @param {string} text */
export function say(text) {
  const seconds = ((Date.now() - started) / 1000).toFixed(1).padStart(5)
  process.stdout.write(`[${seconds} s] ${text}\n`)
}

/** A failure that a person can act on: printed without a stack. */
export class StartError extends Error {}
