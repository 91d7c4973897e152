import type { Head } from '../../shared/api/heads.ts'
import type { Part } from '../../shared/api/parts.ts'
import { makeHead, makePart, startApp, type Agent, type TestApp } from './app.ts'

/** What most tests of set-ups begin with: an app with one part, one head, and the two who work on them. */
export interface Shop {
  readonly app: TestApp
  readonly part: Part
  readonly head: Head
  readonly programmer: Agent
  readonly engineer: Agent
}

export async function startShop(label: string): Promise<Shop> {
  const app = await startApp(label)
  return {
    app,
    part: await makePart(app),
    head: await makeHead(app),
    programmer: await app.as('programmer'),
    engineer: await app.as('engineer'),
  }
}
