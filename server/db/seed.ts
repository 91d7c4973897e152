import { In } from 'typeorm'
import type { CurrentUser } from '../../shared/api/people.ts'
import type { Part as PartAnswer } from '../../shared/api/parts.ts'
import type { Setup as SetupAnswer } from '../../shared/api/setups.ts'
import { type DemoHead, demoHeads, type DemoPart, demoParts, type DemoSetup } from '../demo/index.ts'
import { DEMO_PASSWORD, demoAccounts } from '../features/people/demo-accounts.ts'
import { addPerson } from '../features/people/first-people.ts'
import { appendToRecord } from '../features/record/audit.ts'
import { presentPart } from '../features/parts/present.ts'
import { presentSetup } from '../features/setups/present.ts'
import { writeOnce } from '../http/act.ts'
import { perform } from '../http/perform.ts'
import type { Services } from '../services.ts'
import { AuditEntry } from './entities/audit.ts'
import { Head } from './entities/head.ts'
import { Part } from './entities/part.ts'
import { Setup } from './entities/setup.ts'
import { User } from './entities/user.ts'

const DONE = 'demo.seed'

/**
 * Fills a demo installation through the same code as the pages use: drawings are read, set-ups saved,
 * submitted and approved. Once it is whole it is never touched again; a start that was broken off goes on.
 */
export async function seedDemo(services: Services): Promise<void> {
  const { manager } = services.dataSource
  if (await manager.existsBy(AuditEntry, { action: DONE })) return
  const people = await seedAccounts(services)
  for (const head of demoHeads) await seedHead(services, people, head)
  for (const part of demoParts) await seedPart(services, people, part)
  const subject = { kind: 'demo', id: 'demo', label: 'Demo' }
  await writeOnce(services, null, null, (inside) => appendToRecord(inside, null, { action: DONE, subject }))
}

interface People {
  readonly programmer: CurrentUser
  readonly engineer: CurrentUser
}

async function seedAccounts(services: Services): Promise<People> {
  const { manager } = services.dataSource
  const where = { email: In(demoAccounts.map((account) => account.email)) }
  const existing = await manager.findBy(User, where)
  for (const account of demoAccounts) {
    if (!existing.some((user) => user.email === account.email))
      await addPerson(services, account, DEMO_PASSWORD)
  }
  const users = await manager.findBy(User, where)
  const byRole = (role: CurrentUser['role']): CurrentUser => {
    const user = users.find((each) => each.role === role)
    if (!user) throw new Error(`The demo has no ${role}`)
    return { id: user.id, email: user.email, name: user.name, role: user.role }
  }
  return { programmer: byRole('programmer'), engineer: byRole('engineer') }
}

async function seedHead(services: Services, { engineer }: People, demo: DemoHead): Promise<void> {
  const { name, kind, mechanicalLimit, jet, workingLimit, reason } = demo
  if (await services.dataSource.manager.existsBy(Head, { name })) return
  const head = await perform(services, engineer, 'createHead', { body: { name, kind, mechanicalLimit, jet } })
  await perform(services, engineer, 'setWorkingLimit', {
    params: { id: head.id },
    version: head.version,
    body: { workingLimit, reason },
  })
}

async function seedPart(services: Services, people: People, demo: DemoPart): Promise<void> {
  const { manager } = services.dataSource
  const existing = await manager.findOneBy(Part, { number: demo.number })
  const part = existing ? await presentPart(manager, existing.id) : await importPart(services, people, demo)
  for (const setup of demo.setups) await seedSetup(services, people, part, setup)
}

async function importPart(services: Services, { programmer }: People, demo: DemoPart): Promise<PartAnswer> {
  const file = { name: demo.fileName, bytes: Buffer.from(demo.dxf, 'utf8') }
  const { drawing } = await perform(services, programmer, 'uploadDrawing', { file })
  const { number, name, pick } = demo
  const body = { drawingId: drawing.id, reading: {}, pick, number, name }
  return perform(services, programmer, 'createPart', { body })
}

async function seedSetup(
  services: Services,
  { programmer, engineer }: People,
  part: PartAnswer,
  demo: DemoSetup,
): Promise<void> {
  const { manager } = services.dataSource
  const { name, plate, jet, datum, note } = demo
  const existing = await manager.findOneBy(Setup, { partId: part.id, name })
  if (existing && existing.revision > 1) return
  const { id: headId } = await manager.findOneByOrFail(Head, { name: demo.headName })
  const created: SetupAnswer = existing
    ? await presentSetup(manager, existing.id)
    : await perform(services, programmer, 'createSetup', { body: { partId: part.id, headId, name, plate } })
  const params = { id: created.id }
  const walls = demo.walls(part.loops)
  const joints = demo.joints(part.loops)
  const saved = await perform(services, programmer, 'saveSetup', {
    params,
    version: created.version,
    body: { name, headId, plate, jet, datum, walls, joints, note },
  })
  if (demo.state === 'draft') return
  const { hash } = saved.revision
  const submitted = await perform(services, programmer, 'submitSetup', {
    params,
    version: saved.version,
    body: { hash },
  })
  if (demo.state === 'submitted') return
  await perform(services, engineer, 'approveSetup', {
    params,
    version: submitted.version,
    body: { hash, password: DEMO_PASSWORD },
  })
}
