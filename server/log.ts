import { pino, type Logger } from 'pino'

export type { Logger }

/** One line of JSON per event on standard output; secrets never reach it (see `request-log.ts`). */
export function createLog(level: string): Logger {
  return pino({
    level,
    base: undefined,
    timestamp: pino.stdTimeFunctions.isoTime,
    formatters: { level: (label) => ({ level: label }) },
    redact: {
      paths: [
        'password',
        '*.password',
        'cookie',
        '*.cookie',
        '*.authorization',
        'sessionSecret',
        'databaseUrl',
      ],
      censor: '[left out]',
    },
  })
}
