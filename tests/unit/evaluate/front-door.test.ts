import { describe, expect, it } from 'vitest'
import { evaluate, evaluatedMesh } from '../../../shared/evaluate/evaluate.ts'
import { evaluationSchema, type EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import { circle, plate, rectangle, tilted, turned } from './shapes.ts'

const tan = (degrees: number) => Math.tan((degrees * Math.PI) / 180)

describe('evaluate', () => {
  it('answers what the schema promises', () => {
    const request = plate([rectangle(100, 60), circle(50, 30, 8)], tilted([30, 0, -20, 0], 10), 10, {
      jet: { kerf: 1, taper: 0.3, standoff: 3, nozzleDiameter: 7.14 },
      head: { mechanicalLimit: 60, workingLimit: 55 },
    })
    expect(evaluationSchema.parse(evaluate(request))).toBeTruthy()
  })

  it('moves the bottom edge by t·tan β, and gives lengths, contours and volume', () => {
    const answer = evaluate(plate([rectangle(100, 60)], tilted([30, 0, 0, 0], 12), 12))
    const offset = 12 * tan(30)
    expect(answer.edges[0]).toMatchObject({
      loop: 0,
      edge: 0,
      topLength: 100,
      bottomLength: expect.closeTo(100, 9),
      bottomOffset: expect.closeTo(offset, 12),
      jetTilts: [30],
      wholeTilt: 30,
      metalPath: expect.closeTo(12 / Math.cos(Math.PI / 6), 9),
    })
    expect(answer.edges[1]?.bottomLength).toBeCloseTo(60 + offset, 9)
    expect(answer.contours.map(({ depth }) => depth)).toEqual([0, 12])
    expect(answer.contours[1]?.loops[0]?.map(({ y }) => y)).toEqual([
      expect.closeTo(-offset, 9),
      expect.closeTo(-offset, 9),
      60,
      60,
    ])
    expect(answer.volume).toBeCloseTo(100 * 60 * 12 + (100 * 12 * offset) / 2, 6)
    expect(answer.firstEvent).toBeNull()
  })

  it('gives contours at every facet end, arcs as arcs', () => {
    const hole = circle(50, 30, 8)
    const walls = [0, 1].map((edge) => ({
      loop: 1,
      edge,
      facets: [
        { depth: 4, tilt: 45 },
        { depth: 10, tilt: 0 },
      ],
    }))
    const answer = evaluate(plate([rectangle(100, 60), hole], walls))
    expect(answer.contours.map(({ depth }) => depth)).toEqual([0, 4, 10])
    const [, level, bottom] = answer.contours
    expect(level?.loops[1]).toEqual([
      { x: expect.closeTo(46, 9), y: expect.closeTo(30, 9), bulge: expect.closeTo(-1, 9) },
      { x: expect.closeTo(54, 9), y: expect.closeTo(30, 9), bulge: expect.closeTo(-1, 9) },
    ])
    expect(bottom?.loops).toEqual(level?.loops)
  })

  it('finds the corner that needs more than its edges', () => {
    const answer = evaluate(plate([rectangle(100, 60)], tilted([45, 45, 0, 0], 10)))
    expect(answer.corners[1]).toMatchObject({
      vertex: 1,
      kind: 'convex',
      seamTilt: expect.closeTo(54.7356103, 6),
    })
    expect(answer.neededTilt).toEqual({ tilt: expect.closeTo(54.7356103, 6), at: { loop: 0, vertex: 1 } })
    expect(answer.findings).toEqual([])
  })

  it('tilts the jet by wall less taper, in corners too', () => {
    const answer = evaluate(
      plate([rectangle(100, 60)], tilted([30, 30, 0, 0], 10), 10, { jet: { taper: 1 } }),
    )
    expect(answer.edges.map(({ jetTilts }) => jetTilts)).toEqual([[29], [29], [-1], [-1]])
    const [, corner] = answer.corners
    expect(tan(corner?.seamTilt ?? 0)).toBeCloseTo(tan(30) * Math.SQRT2, 9)
    // The axis a of the jet stands at the taper to both walls, a·N = −sin τ. By symmetry a = (s, s, −√(1 − 2s²)), so
    // s cos β − √(1 − 2s²) sin β = −sin τ, solved here by halving.
    const sine = (degrees: number) => Math.sin((degrees * Math.PI) / 180)
    const standsOff = (s: number) => s * sine(60) - Math.sqrt(1 - 2 * s * s) * sine(30) + sine(1)
    let [low, high] = [0, 0.7]
    for (let i = 0; i < 60; i++) {
      const middle = (low + high) / 2
      if (standsOff(middle) < 0) low = middle
      else high = middle
    }
    const whole = (Math.asin(Math.SQRT2 * low) * 180) / Math.PI
    expect(corner?.jetTilt).toBeCloseTo(whole, 9)
  })

  it('stops at the first event and says so', () => {
    // Four walls closing at 45° meet when they have come 30 mm in.
    const answer = evaluate(plate([rectangle(100, 60)], tilted([-45, -45, -45, -45], 40), 40))
    expect(answer.firstEvent?.depth).toBeCloseTo(30, 9)
    expect(answer.contours.map(({ depth }) => depth)).toEqual([0])
    expect(answer.volume).toBeNull()
    expect(answer.edges.every(({ bottomLength }) => bottomLength === null)).toBe(true)
    expect(answer.findings[0]).toMatchObject({ severity: 'stop', limit: 40 })
  })

  it('snaps a last facet that misses the thickness by rounding', () => {
    const thickness = 0.4 * 25.4
    const off = thickness + 5e-7
    const answer = evaluate(
      plate([rectangle(100, 60)], [{ loop: 0, edge: 0, facets: [{ depth: off, tilt: 30 }] }], thickness),
    )
    expect(answer.contours.map(({ depth }) => depth)).toEqual([0, thickness])
  })
})

describe('loops that come in the other way round', () => {
  const outer = [
    { x: 0, y: 0 },
    { x: 100, y: 0 },
    { x: 100, y: 60, bulge: 0.2 },
    { x: 10, y: 50 },
  ]
  const hole = [
    { x: 30, y: 20 },
    { x: 30, y: 40 },
    { x: 60, y: 30 },
  ]
  const straight = plate([outer, hole], [...tilted([30, 20, 10, -5], 8), ...tilted([5, 0, 12], 8, 1)], 8)
  /** The same solid: outer clockwise, hole counter-clockwise; walls follow their edges. */
  const reversed: EvaluationRequest = {
    ...straight,
    loops: straight.loops.map(turned),
    walls: straight.walls.map((wall) => ({
      ...wall,
      edge: (straight.loops[wall.loop]?.length ?? 0) - 1 - wall.edge,
    })),
  }

  it('keep the numbering of the caller in edges and corners', () => {
    const [a, b] = [evaluate(straight), evaluate(reversed)]
    expect(b.volume).toBeCloseTo(a.volume ?? 0, 6)
    for (const [i, edge] of b.edges.entries()) {
      expect(edge).toMatchObject({ loop: b.edges[i]?.loop, edge: edge.edge })
      const n = reversed.loops[edge.loop]?.length ?? 0
      const twin = a.edges.find((other) => other.loop === edge.loop && other.edge === n - 1 - edge.edge)
      expect(edge.jetTilts).toEqual(twin?.jetTilts)
      expect(edge.topLength).toBeCloseTo(twin?.topLength ?? 0, 9)
      expect(edge.bottomLength).toBeCloseTo(twin?.bottomLength ?? 0, 9)
    }
    for (const corner of b.corners) {
      const n = reversed.loops[corner.loop]?.length ?? 0
      const twin = a.corners.find(
        (other) => other.loop === corner.loop && other.vertex === (n - corner.vertex) % n,
      )
      expect(corner.interiorAngle).toBeCloseTo(twin?.interiorAngle ?? 0, 9)
      expect(corner.seamTilt).toBeCloseTo(twin?.seamTilt ?? 0, 9)
    }
    expect(b.edges.map(({ loop, edge }) => [loop, edge])).toEqual(
      a.edges.map(({ loop, edge }) => [loop, edge]),
    )
    expect(b.corners.map(({ loop, vertex }) => [loop, vertex])).toEqual(
      a.corners.map(({ loop, vertex }) => [loop, vertex]),
    )
  })

  it('have their length measured on the edge that was named', () => {
    const answer = evaluate(reversed)
    for (const { loop, edge, topLength } of answer.edges) {
      const vertices = reversed.loops[loop] ?? []
      const [from, to] = [vertices[edge], vertices[(edge + 1) % vertices.length]]
      if (!from || !to || from.bulge) continue
      expect(topLength).toBeCloseTo(Math.hypot(to.x - from.x, to.y - from.y), 9)
    }
  })

  it('have contours with the material on the left', () => {
    const [a, b] = [evaluate(straight), evaluate(reversed)]
    expect(b.contours).toHaveLength(2)
    for (const [i, contour] of b.contours.entries()) {
      for (const [l, loop] of contour.loops.entries()) {
        for (const [v, { x, y, bulge }] of loop.entries()) {
          const twin = a.contours[i]?.loops[l]?.[v]
          expect(x).toBeCloseTo(twin?.x ?? Number.NaN, 9)
          expect(y).toBeCloseTo(twin?.y ?? Number.NaN, 9)
          expect(bulge ?? 0).toBeCloseTo(twin?.bulge ?? 0, 9)
        }
      }
    }
  })

  it('have mesh faces named as the caller names edges', () => {
    const mesh = evaluatedMesh(reversed)
    const walls = mesh.faces.flatMap((face) => (face.kind === 'wall' ? [`${face.loop}-${face.edge}`] : []))
    expect(new Set(walls).size).toBe(7)
    // Wherever a straight wall touches the top face, it does so on the line of the edge that it is named after.
    let touching = 0
    for (const [t, index] of mesh.faceOfTriangle.entries()) {
      const face = mesh.faces[index]
      if (face?.kind !== 'wall') continue
      const vertices = reversed.loops[face.loop] ?? []
      const [from, to] = [vertices[face.edge], vertices[(face.edge + 1) % vertices.length]]
      if (!from || !to || from.bulge) continue
      for (const v of mesh.indices.subarray(3 * t, 3 * t + 3)) {
        const [x = 0, y = 0, z = 0] = mesh.positions.subarray(3 * v, 3 * v + 3)
        if (z !== 0) continue
        touching++
        const across = (x - from.x) * (to.y - from.y) - (y - from.y) * (to.x - from.x)
        expect(Math.abs(across) / Math.hypot(to.x - from.x, to.y - from.y)).toBeLessThan(1e-9)
      }
    }
    expect(touching).toBeGreaterThan(12)
    // The top line of an edge runs between the caller's own vertices.
    for (const line of mesh.lines) {
      if (line.kind !== 'top' || line.edge === null) continue
      const vertices = reversed.loops[line.loop] ?? []
      const ends = [vertices[line.edge], vertices[(line.edge + 1) % vertices.length]]
      const first = { x: line.points[0], y: line.points[1] }
      const near = ends.some(
        (end) => end && Math.hypot(end.x - (first.x ?? 0), end.y - (first.y ?? 0)) < 1e-9,
      )
      expect(near).toBe(true)
    }
  })

  it('find the same event at the named edge', () => {
    const thick = (request: EvaluationRequest): EvaluationRequest => ({
      ...request,
      plate: { thickness: 60 },
      walls: request.walls.map((wall) => ({ ...wall, facets: [{ depth: 60, tilt: -30 }] })),
    })
    const [a, b] = [evaluate(thick(straight)).firstEvent, evaluate(thick(reversed)).firstEvent]
    if (!a || !b) throw new Error('walls that close in meet')
    expect(b.depth).toBeCloseTo(a.depth, 9)
    expect(b.kind).toBe(a.kind)
    expect([b.at.x, b.at.y]).toEqual([expect.closeTo(a.at.x, 6), expect.closeTo(a.at.y, 6)])
  })
})
