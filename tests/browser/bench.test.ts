import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { launchChromium, settledPart, sizes, visit, type Visit } from '../support/browser.ts'
import { shareChanged } from '../support/pictures.ts'
import { drag } from '../support/touch.ts'
import {
  THICKNESS,
  OFFSET_OF_30,
  rowOf,
  button,
  selectedRows,
  enter,
  api,
  freshSetup,
  viewOf,
  middle,
  tiltEdge,
  save,
  type Saved,
} from '../support/bench-page.ts'

/** The bench in real Chromium: one selection in four places, keys, undo, conflict, draft, and doing without 3D. */

let browser: Browser
beforeAll(async () => {
  browser = await launchChromium()
})
afterAll(async () => {
  await browser.close()
})

async function open(options: Parameters<typeof visit>[1] = {}): Promise<Visit> {
  return enter(await visit(browser, options))
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
