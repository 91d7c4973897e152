import { hash, verify } from '@node-rs/argon2'
import type { PasswordCost } from '../../config.ts'
import { Refusal } from '../../http/refusal.ts'
import { commonPasswords } from './common-passwords.ts'

/** The library's number for argon2id; its enum does not survive compiling file by file. */
const ARGON2ID = 2

/** Hashing and checking of passwords: argon2id, and the same time whether a person exists or not. */
export class Passwords {
  readonly #options
  readonly #decoy: Promise<string>

  constructor(cost: PasswordCost) {
    this.#options = { algorithm: ARGON2ID, ...cost }
    this.#decoy = hash('no one has this password', this.#options)
  }

  async hash(password: string): Promise<string> {
    return hash(password, this.#options)
  }

  async matches(stored: string, password: string): Promise<boolean> {
    return verify(stored, password)
  }

  /** Takes as long as a check of a real account. */
  async pretend(password: string): Promise<void> {
    await verify(await this.#decoy, password)
  }

  /** Whether a stored hash was made with other parameters than today's. */
  isOutdated(stored: string): boolean {
    const { memoryCost, timeCost, parallelism } = this.#options
    return !stored.startsWith(`$argon2id$v=19$m=${memoryCost},t=${timeCost},p=${parallelism}$`)
  }
}

/** Refuses what guessers try first; length is the schema's matter. Passwords are taken as typed. */
export function refuseGuessable(
  password: string,
  person: { readonly email: string; readonly name: string },
): void {
  const plain = password.toLowerCase()
  const own = [person.email, person.email.split('@')[0], person.name].map((text) => text?.toLowerCase())
  if (commonPasswords.has(plain) || own.includes(plain) || new Set(plain).size < 3) {
    throw new Refusal(
      'invalid-request',
      'This password is easily guessed. Choose another, of three or more words.',
      {
        details: { field: 'password' },
      },
    )
  }
}
