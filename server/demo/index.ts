import { bearingPlate } from './bearing-plate.ts'
import { capPlate } from './cap-plate.ts'
import type { DemoPart } from './demo-part.ts'
import { gusset } from './gusset.ts'
import { linkPlate } from './link-plate.ts'
import { ringFlange } from './ring-flange.ts'
import { splineDisc } from './spline-disc.ts'
import { trappedPlate } from './trapped-plate.ts'

export type { DemoPart, DemoSetup } from './demo-part.ts'
export { demoHeads, type DemoHead } from './heads.ts'

/** The parts of the demo; seeding reads their drawings through the importer that users use. */
export const demoParts: readonly DemoPart[] = [
  bearingPlate,
  ringFlange,
  gusset,
  splineDisc,
  trappedPlate,
  capPlate,
  linkPlate,
]
