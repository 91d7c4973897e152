import type { Browser, Locator, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { keyboard, mouse, type Actor } from '../support/actors.ts'
import { launchChromium, password, settledPart, sizes, visit, type DemoPerson } from '../support/browser.ts'
import { inchPlateDxf } from '../support/drawings.ts'
import { shareChanged } from '../support/pictures.ts'

/**
 * The main job, end to end, once with a mouse and once with the keyboard alone: drawing in, report, set-up,
 * tilts, save, reload, submit, approve, joint at phone size. The plate is 20 mm thick, so the bottom edges
 * must land at 20·tan 30° = 11.55 mm and (20 − 4)·tan 45° = 16 mm.
 */

let browser: Browser
beforeAll(async () => {
  browser = await launchChromium()
})
afterAll(async () => {
  await browser.close()
})

async function signInAs(page: Page, actor: Actor, who: DemoPerson): Promise<void> {
  await page.goto('/sign-in')
  await actor.fill(page.getByLabel('Email'), `${who}@saltmarsh.example`)
  await actor.fill(page.getByLabel('Password'), password)
  await actor.press(page.getByRole('button', { name: 'Sign in', exact: true }))
  await page.waitForURL((url) => url.pathname !== '/sign-in')
}

/** The row of the edge whose top length reads so. */
async function edgeOfLength(page: Page, text: string): Promise<Locator> {
  const rows = page.getByRole('grid', { name: 'Edges' }).locator('[data-edge]')
  const found = rows.filter({ has: page.getByRole('gridcell', { name: text, exact: true }) }).first()
  await found.waitFor()
  return rows.and(page.locator(`[data-edge="${await found.getAttribute('data-edge')}"]`))
}

describe.each([
  ['with a mouse', mouse],
  ['by keyboard alone', keyboard],
] as const)('the main job %s', (name, actorOf) => {
  const number = `IN-${name.length}`

  it('goes from a drawing to the welder', async () => {
    const { context, page, faults } = await visit(browser)
    const actor = actorOf(page)
    await signInAs(page, actor, 'programmer')

    // drawing in
    await page.goto('/parts/new')
    const chooser = page.waitForEvent('filechooser')
    await actor.press(page.getByRole('button', { name: 'Choose a file' }))
    await (
      await chooser
    ).setFiles({ name: 'inch-plate.dxf', mimeType: 'application/dxf', buffer: Buffer.from(inchPlateDxf()) })

    // report: 6 × 4 in, two holes, the block told of
    await page.getByText('152.4 × 101.6 mm').first().waitFor()
    await page
      .getByText(/2 holes/)
      .first()
      .waitFor()
    expect(await page.getByText(/block/i).count()).toBeGreaterThan(0)
    await actor.fill(page.getByLabel('Part number'), number)
    await actor.press(page.getByRole('button', { name: 'Make the part' }))

    // set-up
    const dialog = page.getByRole('dialog')
    await actor.fill(dialog.getByLabel('Plate material'), 'S355')
    await actor.fill(dialog.getByLabel('Plate thickness'), '20')
    await actor.pick(dialog.getByLabel('Head'), 'North gantry')
    await actor.press(dialog.getByRole('button', { name: 'Start the set-up' }))
    await page.waitForURL(/\/setups\/[0-9a-f-]{36}/)
    await settledPart(page)
    const canvas = page.locator('[data-frames] canvas').first()
    const square = await canvas.screenshot()
    expect(await shareChanged(canvas, square, await canvas.screenshot())).toBe(0)

    // 30° on the bottom edge (5 in)
    const first = await edgeOfLength(page, '127 mm')
    await actor.row(first)
    await actor.fill(page.getByLabel(/^Tilt from vertical/), '30')
    await first.getByText('+11.55 mm').waitFor()
    await settledPart(page)
    expect(await shareChanged(canvas, square, await canvas.screenshot())).toBeGreaterThan(0.005)

    // 45° with a 4 mm root face on the right edge (3 in)
    const second = await edgeOfLength(page, '76.2 mm')
    await actor.row(second)
    await actor.choose(page.getByRole('radio', { name: 'open to the top' }))
    await actor.fill(page.getByLabel(/^Tilt from vertical/).first(), '45')
    await actor.fill(page.getByLabel(/^Root face/), '4')
    await second.getByText('+16 mm').waitFor()

    // the joint that the welder will open
    await actor.press(page.getByRole('button', { name: 'Add a joint' }))
    await actor.fill(page.getByLabel('Joint number on the drawing'), 'J-12')
    await actor.fill(page.getByLabel(/^Root opening \(/), '2')

    // save, reload, the same
    await actor.press(page.getByRole('button', { name: 'Save', exact: true }))
    await page.getByText('2 · draft').first().waitFor()
    await page.reload()
    await settledPart(page)
    await (await edgeOfLength(page, '127 mm')).getByText('+11.55 mm').waitFor()
    const welded = await edgeOfLength(page, '76.2 mm')
    await welded.getByText('+16 mm').waitFor()
    const edge = (await welded.getAttribute('data-edge'))!
    const setup = /\/setups\/([0-9a-f-]{36})/.exec(page.url())![1]!

    // submit
    await actor.press(page.getByRole('button', { name: 'Submit…' }))
    await actor.press(page.getByRole('button', { name: 'Submit revision 2' }))
    await page.getByText('2 · submitted').first().waitFor()
    await context.close()

    // the engineer approves
    const office = await visit(browser)
    const engineer = actorOf(office.page)
    await signInAs(office.page, engineer, 'engineer')
    await office.page.goto('/approvals')
    await engineer.press(office.page.getByRole('link', { name: new RegExp(number) }).first())
    await office.page.waitForURL(`**/approvals/${setup}`)
    await engineer.fill(office.page.getByLabel('Your password, as your signature'), password)
    await engineer.press(office.page.getByRole('button', { name: 'Approve revision 2' }))
    await office.page.getByText('2 · approved').first().waitFor()
    await office.context.close()

    // the welder sees the joint on a phone
    const shop = await visit(browser, { viewport: sizes.phone, hasTouch: true, isMobile: true })
    await signInAs(shop.page, actorOf(shop.page), 'welder')
    await shop.page.goto(`/setups/${setup}/joint/${edge}`)
    await settledPart(shop.page)
    const text = await shop.page.getByRole('main').innerText()
    expect(text).toMatch(/approved/i)
    expect(text).not.toMatch(/not approved/i)
    expect(text).toContain('J-12')
    expect(text).toContain('90°') // groove of two 45° bevels
    expect(text).toContain('4 mm')
    expect(text).toContain('2 mm')
    await shop.context.close()

    expect([...faults, ...office.faults, ...shop.faults]).toEqual([])
  })
})
