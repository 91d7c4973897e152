import type { Point } from '../../shared/geometry/types.ts'
import { CornerMove } from '../../shared/passes/types.ts'
import type { WayOut } from '../../shared/way-out/types.ts'
import { DEGREE } from '../support/plates.ts'
import { cornerMark, onPage, planBounds, planLines, planMarks, type Box, type View } from './plan.ts'
import { sceneOf, type Scene } from './scene.ts'
import { drawSection, PANEL, sectionsOf } from './sections.ts'
import { colours, css } from './style.ts'
import { circle, element, figure, line, text } from './svg.ts'
import type { CorpusPart } from '../corpus/parts.ts'

/** One part of the corpus on one page: plan, a glass over its finest place, words beside, walls in section below. */

const PAGE = 1480
const PLAN = { left: 40, top: 96, width: 1010, height: 760 } as const
const WORDS = { left: 1090, step: 21 } as const
/** Side of the glass, and the most sections that are drawn. */
const GLASS = 230
const MOST_SECTIONS = 12

export function pictureOf(part: CorpusPart): string {
  const scene = sceneOf(part)
  const { view, height } = viewOf(planBounds(scene))
  const words = wordsOf(scene)
  const glass = glassOf(scene, view, WORDS.left, PLAN.top + words.height)
  const sections = sectionsOf(scene)
  const top = Math.max(PLAN.top + height, PLAN.top + words.height + (glass ? GLASS + 30 : 0)) + 30
  const perRow = Math.floor((PAGE - 40) / PANEL.width)
  const shown = sections.slice(0, MOST_SECTIONS)
  const bottom = top + 24 + Math.ceil(shown.length / perRow) * PANEL.height
  const parts = [
    element('style', {}, css),
    element('rect', { width: PAGE, height: figure(bottom), fill: colours.paper }),
    text({ x: 40, y: 46 }, part.name, { class: 'title' }),
    text({ x: 40, y: 74 }, part.why, { class: 'why' }),
    element('g', { id: 'plan', 'data-scale': String(view.scale) }, planLines(scene, view)),
    planMarks(scene, view),
    words.svg,
    glass ?? '',
    text({ x: 40, y: top }, walls(sections.length, shown.length), { class: 'head' }),
    ...shown.map((section, i) =>
      drawSection(
        scene,
        section,
        24 + (i % perRow) * PANEL.width,
        top + 12 + Math.floor(i / perRow) * PANEL.height,
      ),
    ),
  ]
  const size = { width: PAGE, height: figure(bottom), viewBox: `0 0 ${PAGE} ${figure(bottom)}` }
  return element('svg', { xmlns: 'http://www.w3.org/2000/svg', ...size }, `\n${parts.join('\n')}\n`)
}

function walls(all: number, shown: number): string {
  const count = all === 1 ? 'The wall' : `The ${all} walls`
  return `${count} in section, with the jets that cut them${shown < all ? ` (${shown} shown)` : ''}`
}

function viewOf(box: Box): { readonly view: View; readonly height: number } {
  const [width, depth] = [box.maxX - box.minX, box.maxY - box.minY]
  // Room for marks and words at the rim.
  const scale = Math.min((PLAN.width - 60) / width, (PLAN.height - 60) / depth)
  const height = scale * depth + 60
  const left = PLAN.left + (PLAN.width - scale * width) / 2 - scale * box.minX
  return { view: { scale, left, top: PLAN.top + 30 + scale * box.maxY }, height }
}

/** Where there is most to see close by: the event, the worst bite, or the shortest edge. */
function finestPlace({ range, interference, body }: Scene): { readonly at: Point; readonly what: string } {
  if (range.event) return { at: range.event.at, what: range.event.kind }
  const bite = interference.bites[0]
  if (bite)
    return { at: bite, what: `bite of ${bite.bite.toPrecision(2)} mm at depth ${bite.depth.toPrecision(3)}` }
  let least = Infinity
  let at: Point = { x: 0, y: 0 }
  for (const { from, to } of body.loops.flat()) {
    const length = Math.hypot(to.x - from.x, to.y - from.y)
    if (length < least) [least, at] = [length, from]
  }
  return { at, what: 'at the shortest edge' }
}

function glassOf(scene: Scene, view: View, left: number, top: number): string | null {
  const { at, what } = finestPlace(scene)
  // Eight kerfs across, or as much as makes it larger than the plan at least threefold.
  const across = Math.min(8 * scene.jet.kerf, GLASS / view.scale / 3)
  const middle = onPage(view, at)
  const side = across * view.scale
  const box = [middle.x - side / 2, middle.y - side / 2, side, side]
    .map((value) => figure(value, 6))
    .join(' ')
  const square = { x: left, y: figure(top), width: GLASS, height: GLASS }
  return [
    element('rect', { ...square, fill: colours.paper }),
    element('svg', { ...square, viewBox: box }, element('use', { href: '#plan' })),
    element('rect', { ...square, class: 'glass', fill: 'none', stroke: colours.soft }),
    text({ x: left, y: top + GLASS + 20 }, `${round(across)} mm across: ${what}`, { class: 'note' }),
  ].join('\n')
}

function wordsOf(scene: Scene): { readonly svg: string; readonly height: number } {
  const rows: string[] = []
  let y = PLAN.top
  const row = (words: string, name?: string, mark?: string) => {
    rows.push(text({ x: WORDS.left + (mark === undefined ? 0 : 46), y }, words, name ? { class: name } : {}))
    if (mark) rows.push(mark)
    y += WORDS.step
  }
  const sample = (name: string) =>
    line({ x: WORDS.left, y: y - 5 }, { x: WORDS.left + 34, y: y - 5 }, { class: name })
  const { part, body, passes, interference, evaluation, jet } = scene
  row(`${body.thickness} mm thick, drawing = ${body.datum}`, 'head')
  row(`kerf ${round(jet.kerf)} mm, taper ${round(jet.taper / DEGREE)}°`)
  if (part.request.head)
    row(`head to ${part.request.head.mechanicalLimit}°, needs ${round(evaluation.neededTilt?.tilt ?? 0)}°`)
  row(
    evaluation.volume === null
      ? 'no volume: ends above the bottom'
      : `${round(evaluation.volume / 1000)} cm³`,
  )
  y += 8
  row('contour at the top', undefined, sample('contour top'))
  row('contour at the bottom', undefined, sample('contour bottom'))
  row('levels between', undefined, sample('contour'))
  row('seam', undefined, sample('seam'))
  row('jet’s axis at the top face', undefined, sample('axis-top'))
  row('jet’s axis at the bottom', undefined, sample('axis-bottom'))
  row('lead', undefined, sample('axis-top lead'))
  row(
    'pierce, with the pass’ number',
    undefined,
    circle({ x: WORDS.left + 17, y: y - 5 }, 3.5, { class: 'pierce' }),
  )
  y += 8
  const count = (kind: number) => Array.from(passes.cornerMoves).filter((move) => move === kind).length
  for (const [kind, name] of [
    [CornerMove.lean, 'lean'],
    [CornerMove.runOut, 'run out'],
    [CornerMove.pivot, 'pivot'],
    [CornerMove.step, 'step'],
  ] as const) {
    if (count(kind) === 0) continue
    row(`${name}: ${count(kind)}`, undefined, cornerMark(kind, { x: WORDS.left + 17, y: y - 5 })!)
  }
  y += 8
  for (const [i, { loop, level, reasons, closed }] of passes.passes.slice(0, 8).entries()) {
    row(`pass ${i + 1}: loop ${loop}, level ${level}${closed ? '' : ', open'}`)
    row(reasons.join(', '), 'note')
  }
  if (passes.passes.length > 8) row(`… ${passes.passes.length} passes`)
  y += 8
  for (const { loop, free, withinKerf } of [scene.waysOut.part, ...scene.waysOut.slugs].slice(0, 6)) {
    const other = free.verdict === withinKerf.verdict ? '' : `, but for the kerf ${free.verdict}`
    row(`${loop === 0 ? 'part' : `slug ${loop}`}: ${way(withinKerf)}${other}`, 'way-word')
  }
  y += 8
  const told = new Map<string, number>()
  const tell = (code: string) => told.set(code, (told.get(code) ?? 0) + 1)
  for (const { code } of evaluation.findings) tell(code)
  for (const { code } of passes.problems) tell(`passes: ${code}`)
  for (const [code, times] of told) row(`${code}${times > 1 ? ` × ${times}` : ''}`, 'alarm')
  if (interference.pairs > 0)
    row(`bites: ${interference.pairs}, worst ${interference.bites[0]!.bite.toPrecision(3)} mm`, 'alarm')
  if (interference.undecided > 0) row(`undecided: ${interference.undecided}`, 'alarm')
  return { svg: rows.join('\n'), height: y - PLAN.top }
}

function way({ verdict, direction }: WayOut): string {
  if (!direction || direction.heading === null) return verdict
  const toward = ((direction.heading / DEGREE + 360) % 360).toFixed(0)
  return `${verdict} ${direction.z > 0 ? 'up' : 'down'} at ${round(direction.angle / DEGREE)}° toward ${toward}°`
}

function round(value: number): string {
  return String(Number(value.toFixed(2)))
}
