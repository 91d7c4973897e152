import { randomBytes } from 'node:crypto'
import * as z from 'zod'

/** Everything the server is told from outside, validated once at the start. */

const flag = z
  .enum(['0', '1'])
  .default('0')
  .transform((text) => text === '1')

const whole = (min: number, max: number) => z.coerce.number().int().min(min).max(max)

const environmentSchema = z.object({
  PORT: whole(0, 65_535).default(4600),
  HOST: z.string().min(1).default('127.0.0.1'),
  DATABASE_URL: z.string().min(1),
  DATABASE_POOL: whole(1, 200).default(20),
  DEMO: flag,
  SESSION_SECRET: z.string().optional(),
  NODE_ENV: z.enum(['production', 'development', 'test']).default('development'),
  LOG_LEVEL: z.enum(['silent', 'fatal', 'error', 'warn', 'info', 'debug']).default('info'),
  TRUST_PROXY: whole(0, 10).default(0),
  WEB_DIR: z.string().optional(),
  MIN_FREE_DISK_MB: whole(0, 10_000_000).default(200),
  FIRST_ADMIN_EMAIL: z.email().optional(),
  FIRST_ADMIN_PASSWORD: z.string().min(8).max(256).optional(),
})

export interface PasswordCost {
  /** KiB */
  readonly memoryCost: number
  readonly timeCost: number
  readonly parallelism: number
}

/** Figures of the OWASP password storage cheat sheet for argon2id: 19 MiB, two passes, one lane. */
export const PASSWORD_COST: PasswordCost = { memoryCost: 19_456, timeCost: 2, parallelism: 1 }

export interface Config {
  readonly port: number
  readonly host: string
  readonly databaseUrl: string
  readonly databasePool: number
  readonly demo: boolean
  readonly production: boolean
  readonly sessionSecret: string
  readonly logLevel: string
  /** Number of proxies in front whose forwarding headers are believed; 0 believes none. */
  readonly trustProxy: number
  readonly webDir: string | undefined
  readonly minFreeDiskBytes: number
  readonly firstAdmin: { readonly email: string; readonly password: string } | undefined
  readonly passwordCost: PasswordCost
  /** Answers are held against their own schema before they leave; on outside production. */
  readonly checkAnswers: boolean
  /** Evaluations a user may ask for in a second, and in one burst. */
  readonly evaluationRate: { readonly perSecond: number; readonly burst: number }
  /** Longest a drawing may take to read, ms. */
  readonly readDeadline: number
  /** Longest an evaluation may take, ms. */
  readonly evaluateDeadline: number
  /** Requests in work at once; more are turned away. */
  readonly maxInFlight: number
}

export const LIMITS = {
  evaluationRate: { perSecond: 50, burst: 100 },
  readDeadline: 10_000,
  evaluateDeadline: 20_000,
  maxInFlight: 300,
} as const

export class ConfigError extends Error {}

const WEAK_SECRETS = /^(secret|changeme|change-me|default|password|undercant|development)/i
const SECRET_LENGTH = 32

export function readConfig(environment: NodeJS.ProcessEnv): Config {
  const parsed = environmentSchema.safeParse(environment)
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`)
    throw new ConfigError(`The configuration is not usable:\n${lines.join('\n')}`)
  }
  const env = parsed.data
  const production = env.NODE_ENV === 'production'
  return {
    port: env.PORT,
    host: env.HOST,
    databaseUrl: env.DATABASE_URL,
    databasePool: env.DATABASE_POOL,
    demo: env.DEMO,
    production,
    sessionSecret: sessionSecret(env.SESSION_SECRET, production && !env.DEMO),
    logLevel: env.LOG_LEVEL,
    trustProxy: env.TRUST_PROXY,
    webDir: env.WEB_DIR,
    minFreeDiskBytes: env.MIN_FREE_DISK_MB * 1024 * 1024,
    firstAdmin:
      env.FIRST_ADMIN_EMAIL && env.FIRST_ADMIN_PASSWORD
        ? { email: env.FIRST_ADMIN_EMAIL, password: env.FIRST_ADMIN_PASSWORD }
        : undefined,
    passwordCost: PASSWORD_COST,
    checkAnswers: !production,
    ...LIMITS,
  }
}

/** A real installation must bring its own secret; anything else gets a fresh one, and sessions end at a restart. */
function sessionSecret(given: string | undefined, real: boolean): string {
  if (!real) return given ?? randomBytes(32).toString('base64url')
  if (given === undefined || given.length < SECRET_LENGTH || WEAK_SECRETS.test(given)) {
    throw new ConfigError(
      `SESSION_SECRET must be a random text of ${SECRET_LENGTH} characters or more, ` +
        'for example the output of: openssl rand -base64 32',
    )
  }
  return given
}
