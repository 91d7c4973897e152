import type { Role } from '../../../shared/api/common.ts'

/** One invented person per role; they exist in demo mode only. The password stands in the README. */
export const DEMO_PASSWORD = 'tidal-footbridge'

export interface DemoAccount {
  readonly email: string
  readonly name: string
  readonly role: Role
}

export const demoAccounts: readonly DemoAccount[] = [
  { email: 'programmer@saltmarsh.example', name: 'Wenna Tolcarne', role: 'programmer' },
  { email: 'engineer@saltmarsh.example', name: 'Idris Okonjo', role: 'engineer' },
  { email: 'welder@saltmarsh.example', name: 'Maren Sundqvist', role: 'welder' },
  { email: 'admin@saltmarsh.example', name: 'Piet Halloran', role: 'administrator' },
]
