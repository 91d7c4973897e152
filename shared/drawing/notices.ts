import type { Point } from '../geometry/types.ts'
import { MAX_PLACES } from './limits.ts'
import type { Notice, NoticeCode } from './schema.ts'

type Severity = Notice['severity']

/** What happened, so many times, and what to do about it. */
const WORDS: Readonly<Record<NoticeCode, readonly [Severity, (count: number) => string]>> = {
  'unit-undeclared': [
    'warning',
    () => 'The drawing does not say its unit. Check the size and choose the unit.',
  ],
  'unit-improbable': ['warning', () => 'The size is unlikely in this unit. Check it and choose the unit.'],
  'entity-ignored': ['note', (n) => `${many(n, 'entity', 'entities')} that draw no outline left aside.`],
  'layer-left-out': [
    'note',
    (n) => `${many(n, 'entity', 'entities')} on layers that were not chosen left out.`,
  ],
  'duplicate-dropped': ['note', (n) => `${many(n, 'line or arc', 'lines or arcs')} drawn twice, read once.`],
  'zero-length-dropped': ['note', (n) => `${many(n, 'piece', 'pieces')} without length dropped.`],
  'gap-joined': ['warning', (n) => `${many(n, 'gap', 'gaps')} closed. Check the places marked.`],
  'chain-open': [
    'warning',
    (n) =>
      `${many(n, 'chain does', 'chains do')} not close and ${n === 1 ? 'is' : 'are'} not part of any outline. Close it in the drawing, or allow a larger gap.`,
  ],
  'chain-branched': [
    'warning',
    (n) =>
      `${many(n, 'chain branches', 'chains branch')}: more than two ends meet. Leave out a layer, or remove the extra lines.`,
  ],
  'arc-recognised': [
    'note',
    (n) => `${many(n, 'run of short lines was', 'runs of short lines were')} read as arcs.`,
  ],
  'spline-approximated': [
    'note',
    (n) => `${many(n, 'spline', 'splines')} read as arcs within the arc tolerance.`,
  ],
  'ellipse-approximated': [
    'note',
    (n) =>
      `${many(n, 'ellipse or stretched arc', 'ellipses or stretched arcs')} read as arcs within the arc tolerance.`,
  ],
  'block-expanded': ['note', (n) => `${many(n, 'block', 'blocks')} placed in the drawing.`],
  'block-missing': [
    'warning',
    (n) =>
      `${many(n, 'block is', 'blocks are')} named but not in the file. Bind references before exporting.`,
  ],
  'outside-any-part': ['warning', (n) => `${many(n, 'piece lies', 'pieces lie')} outside every part.`],
  'loop-crosses': [
    'error',
    (n) => `Outlines cross or touch at ${many(n, 'place', 'places')}. Correct the drawing.`,
  ],
  'lines-overlap': [
    'warning',
    (n) => `Lines lie on one another at ${many(n, 'place', 'places')}. Remove the extra ones.`,
  ],
  'count-corrected': [
    'warning',
    (n) =>
      `${many(n, 'entity gives', 'entities give')} a wrong number of points; the points present were read. Check the outline.`,
  ],
  'extrusion-mirrored': [
    'note',
    (n) =>
      `${many(n, 'entity is', 'entities are')} drawn from the back and ${n === 1 ? 'was' : 'were'} mirrored.`,
  ],
  'not-planar': [
    'warning',
    (n) =>
      `${many(n, 'entity is', 'entities are')} not flat on the page: heights were left out, tilted ones were not read.`,
  ],
  'origin-moved': ['note', () => 'The drawing lies far from its origin and was moved to it.'],
}

function many(n: number, one: string, more: string): string {
  return `${n} ${n === 1 ? one : more}`
}

interface Detail {
  readonly layer?: string
  readonly entity?: string
  readonly severity?: Severity
  readonly message?: string
  readonly count?: number
}

/** Gathers notices: one for each code, layer and kind of entity, with its count and its first places. */
export class NoticeBook {
  readonly #notices = new Map<string, { code: NoticeCode; count: number; places: Point[]; detail: Detail }>()

  note(code: NoticeCode, at: Point | null = null, detail: Detail = {}): void {
    const key = `${code}|${detail.layer ?? ''}|${detail.entity ?? ''}`
    const entry = this.#notices.get(key) ?? { code, count: 0, places: [], detail }
    entry.count += detail.count ?? 1
    if (at && entry.places.length < MAX_PLACES) entry.places.push({ x: at.x, y: at.y })
    this.#notices.set(key, entry)
  }

  /** Worst first, then as they were noted. `move` maps the places onto the picture. */
  list(move: (place: Point) => Point): Notice[] {
    const rank: Readonly<Record<Severity, number>> = { error: 0, warning: 1, note: 2 }
    return [...this.#notices.values()]
      .map(({ code, count, places, detail }): Notice => {
        const [severity, words] = WORDS[code]
        return {
          code,
          severity: detail.severity ?? severity,
          message: detail.message ?? words(count),
          count,
          ...(detail.layer === undefined ? {} : { layer: detail.layer }),
          ...(detail.entity === undefined ? {} : { entity: detail.entity }),
          places: places.map(move),
        }
      })
      .sort((a, b) => rank[a.severity] - rank[b.severity])
  }
}
