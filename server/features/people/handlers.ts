import { randomUUID } from 'node:crypto'
import type { EntityManager } from 'typeorm'
import type { User as UserAnswer } from '../../../shared/api/people.ts'
import { User } from '../../db/entities/user.ts'
import type { HandlersOf } from '../../http/call.ts'
import { claimVersion } from '../../http/claim.ts'
import { containing, pageAsked } from '../../http/paging.ts'
import { notFound, Refusal } from '../../http/refusal.ts'
import { nameFree } from '../../http/unique.ts'
import { appendToRecord } from '../record/audit.ts'
import { refuseGuessable } from './passwords.ts'

export const peopleHandlers: HandlersOf<'listUsers' | 'createUser' | 'updateUser'> = {
  listUsers: async ({ services, query }) => {
    const { page, pageSize, skip } = pageAsked(query)
    const people = services.dataSource.createQueryBuilder(User, 'u').orderBy('u.name').addOrderBy('u.id')
    if (query.role) people.andWhere('u.role = :role', { role: query.role })
    if (query.q) people.andWhere('(u.name LIKE :q OR u.email LIKE :q)', { q: containing(query.q) })
    const [users, total] = await people.skip(skip).take(pageSize).getManyAndCount()
    return { items: users.map(presentUser), total, page, pageSize }
  },

  createUser: async ({ services, user, body, write }) => {
    const email = body.email.toLowerCase()
    refuseGuessable(body.password, body)
    const passwordHash = await services.passwords.hash(body.password)
    return write(async (manager) => {
      const id = randomUUID()
      const { name, role } = body
      const row = { id, email, name, role, passwordHash, disabled: false, epoch: 1, version: 1 }
      await nameFree(`An account for ${email}`, manager.insert(User, { ...row, createdAt: new Date() }))
      const subject = { kind: 'user', id, label: email }
      await appendToRecord(manager, user, { action: 'user.create', subject, details: { name, role } })
      return findUser(manager, id)
    })
  },

  updateUser: async ({ services, user, params, body, version, write }) => {
    const { id } = params
    if (id === user.id && (body.disabled === true || (body.role !== undefined && body.role !== user.role))) {
      throw new Refusal(
        'forbidden',
        'You cannot disable yourself or change your own role. Ask another administrator.',
      )
    }
    if (body.password !== undefined)
      refuseGuessable(body.password, await findUser(services.dataSource.manager, id))
    const passwordHash =
      body.password === undefined ? undefined : await services.passwords.hash(body.password)
    return write(async (manager) => {
      await claimVersion(manager, User, { id, version }, () => findUser(manager, id))
      const { name, role, disabled } = body
      const endsSessions = role !== undefined || disabled !== undefined || passwordHash !== undefined
      const changes = {
        ...(name === undefined ? {} : { name }),
        ...(role === undefined ? {} : { role }),
        ...(disabled === undefined ? {} : { disabled }),
      }
      await manager
        .createQueryBuilder()
        .update(User)
        .set({
          ...changes,
          ...(passwordHash === undefined ? {} : { passwordHash }),
          epoch: () => (endsSessions ? 'epoch + 1' : 'epoch'),
        })
        .where('id = :id', { id })
        .execute()
      const after = await findUser(manager, id)
      await appendToRecord(manager, user, {
        action: 'user.update',
        subject: { kind: 'user', id, label: after.email },
        details: { ...changes, passwordChanged: passwordHash !== undefined },
      })
      return after
    })
  },
}

async function findUser(manager: EntityManager, id: string): Promise<UserAnswer> {
  const user = await manager.findOneBy(User, { id })
  if (!user) throw notFound('This person')
  return presentUser(user)
}

function presentUser({ id, email, name, role, disabled, version, createdAt }: User): UserAnswer {
  return { id, email, name, role, disabled, version, createdAt: createdAt.toISOString() }
}
