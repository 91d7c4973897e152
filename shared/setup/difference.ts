import { edgeKey, edgeName } from '../walls/names.ts'
import type { EdgeRef } from '../walls/types.ts'
import type { FacetSpec, WallSpec } from '../walls/schema.ts'
import { formatAngle, formatLength, formatNumber } from '../units/format.ts'
import type { DisplayUnit } from '../units/length.ts'
import { canonicalText } from './canonical.ts'
import { describeWall } from './describe.ts'
import type { JointSpec, SetupContent } from './schema.ts'

/** What changed from one content to another, in words, for review and for conflicts. */

export const changeKinds = [
  'part',
  'profile',
  'plate',
  'head',
  'jet',
  'datum',
  'wall',
  'joint',
  'note',
] as const
export type ChangeKind = (typeof changeKinds)[number]

export interface Change {
  readonly kind: ChangeKind
  /** What changed: `Thickness`, `e3`, `h1.e2 joint`. */
  readonly what: string
  readonly before: string
  readonly after: string
  /** The edge that the change belongs to, for walls and joints. */
  readonly edge?: EdgeRef
}

export function differenceOf(before: SetupContent, after: SetupContent, unit: DisplayUnit = 'mm'): Change[] {
  const length = (mm: number) => formatLength(mm, unit, { decimals: 4 })
  const angle = (degrees: number | null) =>
    degrees === null ? 'none' : formatAngle(degrees, { decimals: 4 })
  const changes: Change[] = []
  const compare = (kind: ChangeKind, what: string, a: string, b: string) => {
    if (a !== b) changes.push({ kind, what, before: a, after: b })
  }
  /** Numbers are compared as bits; the text shows more digits when rounding would hide the change. */
  const compareNumber = (
    kind: ChangeKind,
    what: string,
    a: number | null,
    b: number | null,
    text: (value: number) => string,
  ) => {
    if (a === b) return
    const words = [a, b].map((value) => (value === null ? 'none' : text(value)))
    const [shownA = '', shownB = ''] = words[0] === words[1] ? [String(a), String(b)] : words
    changes.push({ kind, what, before: shownA, after: shownB })
  }

  const compareNamed = (kind: ChangeKind, what: string, a: [string, string], b: [string, string]) => {
    if (a[0] !== b[0] && a[1] === b[1]) {
      changes.push({ kind, what, before: a[1], after: `another one, also named ${b[1]}` })
    } else compare(kind, what, a[1], b[1])
  }

  compareNamed('part', 'Part', [before.part.id, partText(before)], [after.part.id, partText(after)])
  compare('part', 'Drawing', before.part.drawingSha256, after.part.drawingSha256)
  if (canonicalText(before.loops) !== canonicalText(after.loops)) {
    changes.push({ kind: 'profile', what: 'Profile', before: profileText(before), after: profileText(after) })
  }
  compare('plate', 'Material', before.plate.material, after.plate.material)
  compareNumber('plate', 'Thickness', before.plate.thickness, after.plate.thickness, length)
  compareNamed('head', 'Head', [before.head.id, before.head.name], [after.head.id, after.head.name])
  compareNumber('head', 'Mechanical limit', before.head.mechanicalLimit, after.head.mechanicalLimit, angle)
  compareNumber('head', 'Working limit', before.head.workingLimit, after.head.workingLimit, angle)
  compareNumber('jet', 'Kerf', before.jet.kerf, after.jet.kerf, length)
  compareNumber('jet', 'Taper', before.jet.taper, after.jet.taper, angle)
  compareNumber('jet', 'Stand-off', before.jet.standoff, after.jet.standoff, length)
  compareNumber('jet', 'Nozzle diameter', before.jet.nozzleDiameter, after.jet.nozzleDiameter, length)
  compare('datum', 'Drawing is', datumText(before), datumText(after))
  changes.push(...wallChanges(before.walls, after.walls, unit))
  changes.push(...jointChanges(before.joints, after.joints, unit))
  compare('note', 'Note', before.note, after.note)
  return changes
}

function partText({ part }: SetupContent): string {
  return `${part.number} ${part.name}`
}

function profileText({ loops }: SetupContent): string {
  const edges = loops.reduce((sum, loop) => sum + loop.length, 0)
  return `${loops.length} ${loops.length === 1 ? 'loop' : 'loops'}, ${edges} edges`
}

function datumText({ datum }: SetupContent): string {
  return datum === 'root' ? 'the root line' : `the ${datum} edge`
}

function wallChanges(before: readonly WallSpec[], after: readonly WallSpec[], unit: DisplayUnit): Change[] {
  return pairs(before, after).flatMap(({ edge, a, b }) => {
    const [was, is] = [a?.facets ?? [], b?.facets ?? []]
    // A wall that is written out as square is the same cut as one left out.
    if (facetsKey(was) === facetsKey(is)) return []
    let [shownWas, shownIs] = [describeWall(was, unit), describeWall(is, unit)]
    if (shownWas === shownIs) [shownWas, shownIs] = [exactText(was), exactText(is)]
    return [{ kind: 'wall' as const, what: edgeName(edge), before: shownWas, after: shownIs, edge }]
  })
}

function facetsKey(facets: readonly FacetSpec[]): string {
  if (facets.every(({ tilt }) => tilt === 0)) return ''
  return exactText(facets)
}

function exactText(facets: readonly FacetSpec[]): string {
  return facets.map(({ depth, tilt }) => `${tilt}° to ${depth} mm`).join(', ')
}

function jointChanges(
  before: readonly JointSpec[],
  after: readonly JointSpec[],
  unit: DisplayUnit,
): Change[] {
  return pairs(before, after).flatMap(({ edge, a, b }) => {
    if ((a && canonicalText(a)) === (b && canonicalText(b))) return []
    const what = `${edgeName(edge)} joint`
    return [{ kind: 'joint' as const, what, before: jointText(a, unit), after: jointText(b, unit), edge }]
  })
}

function jointText(joint: JointSpec | undefined, unit: DisplayUnit): string {
  if (!joint) return 'none'
  const gap = formatLength(joint.rootOpening, unit, { decimals: 4 })
  const mate = joint.mate === 'same' ? 'same prep opposite' : 'square edge opposite'
  return [joint.label, `gap ${gap}`, mate, ...toleranceText(joint, unit)].join(', ')
}

function toleranceText({ tolerance }: JointSpec, unit: DisplayUnit): string[] {
  if (!tolerance) return []
  const length = (mm: number) => formatLength(mm, unit, { decimals: 4, bare: true })
  const band = (
    name: string,
    { plus, minus }: { plus: number; minus: number },
    text: (n: number) => string,
  ) => `${name} +${text(plus)} −${text(minus)}`
  return [
    band('angle', tolerance.angle, (value) => formatNumber(value, { decimals: 4 })),
    band('gap', tolerance.rootOpening, length),
    band('root face', tolerance.rootFace, length),
  ]
}

/** Entries of both lists by edge, in order of loop and edge. */
function pairs<T extends EdgeRef>(
  before: readonly T[],
  after: readonly T[],
): { edge: EdgeRef; a: T | undefined; b: T | undefined }[] {
  const byKey = (list: readonly T[]) => new Map(list.map((item) => [edgeKey(item), item]))
  const [was, is] = [byKey(before), byKey(after)]
  return [...new Map([...was, ...is]).values()]
    .map(({ loop, edge }) => ({ loop, edge }))
    .sort((x, y) => x.loop - y.loop || x.edge - y.edge)
    .map((edge) => ({ edge, a: was.get(edgeKey(edge)), b: is.get(edgeKey(edge)) }))
}
