import highsPackage, { type Highs } from 'highs'
import { expect, test } from 'vitest'
import { normalAt } from '../../shared/geometry/segment.ts'
import type { Vertex } from '../../shared/geometry/types.ts'
import type { Body, Facet } from '../../shared/walls/types.ts'
import type { Direction } from '../../shared/way-out/types.ts'
import { wayOut } from '../../shared/way-out/way-out.ts'
import { plate, reversed, seeded, star } from '../support/plates.ts'

/**
 * Source: HiGHS (open-source linear programming, npm `highs`, its simplex). The way out of 2,000 random plates,
 * holes and several facets among them, both signs of tilt, free and within the kerf. Its rules are written here
 * from the facets' 3D normals, not taken from the product.
 */
/** The package's declarations are those of a CommonJS module; what Node loads is the loader itself. */
const loadHighs = highsPackage as unknown as () => Promise<Highs>

const PLATES = 2000
const BATCH = 50
/** Widest room for (x, y) given to HiGHS, mm per mm; no plate here asks for as much. */
const ROOM = 1e3

interface Rule {
  readonly nx: number
  readonly ny: number
  /** n·(x, y) ≤ bound */
  readonly bound: number
}

interface Piece {
  readonly rules: Readonly<Record<'up' | 'down', readonly Rule[]>>
  readonly verdict: string
  readonly direction: Direction | null
}

/** A sheared plate with its walls off by up to `spread`: all four verdicts turn up. */
function randomPlate(seed: number): Body {
  const random = seeded(seed)
  const thickness = 5 + 60 * random()
  const loops: Vertex[][] = [star(random, 3 + Math.floor(9 * random()), 60, 100)]
  if (random() < 0.5) loops.push(reversed(star(random, 3 + Math.floor(5 * random()), 10, 30)))
  const slope = 1.5 * random()
  const heading = 2 * Math.PI * random()
  const spread = 0.8 * random()
  const bias = random() < 0.4 ? 0 : random() - 0.5
  const lean = (x: number, y: number) => slope * (x * Math.cos(heading) + y * Math.sin(heading))
  return plate(thickness, loops, (l, e) => {
    const from = loops[l]![e]!
    const to = loops[l]![(e + 1) % loops[l]!.length]!
    const length = Math.hypot(to.x - from.x, to.y - from.y)
    const along = lean((to.y - from.y) / length, (from.x - to.x) / length)
    const count = random() < 0.7 ? 1 : 2 + Math.floor(2 * random())
    const facets = Array.from({ length: count }, (_, k): Facet => {
      return {
        depth: k === count - 1 ? thickness : (thickness * (k + 1)) / count,
        tilt: Math.atan(bias - along + spread * (random() - 0.5)),
      }
    })
    return { facets }
  })
}

/** e·N ≤ room for every facet, N = (n cos β, sin β) turned round for a slug, divided by cos β. */
function rulesOf(body: Body, loop: number, rise: 1 | -1, kerf: number): Rule[] {
  const side = loop === 0 ? 1 : -1
  return body.loops[loop]!.flatMap((segment, e) => {
    const n = normalAt(segment, 0)
    return body.walls[loop]![e]!.facets.map(({ tilt }) => ({
      nx: side * n.x,
      ny: side * n.y,
      bound: (-rise * side * Math.sin(tilt) + kerf / body.thickness) / Math.cos(tilt),
    }))
  })
}

function pieces(): Piece[] {
  return Array.from({ length: PLATES }, (_, seed) => {
    const body = randomPlate(seed + 1)
    const kerf = 0.5 + (seed % 3) * 0.4
    const ways = wayOut(body, kerf)
    return [ways.part, ...ways.slugs].flatMap(({ loop, free, withinKerf }) =>
      [free, withinKerf].map(({ verdict, direction }, k) => {
        const width = k === 0 ? 0 : kerf
        const rules = { up: rulesOf(body, loop, 1, width), down: rulesOf(body, loop, -1, width) }
        return { rules, verdict, direction }
      }),
    )
  }).flat()
}

interface Programme {
  readonly rules: readonly Rule[]
  /** Smallest (x, y)·aim, or with null the largest margin by which all rules can be kept. */
  readonly aim: { readonly x: number; readonly y: number } | null
}

const term = (value: number, name: string) => `${value < 0 ? '-' : '+'} ${Math.abs(value)} ${name}`

/** Many small programmes as one: nothing couples them, so each is solved on its own. */
function solveAll(highs: Highs, programmes: readonly Programme[]): number[] {
  const objective: string[] = []
  const rows: string[] = []
  const bounds: string[] = []
  for (const [k, { rules, aim }] of programmes.entries()) {
    objective.push(aim ? `${term(aim.x, `x${k}`)} ${term(aim.y, `y${k}`)}` : `- 1 m${k}`)
    for (const { nx, ny, bound } of rules) {
      rows.push(`${term(nx, `x${k}`)} ${term(ny, `y${k}`)}${aim ? '' : ` + m${k}`} <= ${bound}`)
    }
    bounds.push(`-${ROOM} <= x${k} <= ${ROOM}`, `-${ROOM} <= y${k} <= ${ROOM}`)
    if (!aim) bounds.push(`-${ROOM} <= m${k} <= ${ROOM}`)
  }
  const text = `Minimize\n obj: ${objective.join('\n ')}\nSubject To\n ${rows.join('\n ')}\nBounds\n ${bounds.join('\n ')}\nEnd`
  const tolerances = { primal_feasibility_tolerance: 1e-10, dual_feasibility_tolerance: 1e-10 }
  const result = highs.solve(text, { output_flag: false, ...tolerances })
  if (result.Status !== 'Optimal') throw new Error(`HiGHS: ${result.Status}`)
  const value = (name: string) => result.Columns[name]!.Primal
  return programmes.map(({ aim }, k) =>
    aim ? aim.x * value(`x${k}`) + aim.y * value(`y${k}`) : value(`m${k}`),
  )
}

function inBatches(highs: Highs, programmes: readonly Programme[]): number[] {
  const answers: number[] = []
  for (let i = 0; i < programmes.length; i += BATCH) {
    answers.push(...solveAll(highs, programmes.slice(i, i + BATCH)))
  }
  return answers
}

test('2,000 plates: the same verdict, our direction clear to 1e-9, and none steeper', async () => {
  const highs = await loadHighs()
  const all = pieces()
  const margins = inBatches(
    highs,
    all.flatMap(({ rules }) => [
      { rules: rules.up, aim: null },
      { rules: rules.down, aim: null },
    ]),
  )
  /** A margin nearer to 0 than HiGHS resolves says nothing. */
  const unsure = 1e-8
  const straight = (rules: readonly Rule[]) => Math.min(...rules.map((rule) => rule.bound))
  const counts: Record<string, number> = { lifts: 0, drops: 0, slides: 0, trapped: 0, unsure: 0 }
  const steepest: (Programme & { slope: number; exact: boolean })[] = []
  for (const [i, { rules, verdict, direction }] of all.entries()) {
    const up = margins[2 * i]!
    const down = margins[2 * i + 1]!
    const figures = [up, down, straight(rules.up), straight(rules.down)]
    if (figures.some((figure) => Math.abs(figure) < unsure)) {
      counts.unsure!++
      continue
    }
    const expected =
      straight(rules.up) > 0
        ? 'lifts'
        : straight(rules.down) > 0
          ? 'drops'
          : up > 0 || down > 0
            ? 'slides'
            : 'trapped'
    expect(verdict).toBe(expected)
    counts[verdict]!++
    if (!direction) continue
    const slope = { x: direction.x / Math.abs(direction.z), y: direction.y / Math.abs(direction.z) }
    const taken = direction.z > 0 ? rules.up : rules.down
    for (const { nx, ny, bound } of taken)
      expect(nx * slope.x + ny * slope.y - bound).toBeLessThanOrEqual(1e-9)
    if (verdict !== 'slides') continue
    // Ours is the steepest of its side exactly when nothing that keeps the rules reaches less far along it.
    const length = Math.hypot(slope.x, slope.y)
    steepest.push({
      rules: taken,
      aim: { x: slope.x / length, y: slope.y / length },
      slope: length,
      exact: true,
    })
    // And the other side has nothing steeper: nothing within a square well inside our circle.
    const inner = length * Math.SQRT1_2 * (1 - 1e-9)
    const square = [
      { nx: 1, ny: 0, bound: inner },
      { nx: -1, ny: 0, bound: inner },
      { nx: 0, ny: 1, bound: inner },
      { nx: 0, ny: -1, bound: inner },
    ]
    const other = direction.z > 0 ? rules.down : rules.up
    steepest.push({ rules: [...other, ...square], aim: null, slope: 0, exact: false })
  }
  const reached = inBatches(highs, steepest)
  for (const [i, { slope, exact }] of steepest.entries()) {
    if (exact) expect(Math.abs(reached[i]! - slope)).toBeLessThan(1e-7 * Math.max(1, slope))
    else expect(reached[i]!).toBeLessThan(unsure)
  }
  for (const verdict of ['lifts', 'drops', 'slides', 'trapped']) expect(counts[verdict]).toBeGreaterThan(100)
  expect(counts.unsure).toBeLessThan(10)
})
