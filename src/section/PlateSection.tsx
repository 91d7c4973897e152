import { useMemo, type CSSProperties, type ReactNode } from 'react'
import type { FacetSpec } from '../../shared/walls/schema.ts'
import type { DisplayUnit } from '../../shared/units/length.ts'
import type { Theme } from '../theme/tilt-colour.ts'
import { describeSection } from './describe.ts'
import { dimensionsOf } from './dimensions.ts'
import { labelLines, labelSize as textSize } from './label-text.ts'
import { layoutSection } from './layout.ts'
import type { PlacedLabel, Size } from './layout-types.ts'
import { SectionLines } from './SectionLines.tsx'
import type { SectionDimension, SectionSpec, SectionTolerances } from './types.ts'
import { useWidth } from './use-width.ts'

export interface PlateSectionProps {
  /** mm */
  readonly thickness: number
  /** From the top face down, degrees; the last must end at the thickness. */
  readonly facets: readonly FacetSpec[]
  /** Draws the joint: the other plate on the right, at this root opening (mm). */
  readonly joint?: SectionSpec['joint']
  readonly theme: Theme
  /** Unit that lengths are written in; millimetres by default. */
  readonly unit?: DisplayUnit
  readonly tolerances?: SectionTolerances
  /** Facets that break a limit: hatched. */
  readonly breached?: readonly number[]
  /** Also dimension the angle of square facets (0°) beside others. */
  readonly squareAngles?: boolean
  /**
   * What stands at a dimension instead of its text, e.g. an input. Return undefined for the plain text. Give
   * `labelSize` too, so that the room is kept for it.
   */
  readonly renderDimension?: (dimension: SectionDimension) => ReactNode | undefined
  /** Room in px for what `renderDimension` gives; undefined for the plain text's own size. */
  readonly labelSize?: (dimension: SectionDimension) => Size | undefined
  /** Width in px; follows its container when left out (320 px and more). */
  readonly width?: number
  /** Most that the plate may stand high on the page, px. */
  readonly plateHeight?: number
  /** Draw at the largest standard scale (2 : 1, 1 : 1, 1 : 2 …) that fits, true on paper, and say it. */
  readonly standardScale?: boolean
  /** Black on white whatever the theme. */
  readonly print?: boolean
}

/**
 * The cross-section drawn to scale, dimensioned as a drawing is. Lines are SVG; the numbers stand over it in
 * HTML, so that they may be inputs. The picture's text alternative holds every number.
 */
export function PlateSection(props: PlateSectionProps) {
  const { thickness, facets, joint, theme, unit, tolerances, squareAngles, print = false } = props
  const { renderDimension, labelSize, width: fixed, plateHeight = 190, standardScale = false } = props
  const [ref, measured] = useWidth<HTMLDivElement>(320)
  const width = fixed ?? measured
  const dimensions = useMemo(
    () => dimensionsOf({ thickness, facets, joint }, { unit, tolerances, squareAngles }),
    [thickness, facets, joint, unit, tolerances, squareAngles],
  )
  const layout = layoutSection({ thickness, facets, joint }, dimensions, {
    width,
    plateHeight,
    labelSize: (dimension) => labelSize?.(dimension) ?? textSize(dimension),
    standardScale,
  })
  return (
    <figure className="m-0">
      {/* Its content must not hold a narrowing page open: the drawing follows the page. */}
      <div ref={ref} style={fixed === undefined ? { contain: 'inline-size' } : { width: fixed }}>
        <div className="relative" style={{ width: layout.width, height: layout.height }}>
          <SectionLines
            layout={layout}
            theme={theme}
            label={describeSection({ thickness, facets, joint }, dimensions)}
            breached={props.breached ?? []}
            print={print}
          />
          {layout.labels.map((label) => (
            <SectionLabel key={label.dimension.id} label={label} print={print}>
              {renderDimension?.(label.dimension)}
            </SectionLabel>
          ))}
        </div>
      </div>
      {layout.scaleText && (
        <figcaption className={print ? 'text-small text-black' : 'text-small text-muted print:text-black'}>
          {`Section at ${layout.scaleText} on paper`}
        </figcaption>
      )}
    </figure>
  )
}

interface SectionLabelProps {
  readonly label: PlacedLabel
  readonly print: boolean
  readonly children: ReactNode | undefined
}

function SectionLabel({ label, print, children }: SectionLabelProps) {
  const { x, y, width, height, dimension, align, acrossFace } = label
  const box: CSSProperties = { position: 'absolute', left: x, top: y, width, height }
  if (children !== undefined) {
    return (
      <div style={box} data-dimension={dimension.id}>
        {children}
      </div>
    )
  }
  const ground = print ? 'bg-white' : 'bg-face print:bg-white'
  const textAlign = align === 'centre' ? 'center' : align
  return (
    <div
      style={{ ...box, textAlign }}
      className={`pointer-events-none whitespace-nowrap ${acrossFace ? ground : ''}`}
      data-dimension={dimension.id}
      aria-hidden="true"
    >
      {labelLines(dimension).map(({ text, font, weight, muted }, i) => (
        <div
          key={i}
          className={
            print ? 'text-black' : muted ? 'text-muted print:text-black' : 'text-ink print:text-black'
          }
          style={{ fontSize: font, fontWeight: weight, lineHeight: 1.25 }}
        >
          {text}
        </div>
      ))}
    </div>
  )
}
