import type { Locator, Page } from 'playwright-core'

/** The same job can be done by two people: one with a mouse, one with nothing but a keyboard. */
export interface Actor {
  press(target: Locator): Promise<void>
  fill(target: Locator, text: string): Promise<void>
  /** A radio button of a group. */
  choose(target: Locator): Promise<void>
  /** An option of a select, by a part of its text. */
  pick(select: Locator, text: string): Promise<void>
  /** A row of the grid of edges. */
  row(target: Locator): Promise<void>
}

export function mouse(): Actor {
  return {
    press: (target) => target.click(),
    fill: async (target, text) => {
      await target.click()
      await target.fill(text)
    },
    choose: (target) => target.check({ force: true }),
    pick: async (select, text) => {
      const label = await select.locator('option', { hasText: text }).first().textContent()
      await select.selectOption({ label: label! })
    },
    row: (target) => target.click(),
  }
}

/** More stops than any page of ours has on the way to one control. */
const MOST_TABS = 250

/** Presses Tab, then Shift+Tab, until the focus stands on what `arrived` accepts. */
async function tabUntil(page: Page, arrived: () => Promise<boolean>, what: string): Promise<void> {
  for (const key of ['Tab', 'Shift+Tab']) {
    for (let i = 0; i < MOST_TABS; i += 1) {
      if (await arrived()) return
      await page.keyboard.press(key)
    }
  }
  throw new Error(`the keyboard cannot reach ${what}`)
}

const hasFocus = (target: Locator) => target.evaluate((element) => element === document.activeElement)

export function keyboard(page: Page): Actor {
  const reach = async (target: Locator) => {
    await target.waitFor()
    await tabUntil(page, () => hasFocus(target), String(target))
  }
  return {
    press: async (target) => {
      await reach(target)
      await page.keyboard.press('Enter')
    },
    fill: async (target, text) => {
      await reach(target)
      await page.keyboard.press('Control+a')
      await page.keyboard.type(text)
    },
    choose: async (target) => {
      const group = await target.getAttribute('name')
      const inGroup = () =>
        page.evaluate((name) => document.activeElement?.getAttribute('name') === name, group)
      await tabUntil(page, inGroup, String(target))
      const size = await page.locator(`input[name="${group}"]`).count()
      for (let i = 0; i < size && !(await target.isChecked()); i += 1) await page.keyboard.press('ArrowRight')
      if (!(await target.isChecked())) await page.keyboard.press('Space')
      if (!(await target.isChecked())) throw new Error(`the arrow keys do not choose ${String(target)}`)
    },
    pick: async (select, text) => {
      await reach(select)
      const shown = () =>
        select.evaluate((element) => (element as HTMLSelectElement).selectedOptions[0]?.textContent ?? '')
      for (let i = 0; i < 50 && !(await shown()).includes(text); i += 1)
        await page.keyboard.press('ArrowDown')
      if (!(await shown()).includes(text)) throw new Error(`the arrow keys do not pick ${text}`)
    },
    row: async (target) => {
      const grid = target.page().getByRole('grid', { name: 'Edges' })
      const inGrid = () => grid.evaluate((element) => element.contains(document.activeElement))
      await tabUntil(page, inGrid, 'the edge table')
      await page.keyboard.press('Home')
      const rows = await grid.getByRole('row').count()
      for (let i = 0; i < rows && !(await hasFocus(target)); i += 1) await page.keyboard.press('ArrowDown')
      if (!(await hasFocus(target))) throw new Error('the arrow keys do not reach the row')
      if ((await target.getAttribute('aria-selected')) !== 'true') await page.keyboard.press('Space')
    },
  }
}
