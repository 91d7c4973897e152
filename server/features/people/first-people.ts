import { randomUUID } from 'node:crypto'
import { In } from 'typeorm'
import { ConfigError } from '../../config.ts'
import { User } from '../../db/entities/user.ts'
import { writeOnce } from '../../http/act.ts'
import type { Services } from '../../services.ts'
import { appendToRecord } from '../record/audit.ts'
import { type DemoAccount, demoAccounts } from './demo-accounts.ts'

/** A real installation does not start with accounts whose password anyone can read. */
export async function refuseDemoAccounts({ dataSource }: Services): Promise<void> {
  const emails = demoAccounts.map((account) => account.email)
  const found = await dataSource.manager.countBy(User, { email: In(emails), disabled: false })
  if (found > 0) {
    throw new ConfigError(
      'This database holds demo accounts. Use an empty database, or start with DEMO=1 and disable them first.',
    )
  }
}

/** On an empty installation someone has to be the first; told by the environment, changed afterwards. */
export async function createFirstAdmin(services: Services): Promise<void> {
  if ((await services.dataSource.manager.count(User)) > 0) return
  const { firstAdmin } = services.config
  if (!firstAdmin) {
    services.log.warn('nobody can sign in yet: start once with FIRST_ADMIN_EMAIL and FIRST_ADMIN_PASSWORD')
    return
  }
  await addPerson(
    services,
    { email: firstAdmin.email, name: 'Administrator', role: 'administrator' },
    firstAdmin.password,
  )
}

/** Adds a person on the system's own account; returns the id. */
export async function addPerson(services: Services, person: DemoAccount, password: string): Promise<string> {
  const { name, role } = person
  const email = person.email.toLowerCase()
  const passwordHash = await services.passwords.hash(password)
  return writeOnce(services, null, null, async (manager) => {
    const id = randomUUID()
    const row = { id, email, name, role, passwordHash, disabled: false, epoch: 1, version: 1 }
    await manager.insert(User, { ...row, createdAt: new Date() })
    const subject = { kind: 'user', id, label: email }
    await appendToRecord(manager, null, { action: 'user.create', subject, details: { name, role } })
    return id
  })
}
