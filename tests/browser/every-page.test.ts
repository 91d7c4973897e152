import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import {
  launchChromium,
  seriousAxeFindings,
  settledPart,
  signIn,
  sizes,
  visit,
  type DemoPerson,
} from '../support/browser.ts'

/** Every page, both themes, desktop and phone: nothing serious from axe, nothing wider than the screen. */

let browser: Browser
beforeAll(async () => {
  browser = await launchChromium()
})
afterAll(async () => {
  await browser.close()
})

interface Listed {
  readonly items: readonly {
    readonly id: string
    readonly name: string
    readonly approvedRevision?: number | null
  }[]
}

async function list(page: Page, path: string): Promise<Listed['items']> {
  const answer = await page.request.get(path)
  expect(answer.status()).toBe(200)
  const { items } = (await answer.json()) as Listed
  expect(items.length).toBeGreaterThan(0)
  return items
}

/** The pages that each person works on; ids come from the demo. */
async function pagesOf(person: DemoPerson, page: Page): Promise<string[]> {
  const setups = await list(page, '/api/setups?pageSize=100')
  const approved = setups.find((setup) => setup.approvedRevision)!
  const draft = setups.find((setup) => !setup.approvedRevision)!
  switch (person) {
    case 'programmer': {
      const parts = await list(page, '/api/parts')
      return [
        '/parts',
        '/parts/new',
        `/parts/${parts[0]!.id}`,
        '/setups',
        `/setups/${draft.id}`,
        '/account',
        '/nowhere',
      ]
    }
    case 'engineer': {
      const waiting = await list(page, '/api/setups?state=submitted')
      return ['/approvals', `/approvals/${waiting[0]!.id}`, '/heads', '/record', `/setups/${approved.id}`]
    }
    case 'welder':
      return ['/setups', `/setups/${approved.id}/joint/0-0`, `/setups/${approved.id}/sheet`]
    case 'admin':
      return ['/people', '/heads']
  }
}

it('sees a serious fault where there is one', async () => {
  const { context, page } = await visit(browser)
  await page.setContent(
    '<!doctype html><html lang="en"><title>x</title><main><button></button></main></html>',
  )
  expect(await seriousAxeFindings(page)).toEqual(['button-name: button'])
  await context.close()
})

const themes = ['paper', 'tank'] as const
const people: readonly DemoPerson[] = ['programmer', 'engineer', 'welder', 'admin']

describe.each(themes)('in the %s theme', (theme) => {
  const preferences = `localStorage.setItem('undercant.preferences', '{"theme":"${theme}","unit":"mm"}')`

  it('shows the sign-in page without a serious fault', async () => {
    const { context, page, faults } = await visit(browser)
    await page.addInitScript(preferences)
    await page.goto('/sign-in')
    await page.getByRole('button', { name: 'Sign in', exact: true }).waitFor()
    expect(await page.locator('html').getAttribute('data-theme')).toBe(theme)
    expect(await seriousAxeFindings(page)).toEqual([])
    expect(faults).toEqual([])
    await context.close()
  })

  it.each(people)('shows every page of the %s without a serious fault', async (person) => {
    const { context, page, faults } = await visit(browser)
    await page.addInitScript(preferences)
    await signIn(page, person)
    const seen: Record<string, string[]> = {}
    for (const path of await pagesOf(person, page)) {
      await page.goto(path)
      await page.getByRole('main').waitFor()
      await page.waitForLoadState('networkidle')
      if ((await page.locator('[data-frames]').count()) > 0) await settledPart(page)
      const found = await seriousAxeFindings(page)
      // Colours do not depend on the size, nor widths on the theme: one theme is enough at the second size.
      if (theme === 'tank') {
        await page.setViewportSize(sizes.phone)
        await page.waitForTimeout(200)
        found.push(...(await seriousAxeFindings(page)).map((line) => `phone: ${line}`))
        const spill = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth)
        if (spill > 0) found.push(`phone: ${spill} px wider than the screen`)
        await page.setViewportSize(sizes.desktop)
      }
      if (found.length > 0) seen[path.replace(/[0-9a-f-]{36}/, ':id')] = found
    }
    expect(seen).toEqual({})
    expect(faults).toEqual([])
    await context.close()
  })
})
