import { demoJet } from './demo-part.ts'

export interface DemoHead {
  readonly name: string
  readonly kind: 'turning' | 'crossed-tilts'
  /** Degrees from vertical. */
  readonly mechanicalLimit: number
  readonly workingLimit: number
  /** Why the engineer set the working limit. */
  readonly reason: string
  readonly jet: typeof demoJet
}

export const demoHeads: readonly DemoHead[] = [
  {
    name: 'North gantry',
    kind: 'turning',
    mechanicalLimit: 60,
    workingLimit: 55,
    reason: 'Beyond 55° the nozzle shroud has touched clamped plate.',
    jet: demoJet,
  },
  {
    name: 'South gantry',
    kind: 'crossed-tilts',
    mechanicalLimit: 47,
    workingLimit: 45,
    reason: 'Test cuts were within half a degree up to 45°.',
    jet: demoJet,
  },
]
