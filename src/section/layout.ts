import type { SectionDimension, SectionSpec } from './types.ts'
import type { LayoutOptions, SectionLayout } from './layout-types.ts'
import { layoutJoint } from './layout-joint.ts'
import { layoutPlate } from './layout-plate.ts'

/**
 * Where everything of a section stands, in pixels. Labels never meet, because each kind has a region of its
 * own: the angle of the top facet above the plate, of the bottom facet below it, the offset or root opening
 * below that, and depths in a column beside the plate where they push each other apart.
 */
export function layoutSection(
  spec: SectionSpec,
  dimensions: readonly SectionDimension[],
  options: LayoutOptions,
): SectionLayout {
  return spec.joint ? layoutJoint(spec, dimensions, options) : layoutPlate(spec, dimensions, options)
}
