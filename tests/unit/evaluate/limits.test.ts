import { describe, expect, it } from 'vitest'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import { plate, polygon, rectangle, tilted, wedge } from './shapes.ts'

const all = (tilt: number, sides = 4) => Array.from({ length: sides }, () => tilt)

describe('two equal walls at a square corner', () => {
  it('of 45° need 54.74° along the seam', () => {
    const answer = evaluate(plate([rectangle(100, 60)], tilted(all(45), 5), 5))
    for (const { seamTilt } of answer.corners) expect(seamTilt).toBeCloseTo(54.7356103172, 8)
  })

  it('of 55° pass a 60° head at the corner although no edge does', () => {
    const head = { mechanicalLimit: 60 }
    const answer = evaluate(plate([rectangle(100, 60)], tilted(all(55), 5), 5, { head }))
    expect(answer.findings.map(({ code }) => code)).toEqual(Array(4).fill('corner-over-mechanical-limit'))
    expect(answer.findings[0]).toMatchObject({
      severity: 'stop',
      loop: 0,
      vertex: 0,
      value: expect.closeTo(63.659, 3),
      limit: 60,
      message: 'Corner C1 needs 63.66°; the mechanical limit is 60°. Walls e4 55° and e1 55° meet at 90°.',
      cure: {
        message: 'Set e4 and e1 to 50.7° (at most 50.77°).',
        set: {
          edges: [
            { loop: 0, edge: 3 },
            { loop: 0, edge: 0 },
          ],
          facet: 0,
          tilt: 50.7,
          most: expect.closeTo(50.7685, 4) as number,
        },
      },
    })
  })

  it('keep to the working limit in the cure, and say what the head itself allows', () => {
    const head = { mechanicalLimit: 60, workingLimit: 55 }
    const answer = evaluate(plate([rectangle(100, 60)], tilted(all(55), 5), 5, { head }))
    expect(answer.findings[0]).toMatchObject({ code: 'corner-over-mechanical-limit', limit: 60 })
    expect(answer.findings[0]?.cure?.message).toBe(
      'Set e4 and e1 to 45.2° (at most 45.28°; the head itself allows 50.77°).',
    )
  })
})

describe('working and mechanical limits', () => {
  const request = (tilt: number, head: { mechanicalLimit: number; workingLimit?: number | null }) =>
    plate([rectangle(100, 60)], tilted([tilt, 0, 0, 0], 5), 5, { head })

  it('a wall exactly at a limit is allowed', () => {
    for (const limit of [30, 37.5, 45, 55, 60]) {
      expect(evaluate(request(limit, { mechanicalLimit: limit, workingLimit: limit })).findings).toEqual([])
    }
  })

  it('over the working limit a person decides; over the mechanical one it stops', () => {
    const head = { mechanicalLimit: 60, workingLimit: 50 }
    expect(evaluate(request(52, head)).findings[0]).toMatchObject({
      code: 'edge-over-working-limit',
      severity: 'warning',
      value: 52,
      limit: 50,
      message: 'Edge e1 needs 52°; the working limit is 50°.',
      cure: { message: 'Set e1 to 50°.', set: { edges: [{ loop: 0, edge: 0 }], facet: 0, tilt: 50 } },
    })
    expect(evaluate(request(62, head)).findings[0]).toMatchObject({
      code: 'edge-over-mechanical-limit',
      severity: 'stop',
      limit: 60,
      cure: { set: { tilt: 50 } },
    })
  })

  it('no head, no findings about limits', () => {
    expect(evaluate(plate([rectangle(100, 60)], tilted(all(80), 1), 1)).findings).toEqual([])
  })

  it('taper counts: the jet leans by wall less taper', () => {
    const head = { mechanicalLimit: 60 }
    const jet = { taper: 1 }
    const outward = plate([rectangle(100, 60)], tilted([60.5, 0, 0, 0], 5), 5, { head, jet })
    expect(evaluate(outward).findings).toEqual([])
    const inward = evaluate(plate([rectangle(100, 60)], tilted([-59.5, 0, 0, 0], 5), 5, { head, jet }))
    expect(inward.findings[0]).toMatchObject({
      code: 'edge-over-mechanical-limit',
      value: 60.5,
      cure: { set: { tilt: -59 } },
    })
  })
})

/** Derived rows (wall tilts, interior angle → seam); the corner asked is vertex 2 of the wedge, edges 1 and 2. */
describe('seams of unlike walls', () => {
  it.each([
    [30, 30, 90, 39.2315],
    [22.5, 22.5, 90, 30.3612],
    [37.5, 37.5, 90, 47.3388],
    [30, 30, 60, 49.1066],
    [45, 45, 60, 63.4349],
    [45, 30, 90, 49.1066],
    [30, 0, 90, 30],
    [30, 30, 120, 33.6901],
  ])('%d° and %d° meeting at %d°', (one, two, angle, expected) => {
    const answer = evaluate(plate([wedge(angle)], tilted([0, one, two], 2), 2))
    expect(answer.corners[2]?.interiorAngle).toBeCloseTo(angle, 9)
    expect(Math.abs((answer.corners[2]?.seamTilt ?? 0) - expected)).toBeLessThanOrEqual(0.00006)
  })
})

/** Derived: the smallest interior angle of two equal walls under a limit. */
describe('smallest interior angle through the front door', () => {
  const rows: [number, number, number][] = [
    [45, 50, 114.09],
    [45, 55, 88.89],
    [45, 60, 70.53],
    [37.5, 50, 80.16],
    [37.5, 55, 65.0],
    [37.5, 60, 52.59],
    [30, 50, 57.95],
    [30, 55, 47.69],
    [30, 60, 38.94],
  ]
  it.each(rows)('walls of %d° under %d°: %d°', (tilt, limit, smallest) => {
    const head = { mechanicalLimit: limit }
    const codes = (angle: number) =>
      evaluate(plate([wedge(angle)], tilted([0, tilt, tilt], 2), 2, { head }))
        .findings.filter(({ vertex }) => vertex === 2)
        .map(({ code }) => code)
    // The table is rounded to 0.01°.
    expect(codes(smallest + 0.01)).toEqual([])
    expect(codes(smallest - 0.01)).toEqual(['corner-over-mechanical-limit'])
  })
})

/**
 * Published mitre table for a sloped-side box of n sides (bench-saw manual 315.21212, table of compound mitres): wall
 * tilt, sides, mitre M and blade tilt B. tan(seam) = √(tan²β + (tan M/cos β)²); the dihedral between walls is 180° − 2B.
 */
describe('published compound mitres', () => {
  const rad = (degrees: number) => (degrees * Math.PI) / 180
  it.each([
    [60, 4, 40.89, 20.7, 67.792],
    [60, 6, 26.57, 14.48, 63.435],
    [60, 8, 19.73, 11.03, 61.924],
    [50, 4, 37.45, 27.03, 59.318],
    [50, 6, 23.86, 18.75, 53.995],
    [50, 8, 17.6, 14.24, 52.216],
    [45, 4, 35.26, 30.0, 54.736],
    [45, 6, 22.21, 20.7, 49.107],
    [45, 8, 16.32, 15.7, 47.266],
    [40, 4, 32.73, 32.8, 49.879],
    [40, 6, 20.36, 22.52, 44.095],
    [40, 8, 14.91, 17.05, 42.247],
  ])('walls of %d° on a box of %d sides', (tilt, sides, mitre, blade, tabled) => {
    const answer = evaluate(plate([polygon(sides, 100)], tilted(all(tilt, sides), 2), 2))
    const seam = answer.corners[0]?.seamTilt ?? 0
    // The mitre is printed to 0.01°; what half of that does to the seam is the limit of the comparison.
    const fromMitre = (m: number) =>
      Math.atan(Math.hypot(Math.tan(rad(tilt)), Math.tan(rad(m)) / Math.cos(rad(tilt)))) / rad(1)
    expect(seam).toBeGreaterThanOrEqual(fromMitre(mitre - 0.0051))
    expect(seam).toBeLessThanOrEqual(fromMitre(mitre + 0.0051))
    expect(Math.abs(seam - tabled)).toBeLessThanOrEqual(0.00051)
    // The angle between the walls' normals is 2B.
    const turn = rad(360 / sides)
    const between = Math.sin(rad(tilt)) ** 2 + Math.cos(rad(tilt)) ** 2 * Math.cos(turn)
    expect(Math.abs(Math.acos(between) / rad(1) - 2 * blade)).toBeLessThanOrEqual(0.0103)
  })

  it("agrees with Machinery's Handbook, compound angles: 63° and 54° at a square corner", () => {
    const answer = evaluate(plate([rectangle(100, 60)], tilted([63, 54, 0, 0], 2), 2))
    expect(Math.abs((answer.corners[1]?.seamTilt ?? 0) - 67.356)).toBeLessThanOrEqual(0.00051)
    // The handbook's own figure: cot C = 2.3971.
    expect(Math.abs(Math.tan(rad(answer.corners[1]?.seamTilt ?? 0)) - 2.3971)).toBeLessThanOrEqual(0.00006)
  })
})
