import { describe, expect, it } from 'vitest'
import { pathFaults, standOff } from '../../../shared/passes/check.ts'
import { jetAt } from '../../../shared/passes/jet-at.ts'
import { seamJetTilt, sideSlope } from '../../../shared/passes/jet-lines.ts'
import { passesOf } from '../../../shared/passes/passes.ts'
import { CornerMove, MoveKind, type Passes } from '../../../shared/passes/types.ts'
import type { Body } from '../../../shared/walls/types.ts'
import { circle, DEGREE, facets, plate, rectangle, seeded, star } from '../../support/plates.ts'

const FREE = { tilt: null }

describe('the jet square to a wall, leaning, and along a seam', () => {
  it('takes out the taper', () => {
    expect(sideSlope(30 * DEGREE, 1 * DEGREE, 0)).toBeCloseTo(Math.tan(29 * DEGREE), 14)
    expect(seamJetTilt(45 * DEGREE, 45 * DEGREE, Math.PI / 2, 0)! / DEGREE).toBeCloseTo(54.7356103, 7)
    // Square walls with taper: the jet must turn inward along the seam by more than τ.
    expect(seamJetTilt(0, 0, Math.PI / 2, 1 * DEGREE)).toBeGreaterThan(1 * DEGREE)
    expect(seamJetTilt(0, 0, 179 * DEGREE, 1 * DEGREE)).toBeNull()
  })

  it('has the axis at sin τ to both normals', () => {
    const random = seeded(4)
    for (let i = 0; i < 60; i++) {
      const [b1, b2] = [(random() - 0.5) * 2, (random() - 0.5) * 2]
      const tau = (random() - 0.3) * 0.05
      const turn = (random() - 0.5) * 5
      const body = wedge(turn, b1, b2)
      const passes = passesOf(body, { kerf: 1, taper: tau }, FREE, {
        corners: new Map([[1, CornerMove.lean]]),
      })
      const at = passes.firstStation[1]!
      if (passes.leanRefusals[1] !== 0) continue
      for (const depth of [0, 3, 10]) {
        const line = jetAt(passes.path, at, 0)
        for (const g of [0, 1]) {
          expect(Math.abs(standOff(body, { kerf: 1, taper: tau }, g, 0, line, depth))).toBeLessThan(1e-9)
        }
      }
    }
  })
})

/** A big triangle or quadrilateral whose corner 1 turns by `turn`. */
function wedge(turn: number, before: number, after: number): Body {
  const r = 4000
  const tip = { x: r * Math.cos(turn), y: r * Math.sin(turn) }
  const wall = (tilt: number) => ({ facets: [{ depth: 10, tilt }] })
  const back =
    turn > 0
      ? [{ x: tip.x - r, y: tip.y + 10 * r }]
      : [
          { x: tip.x + 10 * r, y: tip.y + 9 * r },
          { x: -r, y: 12 * r },
        ]
  return plate(10, [[{ x: -r, y: 0 }, { x: 0, y: 0 }, tip, ...back]], (_, e) =>
    wall(e === 0 ? before : e === 1 ? after : 0),
  )
}

function movesOf({ path }: Passes): string {
  const names = Object.keys(MoveKind)
  return [...path.move].map((move) => names[move]).join(' ')
}

describe('a square plate at 30°', () => {
  const body = plate(20, [rectangle(0, 0, 100, 100)], () => facets([20, 30]))

  it('starts at a corner and leans round the others', () => {
    const passes = passesOf(body, { kerf: 1, taper: 0 }, FREE)
    expect(movesOf(passes)).toBe('leadIn cut lean lean cut lean lean cut lean lean cut runOut end')
    const { path, cornerMoves, firstStation } = passes
    expect([...cornerMoves]).toEqual([2, 1, 1, 1])
    // Axis r/cos β outside the edge, seam jet at w(1, −1) for the corner at (100, 0).
    const off = 0.5 / Math.cos(30 * DEGREE)
    const w = Math.tan(30 * DEGREE)
    const i = firstStation[1]!
    expect([path.x[i], path.y[i], path.p[i], path.q[i]].map((n) => n!.toFixed(12))).toEqual(
      [100 + off, -off, w, -w].map((n) => n.toFixed(12)),
    )
  })

  it('joins, and keeps on its walls', () => {
    for (const taper of [0, 1 * DEGREE, -0.5 * DEGREE]) {
      const jet = { kerf: 1, taper }
      expect(pathFaults(body, jet, passesOf(body, jet, FREE), 1e-9)).toEqual([])
    }
  })
})

describe('random plates', () => {
  it('keep every cut on its wall, and never lean into it', () => {
    const random = seeded(11)
    for (let round = 0; round < 25; round++) {
      const n = 5 + Math.floor(random() * 12)
      const tilts = Array.from({ length: n }, () => (random() - 0.5) * 80)
      const hole = circle(0, 0, 12 + 6 * random(), true)
      const body = plate(8, [star(random, n, 120, 220), hole], (l, e) =>
        facets([8, l === 0 ? tilts[e]! : 20]),
      )
      const jet = { kerf: 0.6 + random(), taper: (random() - 0.4) * 2 * DEGREE }
      const passes = passesOf(body, jet, FREE)
      expect(pathFaults(body, jet, passes, 1e-9)).toEqual([])
      const { path } = passes
      for (let i = 0; i < path.count; i++) {
        if (path.move[i] !== MoveKind.lean) continue
        for (const part of [0, 0.25, 0.5, 0.75, 1]) {
          const off = standOff(body, jet, path.edge[i]!, path.facet[i]!, jetAt(path, i, part), 8)
          expect(off).toBeGreaterThan(-1e-9)
          expect(off).toBeLessThan(0.01)
        }
      }
    }
  })
})
