import { randomUUID } from 'node:crypto'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import { launchChromium, password, settledPart, sizes, visit, type Visit } from '../support/browser.ts'
import { shareChanged } from '../support/pictures.ts'
import { plateDxf } from '../support/plate.ts'
import { drag } from '../support/touch.ts'

/** The bench in real Chromium: one selection in four places, keys, undo, conflict, draft, and doing without 3D. */

let browser: Browser
beforeAll(async () => {
  browser = await launchChromium()
})
afterAll(async () => {
  await browser.close()
})

/** Thickness of the test plate, mm: 200 × 100 with one hole. */
const THICKNESS = 20
const OFFSET_OF_30 = '+11.55 mm' // 20·tan 30°

interface Saved {
  readonly revision: { number: number; content: { plate: { thickness: number }; walls: unknown[] } }
}

async function open(options: Parameters<typeof visit>[1] = {}): Promise<Visit> {
  return enter(await visit(browser, options))
}

/** In by the API, which is quicker than the form; the form has its own tests. */
async function enter(visited: Visit): Promise<Visit> {
  const answer = await visited.context.request.post('/api/session', {
    data: { email: 'programmer@saltmarsh.example', password },
    headers: { Origin: inject('baseUrl') },
  })
  expect(answer.status()).toBe(200)
  return visited
}

/** Calls the API as the page's own person. */
async function api<T>(page: Page, method: 'GET' | 'POST', path: string, data?: unknown): Promise<T> {
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
async function freshSetup(page: Page): Promise<string> {
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

const rowOf = (page: Page, edge: number) => page.locator(`tr[data-edge="0-${edge}"]`)
const tilt = (page: Page) => page.getByLabel(/^Tilt from vertical/).first()
const button = (page: Page, name: string) => page.getByRole('button', { name, exact: true })
const selectedRows = (page: Page) =>
  page
    .locator('tr[aria-selected=true]')
    .evaluateAll((rows) => rows.map((row) => row.getAttribute('data-edge')))

/** The view's code once the camera has come to rest. */
async function viewOf(page: Page): Promise<string | null> {
  await settledPart(page)
  return page.locator('[data-viewer]').getAttribute('data-view')
}

/** Middle of the part on the page: between the notes and the card. */
async function middle(page: Page): Promise<{ x: number; y: number }> {
  const stage = (await page.getByRole('application').boundingBox())!
  return { x: stage.x + (292 + stage.width - 364) / 2, y: stage.y + stage.height / 2 }
}

async function tiltEdge(page: Page, edge: number, degrees: number): Promise<void> {
  await rowOf(page, edge).click()
  await tilt(page).fill(String(degrees))
}

async function save(page: Page, revision: number): Promise<void> {
  await button(page, 'Save').click()
  await page.getByText(`${revision} · draft`).first().waitFor()
}

describe('the bench', () => {
  it('selects in the picture, turns by drag, and takes keys only with the focus on it', async () => {
    const { context, page, faults } = await open()
    await page.goto(`/setups/${await freshSetup(page)}`)
    await settledPart(page)

    await button(page, 'look from the front').click()
    await settledPart(page)
    const at = await middle(page)
    await page.mouse.click(at.x, at.y)
    await expect.poll(() => selectedRows(page)).toEqual(['0-0'])
    await page.locator('#bench-card-title', { hasText: 'e1' }).waitFor()

    await button(page, 'look from the right').click()
    await settledPart(page)
    await page.keyboard.down('Shift')
    await page.mouse.click(at.x, at.y)
    await expect.poll(() => selectedRows(page)).toEqual(['0-0', '0-1'])
    await page.mouse.click(at.x, at.y)
    await page.keyboard.up('Shift')
    await expect.poll(() => selectedRows(page)).toEqual(['0-0'])

    const canvas = page.locator('[data-frames] canvas')
    const before = await canvas.screenshot()
    await page.mouse.move(at.x, at.y)
    await page.mouse.down()
    await page.mouse.move(at.x + 90, at.y + 60, { steps: 4 })
    await page.mouse.up()
    const turned = await viewOf(page)
    expect(await shareChanged(canvas, before, await canvas.screenshot())).toBeGreaterThan(0.02)
    expect(await selectedRows(page)).toEqual(['0-0'])

    await page.locator('#bench-table-title').click()
    await page.keyboard.press('1')
    expect(await viewOf(page)).toBe(turned)
    await page.getByRole('application').focus()
    await page.keyboard.press('1')
    await expect.poll(() => viewOf(page)).not.toBe(turned)

    await context.close()
    expect(faults).toEqual([])
  })

  it('cures a finding in one step of undo', async () => {
    const { context, page } = await open()
    const { items } = await api<{ items: { id: string; partNumber: string }[] }>(
      page,
      'GET',
      '/api/setups?pageSize=100',
    )
    await page.goto(`/setups/${items.find(({ partNumber }) => partNumber === 'CP-03')!.id}`)
    const stop = page.locator('#bench-notes').getByText(/Corner C3 needs/)
    await stop.waitFor()
    await page.getByRole('button', { name: /\[apply\]/ }).click()
    await stop.waitFor({ state: 'detached' })
    await button(page, 'Undo').click()
    await stop.waitFor()
    expect(await button(page, 'Undo').isDisabled()).toBe(true)
    await button(page, 'Redo').click()
    await stop.waitFor({ state: 'detached' })
    await context.close()
  })

  it('undoes and redoes over a save', async () => {
    const { context, page } = await open()
    await page.goto(`/setups/${await freshSetup(page)}`)
    await tiltEdge(page, 0, 30)
    await rowOf(page, 0).getByText(OFFSET_OF_30).waitFor()
    await save(page, 2)
    expect(await button(page, 'Save').isDisabled()).toBe(true)
    await button(page, 'Undo').click()
    await rowOf(page, 0).getByText('square').waitFor()
    expect(await button(page, 'Save').isEnabled()).toBe(true)
    await button(page, 'Redo').click()
    await rowOf(page, 0).getByText(OFFSET_OF_30).waitFor()
    expect(await button(page, 'Save').isDisabled()).toBe(true)
    await context.close()
  })

  it('shows both sides of a conflict and loses neither', async () => {
    const one = await open()
    const id = await freshSetup(one.page)
    const other = await open()
    await Promise.all([one.page.goto(`/setups/${id}`), other.page.goto(`/setups/${id}`)])
    const dialog = other.page.getByRole('dialog')
    const bothSides = async (theirs: string, mine: string) => {
      await button(other.page, 'Save').click()
      const sections = dialog.locator('section')
      await sections.first().getByText(theirs).first().waitFor()
      await sections.last().getByText(mine).first().waitFor()
    }
    await other.page.locator('tr[data-edge]').first().waitFor()

    await tiltEdge(one.page, 0, 10)
    await save(one.page, 2)
    await tiltEdge(other.page, 1, 20)
    await bothSides('+10°', '+20°')
    await dialog.getByRole('button', { name: 'Take theirs' }).click()
    await rowOf(other.page, 0).getByText('+10°').first().waitFor()
    await rowOf(other.page, 1).getByText('square').waitFor()
    await button(other.page, 'Undo').click()
    await rowOf(other.page, 1).getByText('+20°').first().waitFor()

    await tiltEdge(one.page, 2, 15)
    await save(one.page, 3)
    await bothSides('+15°', '+20°')
    await dialog.getByRole('button', { name: 'Save mine as revision 4' }).click()
    await other.page.getByText('4 · draft').first().waitFor()

    const walls = async (revision: number) => {
      const path = `/api/setups/${id}/revisions/${revision}`
      const { content } = await api<Saved['revision']>(one.page, 'GET', path)
      return (content.walls as { edge: number; facets: { tilt: number }[] }[]).map(({ edge, facets }) => [
        edge,
        facets[0]!.tilt,
      ])
    }
    expect(await walls(3)).toEqual([
      [0, 10],
      [2, 15],
    ])
    expect(await walls(4)).toEqual([[1, 20]])
    await one.context.close()
    await other.context.close()
  })

  it('keeps a draft over a reload', async () => {
    const { context, page } = await open()
    await page.goto(`/setups/${await freshSetup(page)}`)
    await tiltEdge(page, 0, 30)
    await page.getByText(/^draft \d/).waitFor()
    await page.reload()
    await rowOf(page, 0).getByText('square').waitFor()
    await button(page, 'Continue with them').click()
    await rowOf(page, 0).getByText(OFFSET_OF_30).waitFor()
    await context.close()
  })

  it('shows inches without touching a stored number', async () => {
    const { context, page } = await open()
    const id = await freshSetup(page)
    await page.goto(`/setups/${id}`)
    await tiltEdge(page, 0, 30)
    await save(page, 2)
    const read = async () => (await api<Saved>(page, 'GET', `/api/setups/${id}`)).revision
    const stored = await read()
    await page.getByText('inch', { exact: true }).click()
    await rowOf(page, 0).getByText('+0.4546 in').waitFor() // 11.547 mm
    expect(await button(page, 'Save').isDisabled()).toBe(true)
    await page.getByText('mm', { exact: true }).first().click()
    await page.getByText('inch', { exact: true }).click()
    await tiltEdge(page, 1, 10)
    await save(page, 3)
    const after = await read()
    expect(after.content.plate).toEqual(stored.content.plate)
    expect(after.content.walls[0]).toEqual(stored.content.walls[0])
    expect(after.content.plate.thickness).toBe(THICKNESS)
    await context.close()
  })

  it('works without WebGL: the table and the card have every number', async () => {
    const { context, page, faults } = await open()
    await context.addInitScript(() => {
      const real = HTMLCanvasElement.prototype.getContext
      HTMLCanvasElement.prototype.getContext = function (this: HTMLCanvasElement, kind: string, ...rest) {
        return /webgl/.test(kind) ? null : Reflect.apply(real, this, [kind, ...rest])
      } as typeof real
    })
    await page.goto(`/setups/${await freshSetup(page)}`)
    await page.getByText('3D cannot be shown here').waitFor()
    await tiltEdge(page, 0, 30)
    await rowOf(page, 0).getByText(OFFSET_OF_30).waitFor()
    await page.locator('#bench-card').getByText(OFFSET_OF_30).first().waitFor()
    await context.close()
    expect(faults).toEqual([])
  })

  it('draws the same picture again after its graphics were lost', async () => {
    const { context, page } = await open()
    await page.goto(`/setups/${await freshSetup(page)}`)
    await settledPart(page)
    const canvas = page.locator('[data-frames] canvas')
    const before = await canvas.screenshot()
    const graphics = await canvas.evaluateHandle((element: HTMLCanvasElement) =>
      element.getContext('webgl2')!.getExtension('WEBGL_lose_context')!,
    )
    await graphics.evaluate((lose) => lose.loseContext())
    await page.getByText('The 3D picture was interrupted').waitFor()
    await graphics.evaluate((lose) => lose.restoreContext())
    await page.getByText('The 3D picture was interrupted').waitFor({ state: 'detached' })
    await settledPart(page)
    expect(await shareChanged(canvas, before, await canvas.screenshot())).toBeLessThan(0.001)
    await context.close()
  })

  it('zooms and moves by two fingers and turns by one', async () => {
    const { context, page } = await open({ viewport: sizes.tablet, hasTouch: true })
    await page.goto(`/setups/${await freshSetup(page)}`)
    await settledPart(page)
    await button(page, 'fit all').click()
    const fitted = await viewOf(page)
    const stage = (await page.getByRole('application').boundingBox())!
    const [x, y] = [stage.x + stage.width / 2, stage.y + stage.height / 2]
    const touch = await context.newCDPSession(page)

    await drag(touch, [[x, y]], [[x + 80, y]])
    await expect.poll(() => viewOf(page)).not.toBe(fitted)
    const turned = await viewOf(page)
    const scale = page.locator('[data-viewer] [aria-hidden=true] > div.border-x')
    const bar = await scale.evaluate((element) => element.parentElement!.textContent)
    await drag(
      touch,
      [
        [x - 40, y],
        [x + 40, y],
      ],
      [
        [x - 200, y],
        [x + 200, y],
      ],
    )
    await expect.poll(() => viewOf(page)).not.toBe(turned)
    expect(await scale.evaluate((element) => element.parentElement!.textContent)).not.toBe(bar)
    await context.close()
  })
})
