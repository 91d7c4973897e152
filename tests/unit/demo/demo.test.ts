import { describe, expect, it } from 'vitest'
import { demoHeads, demoParts, type DemoPart, type DemoSetup } from '../../../server/demo/index.ts'
import { readDrawing } from '../../../shared/drawing/read.ts'
import type { Reading, ReadLoop } from '../../../shared/drawing/schema.ts'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import { wallSchema } from '../../../shared/walls/schema.ts'
import { type Evaluation } from '../../../shared/evaluate/schema.ts'
import { loopFromVertices } from '../../../shared/geometry/bulge.ts'
import { normalAt } from '../../../shared/geometry/segment.ts'
import { jointSchema } from '../../../shared/setup/schema.ts'

const part = (number: string): DemoPart => {
  const found = demoParts.find((candidate) => candidate.number === number)
  if (!found) throw new Error(`no demo part ${number}`)
  return found
}

const read = ({ dxf }: DemoPart): Reading => readDrawing(new TextEncoder().encode(dxf), {})

function loopsOf(demo: DemoPart): ReadLoop['vertices'][] {
  const reading = read(demo)
  const picked = reading.parts[demo.pick]
  if (!picked) throw new Error(`${demo.number} has no part ${demo.pick}`)
  return [picked.outer, ...picked.holes].map((index) => reading.loops[index]?.vertices ?? [])
}

function judged(demo: DemoPart, setup: DemoSetup): Evaluation {
  const loops = loopsOf(demo)
  const head = demoHeads.find((candidate) => candidate.name === setup.headName)
  if (!head) throw new Error(`no demo head ${setup.headName}`)
  const { mechanicalLimit, workingLimit } = head
  return evaluate({
    plate: { thickness: setup.plate.thickness },
    loops,
    datum: setup.datum,
    walls: setup.walls(loops),
    jet: setup.jet,
    head: { mechanicalLimit, workingLimit },
  })
}

function firstOf(number: string): { demo: DemoPart; setup: DemoSetup; evaluation: Evaluation } {
  const demo = part(number)
  const [setup] = demo.setups
  if (!setup) throw new Error(`${number} has no set-up`)
  return { demo, setup, evaluation: judged(demo, setup) }
}

const radians = (degrees: number) => (degrees * Math.PI) / 180

describe('demo drawings', () => {
  it('are seven parts with numbers and files of their own', () => {
    expect(demoParts).toHaveLength(7)
    for (const key of ['number', 'name', 'fileName'] as const) {
      expect(new Set(demoParts.map((demo) => demo[key])).size).toBe(7)
    }
  })

  for (const demo of demoParts) {
    it(`${demo.number} is read without a doubt`, () => {
      const reading = read(demo)
      expect(reading.parts).toHaveLength(1)
      expect(reading.open).toEqual([])
      expect(reading.unit.declared).not.toBeNull()
      expect(reading.unit.suggested).toBeNull()
      expect(reading.notices.filter((notice) => notice.severity !== 'note')).toEqual([])
    })
  }

  it('show what the importer can read: blocks, arcs, bulges, inches, layers, old polylines', () => {
    const readings = demoParts.map(read)
    const types = new Set(readings.flatMap((reading) => reading.entities.map((entity) => entity.type)))
    for (const type of ['LINE', 'ARC', 'CIRCLE', 'LWPOLYLINE', 'POLYLINE', 'TEXT'])
      expect(types).toContain(type)
    expect(readings.some((reading) => reading.unit.declared === 'in')).toBe(true)
    expect(readings.flatMap((reading) => reading.notices).some((n) => n.code === 'block-expanded')).toBe(true)
    expect(readings.some((reading) => reading.layers.length > 1)).toBe(true)
  })
})

describe('demo set-ups', () => {
  for (const demo of demoParts) {
    for (const setup of demo.setups) {
      it(`${demo.number} ${setup.name} is sound, and can be cut unless it is a draft`, () => {
        const loops = loopsOf(demo)
        for (const wall of setup.walls(loops)) expect(wallSchema.safeParse(wall).error).toBeUndefined()
        for (const joint of setup.joints(loops)) expect(jointSchema.safeParse(joint).error).toBeUndefined()
        const grave = judged(demo, setup).findings.filter((finding) => finding.severity === 'stop')
        if (setup.state === 'draft') expect(grave.length).toBeGreaterThan(0)
        else expect(grave).toEqual([])
      })
    }
  }

  it('there is work in every state', () => {
    const states = demoParts.flatMap((demo) => demo.setups.map((setup) => setup.state))
    expect(new Set(states)).toEqual(new Set(['draft', 'submitted', 'approved']))
  })

  it('bearing plate: four sides, four preps, bolt holes square', () => {
    const { demo, setup } = firstOf('BP-04')
    const loops = loopsOf(demo)
    const walls = setup.walls(loops)
    expect(walls.map((wall) => wall.loop)).toEqual([0, 0, 0, 0])
    expect(new Set(walls.map((wall) => wall.edge)).size).toBe(4)
    expect(new Set(walls.map((wall) => JSON.stringify(wall.facets))).size).toBe(4)
    expect(loops).toHaveLength(8)
  })

  it('ring flange: both rings of the bottom are the top ones moved by the bevel', () => {
    const { evaluation, setup } = firstOf('RF-11')
    const bottom = evaluation.contours.at(-1)
    expect(bottom?.depth).toBe(setup.plate.thickness)
    const radius = (loop: number) =>
      Math.max(...(bottom?.loops[loop] ?? []).map(({ x, y }) => Math.hypot(x, y)))
    expect(radius(0)).toBeCloseTo(200 + 17 * Math.tan(radians(30)), 9)
    expect(radius(1)).toBeCloseTo(130 - 18 * Math.tan(radians(35)), 9)
  })

  it('gusset: concave corners, one of them between two bevels', () => {
    const { evaluation } = firstOf('GS-07')
    const concave = evaluation.corners.filter((corner) => corner.loop === 0 && corner.kind === 'concave')
    expect(concave).toHaveLength(3)
    // Two walls of 30° at a square corner: 39.23°, derived in the geometry notes.
    expect(concave.some((corner) => Math.abs((corner.seamTilt ?? 0) - 39.2315) < 5e-4)).toBe(true)
  })

  it('spline disc: every wall is square and every jet leans against the taper', () => {
    const { evaluation } = firstOf('SD-02')
    expect(evaluation.edges.filter((edge) => edge.loop === 0)).toHaveLength(96)
    for (const edge of evaluation.edges) {
      expect(edge.bottomOffset).toBe(0)
      expect(edge.jetTilts.every((tilt) => Math.abs(tilt + 0.4) < 1e-12)).toBe(true)
    }
  })

  /** Whether the part can leave straight along (x, y, ±1): n·(x, y) ≤ ∓tan β for every wall (derived). */
  function canLeave(demo: DemoPart, setup: DemoSetup, up: boolean): boolean {
    const loops = loopsOf(demo)
    const tilts = new Map(
      setup.walls(loops).map((wall) => [`${wall.loop}.${wall.edge}`, wall.facets.map((facet) => facet.tilt)]),
    )
    const limits = loopFromVertices(loops[0] ?? []).flatMap((segment, edge) =>
      (tilts.get(`0.${edge}`) ?? [0]).map((tilt) => ({
        normal: normalAt(segment, 0.5),
        most: (up ? -1 : 1) * Math.tan(radians(tilt)),
      })),
    )
    for (let x = -3; x <= 3; x += 0.05) {
      for (let y = -3; y <= 3; y += 0.05) {
        if (limits.every(({ normal, most }) => normal.x * x + normal.y * y <= most + 1e-9)) return true
      }
    }
    return false
  }

  it('wedge plate: neither lifts nor drops, where the gusset drops', () => {
    const wedge = firstOf('WP-09')
    expect(canLeave(wedge.demo, wedge.setup, true)).toBe(false)
    expect(canLeave(wedge.demo, wedge.setup, false)).toBe(false)
    const gusset = firstOf('GS-07')
    expect(canLeave(gusset.demo, gusset.setup, false)).toBe(true)
  })

  it('cap plate: the corner passes the head though no edge does', () => {
    const { evaluation } = firstOf('CP-03')
    expect(evaluation.findings.map((finding) => finding.code)).toEqual(['corner-over-mechanical-limit'])
    // 63.66°: two walls of 55° at a square corner, derived in the geometry notes.
    const seams = evaluation.corners.map((corner) => corner.seamTilt ?? 0)
    expect(Math.max(...seams)).toBeCloseTo(63.66, 2)
    expect(Math.max(...evaluation.edges.map((edge) => edge.wholeTilt))).toBeLessThan(55)
    expect(evaluation.findings[0]?.cure?.set?.tilt).toBeGreaterThan(45)
  })

  it('link plate: the undercut uses up the web where its slope says', () => {
    const { evaluation } = firstOf('LP-05')
    expect(evaluation.firstEvent?.kind).toBe('break-through')
    expect(evaluation.firstEvent?.depth).toBeCloseTo(12 / Math.tan(radians(35)), 9)
    expect(evaluation.findings.filter((finding) => finding.severity !== 'note').map((f) => f.code)).toEqual([
      'walls-break-through',
    ])
  })
})

describe('demo heads', () => {
  it('are two, each working below what it can do', () => {
    expect(demoHeads).toHaveLength(2)
    for (const head of demoHeads) expect(head.workingLimit).toBeLessThan(head.mechanicalLimit)
  })
})
