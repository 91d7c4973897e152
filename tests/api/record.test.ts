import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { AuditEntry } from '../../shared/api/record.ts'
import type { Head } from '../../shared/api/heads.ts'
import { appendToRecord, entryHash, firstBrokenEntry } from '../../server/features/record/audit.ts'
import { AuditEntry as Entry } from '../../server/db/entities/audit.ts'
import { type Agent, expectStatus, ifMatch, makeHead, startApp, type TestApp } from '../support/app.ts'

let app: TestApp
let engineer: Agent
let head: Head
beforeAll(async () => {
  app = await startApp('record')
  engineer = await app.as('engineer')
  head = await makeHead(app)
})
afterAll(() => app.close())

type Entries = { items: AuditEntry[]; total: number }
const list = (query: object = {}) => expectStatus<Entries>(200, engineer.get('/api/audit').query(query))
const subject = { kind: 'test', id: 'x', label: 'x' }

describe('the record', () => {
  it('names who did what to which, newest first', async () => {
    const [entry] = (await list({ subjectId: head.id })).items
    expect(entry).toMatchObject({
      action: 'head.create',
      actor: { id: app.ids.engineer, name: 'Test Engineer' },
      subject: { kind: 'head', id: head.id, label: head.name },
      details: { mechanicalLimit: 60 },
    })
  })

  it('is filtered by action, subject and text, in pages', async () => {
    const limit = { workingLimit: 40, reason: 'coupons of last week' }
    await expectStatus(
      200,
      engineer.put(`/api/heads/${head.id}/working-limit`).set(ifMatch(head)).send(limit),
    )
    const limits = await list({ action: 'head.working-limit' })
    expect(limits.items.map(({ details }) => details)).toEqual([{ from: null, to: 40, reason: limit.reason }])
    expect((await list({ q: head.name })).total).toBe(2)
    expect((await list({ subjectId: head.id, pageSize: 1, page: 2 })).items).toHaveLength(1)
  })

  it('says nothing of what was refused, and keeps no password', async () => {
    const before = (await list()).total
    const admin = await app.as('administrator')
    const signIns = 1
    const body = { name: head.name, kind: 'turning', mechanicalLimit: 50, jet: head.jet }
    const taken = await engineer.post('/api/heads').send(body)
    expect([taken.status, taken.body.error.code]).toEqual([409, 'name-taken'])
    expect((await list()).total).toBe(before + signIns)
    const password = 'herring-gull-at-noon'
    const person = { email: 'new@test.example', name: 'New', role: 'welder', password }
    await expectStatus(201, admin.post('/api/users').send(person))
    const rows = await app.services.dataSource.query('SELECT details FROM audit_entries')
    expect(JSON.stringify(rows)).not.toContain(password)
    expect(JSON.stringify(rows)).not.toContain('argon2')
  })

  it('is written in the same transaction as the change: both or neither', async () => {
    const { dataSource } = app.services
    const entries = dataSource.getRepository(Entry)
    const before = await entries.count()
    await expect(
      dataSource.transaction(async (manager) => {
        await appendToRecord(manager, null, { action: 'test', subject })
        throw new Error('undone')
      }),
    ).rejects.toThrow('undone')
    expect(await entries.count()).toBe(before)
    expect(await firstBrokenEntry(dataSource.manager)).toBeNull()
  })

  it('takes entries from many at once in one unbroken chain', async () => {
    const { dataSource } = app.services
    await Promise.all(
      Array.from({ length: 20 }, (_, i) =>
        dataSource.transaction((manager) => appendToRecord(manager, null, { action: `test.${i}`, subject })),
      ),
    )
    expect(await firstBrokenEntry(dataSource.manager)).toBeNull()
    const { items } = await list({ pageSize: 30 })
    for (const [i, entry] of items.slice(0, -1).entries()) expect(entry.previousHash).toBe(items[i + 1]?.hash)
  })

  it('can only grow: the database refuses changes, and a forged entry is found', async () => {
    const { dataSource } = app.services
    await expect(dataSource.query("UPDATE audit_entries SET action = 'x' WHERE id = 1")).rejects.toThrow(
      /once/,
    )
    await expect(dataSource.query('DELETE FROM audit_entries WHERE id = 1')).rejects.toThrow(/once/)
    // Even someone who takes the triggers away leaves a trace.
    const other = await startApp('forged')
    try {
      const forged = other.services.dataSource
      await forged.query('DROP TRIGGER audit_entries_no_update')
      await forged.query("UPDATE audit_entries SET subject_label = 'someone else' WHERE id = 3")
      expect(await firstBrokenEntry(forged.manager)).toBe(3)
      const entry = await forged.getRepository(Entry).findOneByOrFail({ id: 3 })
      await forged.query('UPDATE audit_entries SET hash = ? WHERE id = 3', [entryHash(entry)])
      expect(await firstBrokenEntry(forged.manager)).toBe(4)
    } finally {
      await other.close()
    }
  })
})
