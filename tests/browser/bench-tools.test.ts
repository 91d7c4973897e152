import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { launchChromium, settledPart, visit, type Visit } from '../support/browser.ts'
import {
  THICKNESS,
  OFFSET_OF_30,
  rowOf,
  button,
  selectedRows,
  enter,
  api,
  freshSetup,
  tiltEdge,
  save,
} from '../support/bench-page.ts'

/** Tools of the bench in real Chromium: drafts on the server, acts by name, the part cut open. */

let browser: Browser
beforeAll(async () => {
  browser = await launchChromium()
})
afterAll(async () => {
  await browser.close()
})

async function open(): Promise<Visit> {
  return enter(await visit(browser))
}

describe('tools of the bench', () => {
  it('gives a draft back in another browser, from the server', async () => {
    const one = await open()
    const id = await freshSetup(one.page)
    await one.page.goto(`/setups/${id}`)
    const kept = one.page.waitForResponse((answer) => answer.request().method() === 'PUT' && answer.ok())
    await tiltEdge(one.page, 0, 30)
    await kept
    await one.context.close()

    const { context, page } = await open()
    await page.goto(`/setups/${id}`)
    await page.getByText('on the server').waitFor()
    await button(page, 'Continue with them').click()
    await rowOf(page, 0).getByText(OFFSET_OF_30).waitFor()
    await save(page, 2)
    const draft = async () => (await api<{ draft: unknown }>(page, 'GET', `/api/setups/${id}/draft`)).draft
    await expect.poll(draft).toBeNull()
    await context.close()
  })

  it('finds an act by its name', async () => {
    const { context, page } = await open()
    await page.goto(`/setups/${await freshSetup(page)}`)
    await settledPart(page)
    await page.keyboard.press('Control+k')
    await page.getByRole('combobox', { name: /Name of an act/ }).fill('e3')
    await page.keyboard.press('Enter')
    await expect.poll(() => selectedRows(page)).toEqual(['0-2'])
    await page.keyboard.press('Control+k')
    await page.keyboard.type('parall')
    await page.keyboard.press('Enter')
    await expect.poll(() => selectedRows(page)).toEqual(['0-0', '0-2'])
    await context.close()
  })

  it('cuts the part open where a number says, and tells the area', async () => {
    const { context, page } = await open()
    await page.goto(`/setups/${await freshSetup(page)}`)
    await settledPart(page)
    await page.getByRole('application').focus()
    await page.keyboard.press('z')
    const bar = page.getByRole('group', { name: 'Place of the cut' })
    await bar.getByLabel(/^Cut at Z .*mm/).fill(String(-THICKNESS / 2))
    // A square plate has one area at every depth: its outline less the hole, whose circle is drawn by chords.
    const area = parseFloat((await bar.getByText('mm²').textContent())!)
    expect(Math.abs(area - (200 * 100 - Math.PI * 15 ** 2))).toBeLessThan(10)
    await bar.getByRole('button', { name: 'Whole part' }).click()
    await bar.waitFor({ state: 'detached' })
    await context.close()
  })
})
