import { openApiDocument } from '../../http/openapi.ts'
import type { HandlersOf } from '../../http/call.ts'
import { demoAccounts } from '../people/demo-accounts.ts'

export const aboutHandlers: HandlersOf<'about' | 'openapi'> = {
  about: ({ services }) => {
    const { demo } = services.config
    const accounts = demo ? demoAccounts.map(({ email, role }) => ({ email, role })) : []
    return Promise.resolve({ name: 'Undercant', demo, demoAccounts: accounts })
  },
  openapi: () => Promise.resolve(openApiDocument()),
}
