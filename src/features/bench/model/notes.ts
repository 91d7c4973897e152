import { cornerName, edgeKey, edgeName } from '../../../../shared/walls/names.ts'
import type { EdgeRef } from '../../../../shared/walls/types.ts'
import type { DisplayUnit } from '../../../../shared/units/length.ts'
import type { Cure, Finding, FindingCode, FindingSeverity } from '../../../../shared/findings/schema.ts'

/**
 * Margin notes: findings in the order in which they matter, and those of one kind gathered into one note
 * once there are many, so that the list can be read.
 */
export interface MarginNote {
  readonly number: number
  readonly severity: FindingSeverity
  readonly code: FindingCode
  readonly message: string
  readonly findings: readonly Finding[]
  readonly places: readonly Place[]
  /** One click: the cures of all its findings; null where a person has to decide. */
  readonly cure: NoteCure | null
  /** What would help, where it is not a number to set. */
  readonly advice: string | null
}

export interface Place {
  readonly name: string
  /** Edges to select when the place is chosen. */
  readonly edges: readonly EdgeRef[]
  readonly loop: number | null
  readonly vertex: number | null
  readonly edge: number | null
}

export interface NoteCure {
  readonly message: string
  readonly cures: readonly Cure[]
}

/** More findings of one kind than this become one note. */
export const GATHER_ABOVE = 3

const rank: Record<FindingSeverity, number> = { stop: 0, warning: 1, note: 2 }

export const severityWord: Record<FindingSeverity, string> = {
  stop: 'Stop',
  warning: 'Warning',
  note: 'Note',
}

/** What many findings of one kind have in common, as a sentence around their number. */
const gathered: Record<FindingCode, { one: string; say: string; length?: true }> = {
  'edge-over-mechanical-limit': { one: 'edges', say: 'pass the head’s mechanical limit' },
  'edge-over-working-limit': { one: 'edges', say: 'pass the working limit' },
  'corner-over-mechanical-limit': { one: 'corners', say: 'pass the head’s mechanical limit' },
  'corner-over-working-limit': { one: 'corners', say: 'pass the working limit' },
  'nozzle-touches-plate': { one: 'edges', say: 'bring the nozzle down to the plate', length: true },
  'wall-vanishes': { one: 'walls', say: 'vanish before the bottom', length: true },
  'contour-splits': { one: 'places', say: 'split the contour before the bottom', length: true },
  'walls-break-through': { one: 'places', say: 'break through before the bottom', length: true },
  'facets-cut-into-part': { one: 'walls', say: 'have a facet whose cut would enter the part' },
  'smooth-step': { one: 'smooth corners', say: 'leave a step between unlike walls' },
  'concave-fillet': { one: 'concave corners', say: 'keep a fillet', length: true },
  'hole-smaller-than-kerf': { one: 'holes', say: 'are smaller than the kerf', length: true },
  'profile-crosses-itself': { one: 'places', say: 'let the profile cross itself' },
  'loop-outside-part': { one: 'loops', say: 'lie outside the part' },
  'head-touches-plate': { one: 'places', say: 'bring the head down to the plate', length: true },
  'axis-out-of-travel': { one: 'places', say: 'ask for more travel than an axis has' },
  'kerf-closes': { one: 'plates', say: 'are thicker than the kerf stays open', length: true },
  'corner-without-way-round': { one: 'corners', say: 'have no way round that works' },
  'corner-choice-refused': { one: 'corners', say: 'refuse the way round that was chosen' },
  'no-room-to-pierce': { one: 'loops', say: 'have no room to pierce and lead in' },
  'detail-finer-than-jet': { one: 'edges', say: 'lie in hollows finer than the jet', length: true },
  'hole-too-small-for-tilt': { one: 'holes', say: 'are too small for their tilt', length: true },
  'seam-bends': { one: 'corners', say: 'have a bent seam', length: true },
  'loose-before-last-pass': { one: 'loops', say: 'are free before their last pass' },
  'jet-cuts-wall': { one: 'walls', say: 'are entered by the jet of another', length: true },
  'jet-may-graze': { one: 'places', say: 'are grazed by the jet at most' },
  'jet-clearance-unknown': { one: 'places', say: 'could not be looked at to the end' },
  'part-trapped': { one: 'parts', say: 'are trapped in the sheet' },
  'slug-trapped': { one: 'slugs', say: 'are trapped in the part' },
}

export interface NoteFormat {
  /** The unit that lengths are shown in; the findings themselves speak in millimetres. */
  readonly unit: DisplayUnit
  readonly length: (mm: number) => string
  readonly angle: (degrees: number) => string
  /** Edges in a loop, so that a corner can name the two that meet there. */
  readonly edgesIn: (loop: number) => number
}

export function notesOf(findings: readonly Finding[], format: NoteFormat): MarginNote[] {
  const kinds = new Map<string, Finding[]>()
  for (const finding of findings) {
    const key = `${rank[finding.severity]} ${finding.code}`
    kinds.set(key, [...(kinds.get(key) ?? []), finding])
  }
  const groups = [...kinds.values()].flatMap((kind) =>
    kind.length > GATHER_ABOVE ? [kind] : kind.map((finding) => [finding]),
  )
  return groups
    .sort((a, b) => rank[a[0]!.severity] - rank[b[0]!.severity])
    .map((group, i) => noteOf(group, i + 1, format))
}

function noteOf(findings: readonly Finding[], number: number, format: NoteFormat): MarginNote {
  const first = findings[0]!
  return {
    number,
    severity: first.severity,
    code: first.code,
    message:
      findings.length === 1 ? first.message + inShownUnit(first, format) : gatheredMessage(findings, format),
    findings,
    places: findings.map((finding) => placeOf(finding, format)),
    cure: cureOf(findings, format),
    advice: findings.find(({ cure }) => cure && !isSettable(cure))?.cure?.message ?? null,
  }
}

/** A finding's lengths in the unit on the screen, from its own numbers, where that is not the millimetre. */
function inShownUnit({ code, value, limit }: Finding, { unit, length }: NoteFormat): string {
  if (unit === 'mm' || !gathered[code].length || value === undefined) return ''
  const against = limit === undefined || limit === 0 ? '' : ` against ${length(limit)}`
  return ` That is ${length(value)}${against}.`
}

function gatheredMessage(findings: readonly Finding[], format: NoteFormat): string {
  const { one, say, length } = gathered[findings[0]!.code]
  const values = findings.flatMap(({ value }) => value ?? [])
  const write = length ? format.length : format.angle
  const limits = new Set(findings.flatMap(({ limit }) => limit ?? []))
  const limit = limits.size === 1 && !length ? ` of ${format.angle([...limits][0]!)}` : ''
  return `${findings.length} ${one} ${say}${limit}${spread(values, write)}.`
}

/** `: 0.55 mm`, or the least and the most. */
function spread(values: readonly number[], write: (value: number) => string): string {
  if (values.length === 0) return ''
  const least = write(Math.min(...values))
  const most = write(Math.max(...values))
  return least === most ? `: ${least}` : `: ${least} to ${most}`
}

function placeOf(finding: Finding, { edgesIn }: NoteFormat): Place {
  const loop = finding.loop ?? null
  const edge = finding.edge ?? null
  const vertex = finding.vertex ?? null
  if (loop !== null && vertex !== null) {
    const count = Math.max(1, edgesIn(loop))
    const edges = [(vertex - 1 + count) % count, vertex].map((at) => ({ loop, edge: at }))
    return { name: cornerName({ loop, vertex }), edges, loop, vertex, edge }
  }
  if (loop !== null && edge !== null) {
    return { name: edgeName({ loop, edge }), edges: [{ loop, edge }], loop, vertex, edge }
  }
  if (loop !== null) {
    const edges = Array.from({ length: edgesIn(loop) }, (_, at) => ({ loop, edge: at }))
    return { name: loop === 0 ? 'outer loop' : `hole ${loop}`, edges, loop, vertex, edge }
  }
  return { name: 'the whole part', edges: [], loop, vertex, edge }
}

export function isSettable(cure: Cure): boolean {
  return cure.set !== undefined || cure.standoff !== undefined
}

function cureOf(findings: readonly Finding[], { unit, length }: NoteFormat): NoteCure | null {
  const cures = findings.flatMap(({ cure }) => (cure && isSettable(cure) ? [cure] : []))
  if (cures.length === 0 || cures.length < findings.length) return null
  const messages = new Set(
    cures.map(({ message, standoff }) =>
      unit === 'mm' || standoff === undefined ? message : `${message} That is ${length(standoff)}.`,
    ),
  )
  const message = messages.size === 1 ? [...messages][0]! : `Apply the cure of each of the ${cures.length}`
  return { message, cures }
}

const overLimit: ReadonlySet<FindingCode> = new Set([
  'edge-over-mechanical-limit',
  'edge-over-working-limit',
  'corner-over-mechanical-limit',
  'corner-over-working-limit',
])

/** Keys of the edges and names of the corners that pass a limit. */
export function breachesIn(findings: readonly Finding[]): Set<string> {
  return new Set(
    findings
      .filter(({ code }) => overLimit.has(code))
      .flatMap(({ loop = 0, edge, vertex }) => {
        if (vertex !== undefined) return [cornerName({ loop, vertex })]
        return edge === undefined ? [] : [edgeKey({ loop, edge })]
      }),
  )
}
