import { AxeBuilder } from '@axe-core/playwright'
import {
  chromium,
  type Browser,
  type BrowserContext,
  type BrowserContextOptions,
  type Page,
} from 'playwright-core'
import { inject } from 'vitest'

/** Real Chromium with software WebGL and no talk of its own on the network. */
export function launchChromium(): Promise<Browser> {
  return chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: [
      '--no-sandbox',
      '--enable-unsafe-swiftshader',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-quic',
      '--disable-sync',
      '--no-first-run',
    ],
  })
}

export const sizes = {
  desktop: { width: 1440, height: 900 },
  tablet: { width: 820, height: 1180 },
  phone: { width: 390, height: 844 },
} as const

export interface Visit {
  readonly context: BrowserContext
  readonly page: Page
  /** What must never happen: requests to other hosts, CSP violations, uncaught errors. */
  readonly faults: string[]
}

/** A fresh visitor. Every page of the context is watched from its first request. */
export async function visit(browser: Browser, options: BrowserContextOptions = {}): Promise<Visit> {
  const baseURL = inject('baseUrl')
  const context = await browser.newContext({ baseURL, viewport: sizes.desktop, ...options })
  context.setDefaultTimeout(30_000)
  const faults: string[] = []
  const host = new URL(baseURL).host
  context.on('request', (request) => {
    const url = new URL(request.url())
    if (/^(https?|wss?):$/.test(url.protocol) && url.host !== host) faults.push(`request to ${url.host}`)
  })
  context.on('weberror', (error) => faults.push(`uncaught: ${error.error().message}`))
  context.on('console', (message) => {
    if (/content security policy/i.test(message.text())) faults.push(`csp: ${message.text()}`)
  })
  return { context, page: await context.newPage(), faults }
}

export const password = 'tidal-footbridge'
export type DemoPerson = 'programmer' | 'engineer' | 'welder' | 'admin'

export async function signIn(page: Page, who: DemoPerson): Promise<void> {
  await page.goto('/sign-in')
  await page.getByLabel('Email').fill(`${who}@saltmarsh.example`)
  await page.getByLabel('Password').fill(password)
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await page.waitForURL((url) => url.pathname !== '/sign-in')
}

/** Serious and critical findings of axe on the page as it stands, as lines. */
export async function seriousAxeFindings(page: Page): Promise<string[]> {
  // The legacy mode runs in the page itself: we have no frames of other origins, and it takes half the time.
  const { violations } = await new AxeBuilder({ page }).setLegacyMode(true).analyze()
  return violations
    .filter((v) => v.impact === 'serious' || v.impact === 'critical')
    .map(
      (v) =>
        `${v.id}: ${v.nodes
          .map((n) => n.target.join(' '))
          .slice(0, 4)
          .join(' | ')}`,
    )
}

/** Waits until the 3D part has drawn, then until it draws no more. */
export async function settledPart(page: Page): Promise<void> {
  const part = page.locator('[data-frames]').first()
  await part.waitFor()
  await page.waitForFunction(
    () => Number(document.querySelector('[data-frames]')?.getAttribute('data-frames')) > 0,
  )
  let before = ''
  for (let i = 0; i < 60; i += 1) {
    const now = (await part.getAttribute('data-frames')) ?? ''
    if (now === before) return
    before = now
    await page.waitForTimeout(250)
  }
  throw new Error('the part never came to rest')
}
