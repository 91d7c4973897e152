import { In, type EntityManager } from 'typeorm'
import type { Person } from '../../../shared/api/common.ts'
import { User } from '../../db/entities/user.ts'

/** Names of people by their ids. */
export class Persons {
  readonly #byId: ReadonlyMap<string, Person>

  private constructor(people: readonly Person[]) {
    this.#byId = new Map(people.map((person) => [person.id, person]))
  }

  static async load(manager: EntityManager, ids: readonly (string | null)[]): Promise<Persons> {
    const wanted = [...new Set(ids.filter((id) => id !== null))]
    const select = { id: true, name: true } as const
    const users = wanted.length > 0 ? await manager.find(User, { select, where: { id: In(wanted) } }) : []
    return new Persons(users.map(({ id, name }) => ({ id, name })))
  }

  /** Rows refer to people by foreign keys, so a missing one is a bug. */
  of(id: string): Person {
    const person = this.#byId.get(id)
    if (!person) throw new Error(`No person ${id}`)
    return person
  }
}
