import { randomUUID } from 'node:crypto'
import type { Page } from 'playwright-core'
import { expect, inject } from 'vitest'
import { password, settledPart, type Visit } from './browser.ts'
import { plateDxf } from './plate.ts'

/** What a person does on the bench, for the browser tests: a plain plate, its edges, its numbers. */

/** Thickness of the test plate, mm: 200 × 100 with one hole. */
export const THICKNESS = 20
export const OFFSET_OF_30 = '+11.55 mm' // 20·tan 30°

export interface Saved {
  readonly revision: { number: number; content: { plate: { thickness: number }; walls: unknown[] } }
}

/** In by the API, which is quicker than the form; the form has its own tests. */
export async function enter(visited: Visit): Promise<Visit> {
  const answer = await visited.context.request.post('/api/session', {
    data: { email: 'programmer@saltmarsh.example', password },
    headers: { Origin: inject('baseUrl') },
  })
  expect(answer.status()).toBe(200)
  return visited
}

/** Calls the API as the page's own person. */
export async function api<T>(page: Page, method: 'GET' | 'POST', path: string, data?: unknown): Promise<T> {
  const headers = { Origin: inject('baseUrl'), 'Idempotency-Key': randomUUID() }
  const multipart =
    typeof data === 'string'
      ? { file: { name: 'plate.dxf', mimeType: 'application/dxf', buffer: Buffer.from(data) } }
      : undefined
  const body = multipart ? { multipart } : data === undefined ? {} : { data }
  const answer = await page.context().request.fetch(path, { method, headers, ...body })
  if (!answer.ok()) throw new Error(`${method} ${path}: ${await answer.text()}`)
  return (await answer.json()) as T
}

/** A set-up of a plain plate, with every edge square. */
export async function freshSetup(page: Page): Promise<string> {
  const { drawing } = await api<{ drawing: { id: string } }>(page, 'POST', '/api/drawings', plateDxf())
  const part = await api<{ id: string }>(page, 'POST', '/api/parts', {
    drawingId: drawing.id,
    reading: { joinTolerance: 0.01, recogniseArcs: true, arcTolerance: 0.01 },
    pick: 0,
    number: `B-${randomUUID().slice(0, 8)}`,
    name: 'Plain plate',
  })
  const heads = await api<{ items: { id: string; name: string }[] }>(page, 'GET', '/api/heads?pageSize=50')
  const setup = await api<{ id: string }>(page, 'POST', '/api/setups', {
    partId: part.id,
    headId: heads.items.find(({ name }) => name === 'North gantry')!.id,
    name: 'Bench test',
    plate: { material: 'S355', thickness: THICKNESS },
  })
  return setup.id
}

export const rowOf = (page: Page, edge: number) => page.locator(`tr[data-edge="0-${edge}"]`)
export const tilt = (page: Page) => page.getByLabel(/^Tilt from vertical/).first()
export const button = (page: Page, name: string) => page.getByRole('button', { name, exact: true })
export const selectedRows = (page: Page) =>
  page
    .locator('tr[aria-selected=true]')
    .evaluateAll((rows) => rows.map((row) => row.getAttribute('data-edge')))

/** The view's code once the camera has come to rest. */
export async function viewOf(page: Page): Promise<string | null> {
  await settledPart(page)
  return page.locator('[data-viewer]').getAttribute('data-view')
}

/** Middle of the part on the page: between the notes and the card. */
export async function middle(page: Page): Promise<{ x: number; y: number }> {
  const stage = (await page.getByRole('application').boundingBox())!
  return { x: stage.x + (292 + stage.width - 364) / 2, y: stage.y + stage.height / 2 }
}

export async function tiltEdge(page: Page, edge: number, degrees: number): Promise<void> {
  await rowOf(page, edge).click()
  await tilt(page).fill(String(degrees))
}

export async function save(page: Page, revision: number): Promise<void> {
  await button(page, 'Save').click()
  await page.getByText(`${revision} · draft`).first().waitFor()
}
