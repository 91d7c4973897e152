import type { FacetSpec } from '../../shared/evaluate/schema.ts'
import { outermost, outlineOf, wallPoints } from './outline.ts'
import type {
  SectionDimension,
  SectionFormat,
  SectionPoint,
  SectionSpec,
  SectionTolerances,
} from './types.ts'

/** Millimetres to one place and degrees to one place: what a drawing shows; sign with a real minus. */
export const metricFormat: SectionFormat = {
  length: (mm) => `${signed(mm, 1)} mm`,
  angle: (degrees) => `${signed(degrees, 1)}°`,
}

function signed(value: number, places: number): string {
  const text = Math.abs(value).toFixed(places)
  return value < 0 && Number(text) !== 0 ? `−${text}` : text
}

export interface DimensionOptions {
  readonly format?: SectionFormat | undefined
  readonly tolerances?: SectionTolerances | undefined
  /** Also list the angle of square facets beside others (0°), so that it can be edited. */
  readonly squareAngles?: boolean | undefined
}

/** Every dimension of the section, in reading order. */
export function dimensionsOf(spec: SectionSpec, options: DimensionOptions = {}): SectionDimension[] {
  return spec.mate ? jointDimensions(spec, options) : plateDimensions(spec, options)
}

export function isRootFace(facets: readonly FacetSpec[], facet: number): boolean {
  return facets.length > 1 && facets[facet]?.tilt === 0
}

function plateDimensions(spec: SectionSpec, options: DimensionOptions): SectionDimension[] {
  const { facets, thickness } = spec
  const { format = metricFormat, squareAngles = false } = options
  const points = wallPoints(facets)
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
        text: format.angle(tilt),
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
    thicknessOf(thickness, points, format),
    {
      id: 'bottom-offset',
      kind: 'bottom-offset',
      facet: null,
      value: bottom.x,
      quantity: 'length',
      text: format.length(bottom.x),
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
  { format = metricFormat, tolerances = {} }: DimensionOptions,
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
      text: format.length(to.depth - from.depth),
      caption: root ? 'root face' : 'depth of bevel',
      tolerance: root ? (tolerances.rootFace ?? '') : '',
      from,
      to,
    }
  })
}

function thicknessOf(
  thickness: number,
  wall: readonly SectionPoint[],
  format: SectionFormat,
): SectionDimension {
  return {
    id: 'thickness',
    kind: 'thickness',
    facet: null,
    value: thickness,
    quantity: 'length',
    text: format.length(thickness),
    caption: 'thickness',
    tolerance: '',
    from: wall[0]!,
    to: { x: wall[0]!.x, depth: thickness },
  }
}

function jointDimensions(spec: SectionSpec, options: DimensionOptions): SectionDimension[] {
  const { format = metricFormat, tolerances = {} } = options
  const { left, right } = outlineOf(spec)
  const mate = spec.mate!
  const root = outermost(left)
  const rootEnd = left.findLast((point) => point.x === root)!
  return [
    ...includedAngles(spec).map(({ side, value }): SectionDimension => ({
      id: `included-angle-${side}`,
      kind: 'included-angle',
      facet: side === 'top' ? 0 : spec.facets.length - 1,
      value,
      quantity: 'angle',
      text: format.angle(value),
      caption: side === 'top' ? 'groove angle' : 'groove angle below',
      tolerance: tolerances.includedAngle ?? '',
      from: side === 'top' ? left[0]! : left.at(-1)!,
      to: side === 'top' ? right![0]! : right!.at(-1)!,
    })),
    ...facetDepths(spec, left, options),
    thicknessOf(spec.thickness, right!, format),
    {
      id: 'root-opening',
      kind: 'root-opening',
      facet: null,
      value: mate.rootOpening,
      quantity: 'length',
      text: format.length(mate.rootOpening),
      caption: 'root opening',
      tolerance: tolerances.rootOpening ?? '',
      from: rootEnd,
      to: { x: rootEnd.x + mate.rootOpening, depth: rootEnd.depth },
    },
  ]
}

export interface IncludedAngle {
  /** Which face the groove opens to. */
  readonly side: 'top' | 'bottom'
  /** Degrees between the two walls. */
  readonly value: number
}

/**
 * The groove angle at each face that a groove opens to: the top facets' outward tilts added, and the bottom
 * facets' inward tilts added. A wall that leans the other way there takes from it.
 */
export function includedAngles({ facets, mate }: SectionSpec): IncludedAngle[] {
  if (!mate) return []
  const top = facets[0]!.tilt + mate.facets[0]!.tilt
  const bottom = -(facets.at(-1)!.tilt + mate.facets.at(-1)!.tilt)
  const found: IncludedAngle[] = []
  if (top > 0) found.push({ side: 'top', value: top })
  if (bottom > 0) found.push({ side: 'bottom', value: bottom })
  return found
}
