import type { FacetSpec } from '../../shared/walls/schema.ts'
import { jointSection, type SectionPoint } from '../../shared/joint/section.ts'
import { formatAngle, formatLength } from '../../shared/units/format.ts'
import type { DisplayUnit } from '../../shared/units/length.ts'
import { outlineOf } from './outline.ts'
import type { SectionDimension, SectionSpec, SectionTolerances } from './types.ts'

export interface DimensionOptions {
  readonly unit?: DisplayUnit | undefined
  readonly tolerances?: SectionTolerances | undefined
  /** Also list the angle of square facets beside others (0°), so that it can be edited. */
  readonly squareAngles?: boolean | undefined
}

/** Every dimension of the section, in reading order. */
export function dimensionsOf(spec: SectionSpec, options: DimensionOptions = {}): SectionDimension[] {
  return spec.joint ? jointDimensions(spec, options) : plateDimensions(spec, options)
}

export function isRootFace(facets: readonly FacetSpec[], facet: number): boolean {
  return facets.length > 1 && facets[facet]?.tilt === 0
}

function plateDimensions(spec: SectionSpec, options: DimensionOptions): SectionDimension[] {
  const { facets, thickness } = spec
  const { unit = 'mm', squareAngles = false } = options
  const points = outlineOf(spec).left
  const bottom = points.at(-1)!
  const angles = facets.flatMap(({ tilt }, facet): SectionDimension[] => {
    if (tilt === 0 && facets.length > 1 && !squareAngles) return []
    return [
      {
        id: `angle-${facet}`,
        kind: 'angle',
        facet,
        value: tilt,
        quantity: 'angle',
        text: formatAngle(tilt),
        caption: 'from vertical',
        tolerance: '',
        from: points[facet]!,
        to: points[facet + 1]!,
      },
    ]
  })
  return [
    ...angles,
    ...facetDepths(spec, points, options),
    thicknessOf(thickness, points, unit),
    {
      id: 'bottom-offset',
      kind: 'bottom-offset',
      facet: null,
      value: bottom.x,
      quantity: 'length',
      text: formatLength(bottom.x, unit),
      caption: 'bottom offset',
      tolerance: '',
      from: { x: 0, depth: thickness },
      to: bottom,
    },
  ]
}

function facetDepths(
  { facets }: SectionSpec,
  points: readonly SectionPoint[],
  { unit = 'mm', tolerances = {} }: DimensionOptions,
): SectionDimension[] {
  if (facets.length === 1) return []
  return facets.map((_, facet) => {
    const from = points[facet]!
    const to = points[facet + 1]!
    const root = isRootFace(facets, facet)
    return {
      id: `facet-depth-${facet}`,
      kind: 'facet-depth',
      facet,
      value: to.depth - from.depth,
      quantity: 'length',
      text: formatLength(to.depth - from.depth, unit),
      caption: root ? 'root face' : 'depth of bevel',
      tolerance: root ? (tolerances.rootFace ?? '') : '',
      from,
      to,
    }
  })
}

function thicknessOf(thickness: number, wall: readonly SectionPoint[], unit: DisplayUnit): SectionDimension {
  return {
    id: 'thickness',
    kind: 'thickness',
    facet: null,
    value: thickness,
    quantity: 'length',
    text: formatLength(thickness, unit),
    caption: 'thickness',
    tolerance: '',
    from: wall[0]!,
    to: { x: wall[0]!.x, depth: thickness },
  }
}

function jointDimensions(spec: SectionSpec, options: DimensionOptions): SectionDimension[] {
  const { unit = 'mm', tolerances = {} } = options
  const { left, right } = outlineOf(spec)
  const { rootOpening } = spec.joint!
  // The joint's frame puts the outermost line of the left plate, and nothing else, at x = 0.
  const rootEnd = left.findLast((point) => point.x === 0)!
  return [
    ...includedAngles(spec).map(({ side, value }): SectionDimension => ({
      id: `included-angle-${side}`,
      kind: 'included-angle',
      facet: side === 'top' ? 0 : spec.facets.length - 1,
      value,
      quantity: 'angle',
      text: formatAngle(value),
      caption: side === 'top' ? 'groove angle' : 'groove angle below',
      tolerance: tolerances.includedAngle ?? '',
      from: side === 'top' ? left[0]! : left.at(-1)!,
      to: side === 'top' ? right![0]! : right!.at(-1)!,
    })),
    ...facetDepths(spec, left, options),
    thicknessOf(spec.thickness, right!, unit),
    {
      id: 'root-opening',
      kind: 'root-opening',
      facet: null,
      value: rootOpening,
      quantity: 'length',
      text: formatLength(rootOpening, unit),
      caption: 'root opening',
      tolerance: tolerances.rootOpening ?? '',
      from: rootEnd,
      to: { x: rootEnd.x + rootOpening, depth: rootEnd.depth },
    },
  ]
}

export interface IncludedAngle {
  /** Which face the groove opens to. */
  readonly side: 'top' | 'bottom'
  /** Degrees between the two walls. */
  readonly value: number
}

/** The groove angle at each face that a groove opens to. */
export function includedAngles({ facets, thickness, joint }: SectionSpec): IncludedAngle[] {
  if (!joint) return []
  const { grooveAngleTop, grooveAngleBottom } = jointSection({ facets, thickness, ...joint })
  const found: IncludedAngle[] = [
    { side: 'top', value: grooveAngleTop },
    { side: 'bottom', value: grooveAngleBottom },
  ]
  return found.filter(({ value }) => value > 0)
}
