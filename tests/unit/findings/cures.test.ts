import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import type { Evaluation, EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import type { WallSpec } from '../../../shared/walls/schema.ts'
import type { Finding } from '../../../shared/findings/schema.ts'
import { applyTilt } from '../../../shared/prep/preps.ts'
import { circle, plate, rectangle, tilted, wedge } from '../evaluate/shapes.ts'
import { spread } from '../../support/spread.ts'

const SEED = 20261201

/** The request after one click on the finding's cure; null when it has no number. */
function cured(request: EvaluationRequest, { cure }: Finding): EvaluationRequest | null {
  if (cure?.set) return { ...request, walls: applyTilt(request.walls, cure.set, request.plate.thickness) }
  if (cure?.standoff !== undefined) return { ...request, jet: { ...request.jet, standoff: cure.standoff } }
  return null
}

/** Findings of the same kind at the same place, whichever of the two limits they speak of. */
function stillThere(answer: Evaluation, { code, loop, edge, vertex }: Finding): Finding[] {
  const kind = code.replace(/-over-.*/, '')
  return answer.findings.filter(
    (other) =>
      other.code.replace(/-over-.*/, '') === kind &&
      other.loop === loop &&
      other.edge === edge &&
      other.vertex === vertex,
  )
}

function expectCuresToCure(request: EvaluationRequest): number {
  let clicked = 0
  for (const finding of evaluate(request).findings) {
    const after = cured(request, finding)
    if (!after) continue
    clicked++
    if (finding.code === 'nozzle-touches-plate') {
      expect(evaluate(after).findings.map(({ code }) => code)).not.toContain(finding.code)
    } else {
      expect(stillThere(evaluate(after), finding)).toEqual([])
    }
  }
  return clicked
}

describe('every one-click cure removes its finding', () => {
  const THICKNESS = 4
  const tilt = spread(-72, 72)
  const facets = fc.array(tilt, { minLength: 1, maxLength: 3 }).map((tilts) => {
    const falling = [...tilts].sort((a, b) => b - a)
    return falling.map((own, i) => ({ depth: (THICKNESS * (i + 1)) / falling.length, tilt: own }))
  })
  const profile = fc.oneof(
    fc.constant(rectangle(400, 300)),
    spread(25, 150).map((angle) => wedge(angle, 600)),
  )
  const request = fc
    .record({
      profile,
      walls: fc.array(fc.option(facets, { nil: null }), { minLength: 4, maxLength: 4 }),
      equal: fc.boolean(),
      taper: fc.constantFrom(0, 0.35, -0.2),
      mechanical: spread(40, 65),
      working: fc.option(spread(30, 60), { nil: null }),
    })
    .map(({ profile: loop, walls, equal, taper, mechanical, working }): EvaluationRequest => {
      const specs = loop.flatMap((_, edge): WallSpec[] => {
        const own = equal ? walls[0] : walls[edge]
        return own ? [{ loop: 0, edge, facets: own }] : []
      })
      return plate([loop], specs, THICKNESS, {
        jet: { kerf: 1, taper, standoff: 2, nozzleDiameter: 7.14 },
        head: { mechanicalLimit: mechanical, workingLimit: working },
      })
    })

  it('over limits and clearances of random parts', { timeout: 60_000 }, () => {
    let clicked = 0
    fc.assert(
      fc.property(request, (own) => {
        clicked += expectCuresToCure(own)
      }),
      { seed: SEED, numRuns: 300 },
    )
    // The property must have had something to hold for.
    expect(clicked).toBeGreaterThan(300)
  })

  it('over walls that vanish, split or break through', () => {
    const narrowing = plate([rectangle(100, 60)], tilted([-45, -45, -45, -45], 40), 40)
    const holes = [circle(30, 30, 10), circle(56, 30, 10)]
    const web = plate(
      [rectangle(100, 60), ...holes],
      [...tilted([-40, -40], 20, 1), ...tilted([-40, -40], 20, 2)],
      20,
    )
    const slot = plate(
      [
        [
          ...rectangle(100, 60).slice(0, 3),
          { x: 50, y: 60 },
          { x: 49, y: 12 },
          { x: 48, y: 60 },
          { x: 0, y: 60 },
        ],
      ],
      tilted([-45, 0, 0, 0, 0, 0, 0], 20),
      20,
    )
    for (const own of [narrowing, web, slot]) {
      const [finding] = evaluate(own).findings
      expect(finding?.cure?.set, finding?.message).toBeDefined()
      expect(expectCuresToCure(own)).toBeGreaterThan(0)
    }
  })

  it('over a step between smooth walls', () => {
    const disc = [
      { x: -20, y: 0, bulge: 1 },
      { x: 20, y: 0, bulge: 1 },
    ]
    const own = plate([disc], tilted([20, 0], 10))
    expect(evaluate(own).findings.map(({ code }) => code)).toEqual(['smooth-step', 'smooth-step'])
    expect(expectCuresToCure(own)).toBe(2)
  })
})

describe('a cure is not needlessly small', () => {
  it('0.1° more would pass the limit again', () => {
    const head = { mechanicalLimit: 55 }
    const lone = plate([rectangle(100, 60)], tilted([50, 40, 0, 0], 5), 5, { head })
    const [finding] = evaluate(lone).findings
    const set = finding?.cure?.set
    if (!set) throw new Error('one number cures this corner')
    const more = { ...lone, walls: applyTilt(lone.walls, { ...set, tilt: set.tilt + 0.1 }, 5) }
    expect(evaluate(more).findings.map(({ code }) => code)).toContain('corner-over-mechanical-limit')
  })

  it('gives the wall that leans more, and leaves the other', () => {
    const head = { mechanicalLimit: 55 }
    const answer = evaluate(plate([wedge(135)], tilted([0, 54, 20], 2), 2, { head }))
    const corner = answer.findings.find(({ vertex }) => vertex === 2)
    expect(corner?.cure?.set?.edges ?? [{ loop: 0, edge: 1 }]).toEqual([{ loop: 0, edge: 1 }])
  })
})
