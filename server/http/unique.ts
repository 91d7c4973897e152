import { isDuplicate } from '../db/failures.ts'
import { Refusal } from './refusal.ts'

/** Runs an insert or update; a unique name that exists already becomes a refusal. */
export async function nameFree<T>(what: string, work: Promise<T>): Promise<T> {
  try {
    return await work
  } catch (error) {
    if (isDuplicate(error)) throw new Refusal('name-taken', `${what} exists already. Choose another.`)
    throw error
  }
}
