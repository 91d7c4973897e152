import { describe, expect, it } from 'vitest'
import { pathFaults, standOff } from '../../../shared/passes/check.ts'
import { passesOf } from '../../../shared/passes/passes.ts'
import { CornerMove, MoveKind, type Passes } from '../../../shared/passes/types.ts'
import { circle, DEGREE, facets, plate, rectangle } from '../../support/plates.ts'

const JET = { kerf: 1, taper: 0.5 * DEGREE }
const NAMES = Object.keys(MoveKind)

function told({ passes, path }: Passes): string[] {
  return passes.map(({ loop, level, closed, first, last, reasons }) => {
    const moves = [...path.move.subarray(first, last + 1)].map((move) => NAMES[move]).join(' ')
    return `${loop} ${level} ${closed ? 'closed' : 'open'} [${reasons.join(' ')}] ${moves}`
  })
}

describe('order of passes', () => {
  it('cuts holes first, bevels while held, and frees the part last', () => {
    const body = plate(20, [rectangle(0, 0, 200, 100), rectangle(60, 40, 40, 30).reverse()], (l, e) =>
      l === 0 && e < 2 ? facets([8, 30], [14, 0], [20, -30]) : facets([20, 0]),
    )
    const passes = passesOf(body, { kerf: 1, taper: 0 }, { tilt: null })
    expect(passes.problems).toEqual([])
    expect(pathFaults(body, { kerf: 1, taper: 0 }, passes, 1e-9)).toEqual([])
    expect(told(passes)).toEqual([
      '1 0 closed [holes-before-outside frees-its-loop] leadIn cut cut cut cut leadOut end'.replace(
        'cut cut cut cut',
        'cut lean lean cut lean lean cut lean lean cut lean lean cut',
      ),
      '0 -1 open [bevel-while-held] leadIn cut lean lean cut runOut end',
      '0 1 open [bevel-while-held] leadIn cut lean lean cut runOut end',
      '0 0 closed [frees-its-loop] leadIn cut lean lean cut lean lean cut lean lean cut runOut end',
    ])
  })

  it('says what is loose when a bevel goes all the way round', () => {
    const body = plate(20, [rectangle(0, 0, 200, 100)], () => facets([12, 30], [20, 0]))
    const passes = passesOf(body, JET, { tilt: null })
    expect(passes.passes.map(({ level, reasons }) => [level, reasons])).toEqual([
      [-1, ['frees-its-loop']],
      [0, ['loose-when-cut']],
    ])
    expect(pathFaults(body, JET, passes, 1e-9)).toEqual([])
  })

  it('ends a bevel at a concave corner along the seam with its neighbour', () => {
    const ell = [
      { x: 0, y: 0 },
      { x: 100, y: 0 },
      { x: 100, y: 40 },
      { x: 40, y: 40 },
      { x: 40, y: 100 },
      { x: 0, y: 100 },
    ]
    const body = plate(10, [ell], (_, e) => (e === 2 ? facets([6, 40], [10, 0]) : facets([10, 0])))
    const passes = passesOf(body, JET, { tilt: null })
    expect(told(passes)[0]).toMatch(/^0 -1 open \[bevel-while-held\] leadIn cut lean.* leadOut end$/)
    const { path } = passes
    const out = passes.passes[0]!.last - 1
    // The jet that leads out leaves the bevel and the square wall beside it.
    const line = { x: path.x[out]!, y: path.y[out]!, p: path.p[out]!, q: path.q[out]! }
    expect(Math.abs(standOff(body, JET, 2, 0, line, 6))).toBeLessThan(1e-9)
    expect(Math.abs(standOff(body, JET, 3, 0, line, 6))).toBeLessThan(1e-9)
    expect(path.x[out + 1]! > path.x[out]! && path.y[out + 1]! > path.y[out]!).toBe(true)
  })
})

describe('corner moves', () => {
  const square = (tilt: number) => plate(20, [rectangle(0, 0, 200, 100)], () => facets([20, tilt]))
  const jet = { kerf: 1, taper: 0 }

  it('leans where the limit allows the seam, else runs out', () => {
    const moves = (limit: number) => passesOf(square(45), jet, { tilt: limit * DEGREE })
    expect([...moves(55).cornerMoves]).toEqual([2, 1, 1, 1])
    expect([...moves(60).leanRefusals]).toEqual([0, 0, 0, 0])
    const tight = moves(50)
    expect([...tight.cornerMoves]).toEqual([2, 2, 2, 2])
    expect([...tight.leanRefusals]).toEqual([1, 1, 1, 1])
    expect(pathFaults(square(45), jet, tight, 1e-9)).toEqual([])
    // Run out to where the bottom corner is finished: t·tan 45° and the jet's half width, the same back.
    const { path, firstStation } = tight
    const back = firstStation[1]!
    expect(path.move[back - 1]).toBe(MoveKind.turn)
    const off = 0.5 * Math.SQRT2
    expect(path.x[back - 1]).toBeCloseTo(200 + off + 20 + off, 12)
    expect(path.y[back - 1]).toBeCloseTo(-off, 12)
    expect(path.y[back]).toBeCloseTo(-off - 20 - off, 12)
  })

  it('keeps the choice that works, and tells the one that does not', () => {
    const corners = new Map([
      [1, CornerMove.pivot],
      [2, CornerMove.lean],
    ])
    const passes = passesOf(square(45), jet, { tilt: 50 * DEGREE }, { corners })
    expect([...passes.cornerMoves]).toEqual([2, 3, 2, 2])
    expect(passes.problems).toEqual([{ code: 'choice-refused', loop: 0, at: 2, level: 0, value: null }])
    expect(pathFaults(square(45), jet, passes, 1e-9)).toEqual([])
    const i = passes.path.move.indexOf(MoveKind.pivot)
    expect([passes.path.cx[i], passes.path.cy[i]]).toEqual([200, 0])
    expect(passes.path.sweep[i]).toBeCloseTo(Math.PI / 2, 14)
  })

  it('has nothing for a concave corner past the limit', () => {
    const body = plate(20, [rectangle(0, 0, 200, 200), rectangle(60, 60, 60, 60).reverse()], (l) =>
      facets([20, l === 1 ? -45 : 0]),
    )
    const passes = passesOf(body, jet, { tilt: 50 * DEGREE })
    expect(passes.problems.map(({ code, loop }) => `${code} ${loop}`)).toEqual(
      Array.from({ length: 4 }, () => 'no-corner-move 1'),
    )
  })
})

describe('leads', () => {
  it('starts in the waste of a round hole, clear of its far side', () => {
    const body = plate(10, [rectangle(-50, -50, 100, 100), circle(0, 0, 4, true)], (l) =>
      facets([10, l === 1 ? -15 : 0]),
    )
    const passes = passesOf(body, { kerf: 1, taper: 0 }, { tilt: null })
    expect(passes.problems).toEqual([])
    const { path } = passes
    expect(Math.hypot(path.x[0]!, path.y[0]!)).toBeLessThan(3)
  })

  it('says so when the jet has no room', () => {
    const body = plate(10, [rectangle(-50, -50, 100, 100), circle(0, 0, 0.55, true)], () => facets([10, 0]))
    const passes = passesOf(body, { kerf: 1, taper: 0 }, { tilt: null })
    expect(passes.problems.map(({ code }) => code)).toEqual(['no-room-to-pierce'])
  })
})
