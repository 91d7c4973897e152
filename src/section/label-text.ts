import type { Size } from './layout-types.ts'
import type { SectionDimension } from './types.ts'

/** JetBrains Mono: every glyph is 0.6 em wide. */
const ADVANCE = 0.6

export interface LabelLine {
  readonly text: string
  /** Font size, px. */
  readonly font: number
  readonly weight: 400 | 700
  readonly muted: boolean
}

const LINE_HEIGHT = 1.25

/** What a dimension's label prints, line by line; the groove angle is large. */
export function labelLines({ kind, text, caption, tolerance }: SectionDimension): LabelLine[] {
  const big = kind === 'included-angle'
  const value: LabelLine = { text, font: big ? 22 : 13, weight: 700, muted: false }
  const band: LabelLine[] =
    tolerance === '' ? [] : [{ text: tolerance, font: big ? 13 : 12, weight: 400, muted: false }]
  const what: LabelLine = { text: caption, font: 11, weight: 400, muted: true }
  return [value, ...band, what]
}

export function labelSize(dimension: SectionDimension): Size {
  const lines = labelLines(dimension)
  return {
    width: Math.ceil(Math.max(...lines.map(({ text, font }) => [...text].length * font * ADVANCE))) + 4,
    height: Math.ceil(lines.reduce((sum, { font }) => sum + font * LINE_HEIGHT, 0)),
  }
}
