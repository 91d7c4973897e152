import { In } from 'typeorm'
import { addPerson } from '../features/people/first-people.ts'
import { DEMO_PASSWORD, demoAccounts } from '../features/people/demo-accounts.ts'
import type { Services } from '../services.ts'
import { User } from './entities/user.ts'

/** Fills a demo installation through the same code as the pages use. What is there already is left alone. */
export async function seedDemo(services: Services): Promise<void> {
  await seedAccounts(services)
}

async function seedAccounts(services: Services): Promise<void> {
  const emails = demoAccounts.map((account) => account.email)
  const existing = await services.dataSource.manager.findBy(User, { email: In(emails) })
  for (const account of demoAccounts) {
    if (!existing.some((user) => user.email === account.email))
      await addPerson(services, account, DEMO_PASSWORD)
  }
}
