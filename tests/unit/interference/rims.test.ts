import { expect, it } from 'vitest'
import { rimsOf } from '../../../shared/interference/rims.ts'
import { MoveKind } from '../../../shared/passes/types.ts'
import { pathOfStations } from './paths.ts'

/** Two stations: upright, and leaning by 45° toward +x. */
const passes = {
  path: pathOfStations([
    { x: 1, y: 2, p: 0, q: 0, move: MoveKind.lean, edge: 0 },
    { x: 8, y: 9, p: 1, q: 0, move: MoveKind.end, edge: 0 },
  ]),
  passes: [{ loop: 0, first: 0, last: 1, closed: false, level: 0, reasons: [] }],
}

it('the steepest jet brings both rims lowest; by hand at 45°', () => {
  // Nozzle: (3 − 4)/√2. Head: rim 40 wide, 15 above the tip: (3 + 15 − 20)/√2.
  const head = { nozzle: { diameter: 8, standoff: 3 }, cone: { diameter: 40, above: 15 } }
  const [nozzle, cone] = rimsOf(passes, head)
  expect(nozzle).toMatchObject({ rim: 'nozzle', station: 1, pass: 0, x: 8, y: 9 })
  expect(nozzle!.clearance).toBeCloseTo(-1 / Math.SQRT2, 12)
  expect(cone!.clearance).toBeCloseTo(-2 / Math.SQRT2, 12)
  expect(cone!.rim).toBe('head')
})

it('the stand-off that is told cures: the rim just touches', () => {
  const head = { nozzle: { diameter: 8, standoff: 3 }, cone: { diameter: 40, above: 15 } }
  for (const [k, { standoff }] of rimsOf(passes, head).entries()) {
    const cured = rimsOf(passes, { ...head, nozzle: { diameter: 8, standoff } })[k]!
    expect(cured.clearance).toBeCloseTo(0, 12)
  }
})

it('says nothing without passes', () => {
  const none = { path: pathOfStations([]), passes: [] }
  expect(rimsOf(none, { nozzle: { diameter: 8, standoff: 3 }, cone: null })).toEqual([])
})
