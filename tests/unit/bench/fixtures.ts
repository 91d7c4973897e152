import type { SaveSetup, Setup } from '../../../shared/api/setups.ts'
import type { Loop, Point, Segment } from '../../../shared/geometry/types.ts'

export function lineLoop(points: readonly (readonly [number, number])[]): Loop {
  return points.map(([x, y], i): Segment => {
    const [nextX, nextY] = points[(i + 1) % points.length]!
    return { kind: 'line', from: { x, y }, to: { x: nextX, y: nextY } }
  })
}

/** An L: two long legs 200 mm, arms 80 mm wide; corner 3 (at 80, 80) is concave. */
export const ell = lineLoop([
  [0, 0],
  [200, 0],
  [200, 80],
  [80, 80],
  [80, 200],
  [0, 200],
])

/** A slot, clockwise: two straights joined by half circles, smooth all the way round. */
export const slot: Loop = [
  { kind: 'line', from: { x: 20, y: 30 }, to: { x: 20, y: 60 } },
  arc({ x: 20, y: 60 }, { x: 40, y: 60 }, { x: 30, y: 60 }, -Math.PI),
  { kind: 'line', from: { x: 40, y: 60 }, to: { x: 40, y: 30 } },
  arc({ x: 40, y: 30 }, { x: 20, y: 30 }, { x: 30, y: 30 }, -Math.PI),
]

function arc(from: Point, to: Point, centre: Point, sweep: number): Segment {
  return { kind: 'arc', from, to, centre, radius: 10, sweep }
}

export const content: SaveSetup = {
  name: 'First side',
  headId: '3f0d1c52-5b7f-4a51-9b6a-0d3c1c8f1a10',
  plate: { material: 'S355', thickness: 25 },
  jet: { kerf: 1.1, taper: 0.4, standoff: 2.5, nozzleDiameter: 7 },
  datum: 'top',
  walls: [
    {
      loop: 0,
      edge: 0,
      facets: [
        { depth: 19, tilt: 30 },
        { depth: 25, tilt: 0 },
      ],
    },
    { loop: 0, edge: 2, facets: [{ depth: 25, tilt: -15 }] },
  ],
  joints: [],
  note: '',
}

const person = { id: '9b2f7f5e-0f53-4f0e-8f45-0a1c6f0f7d11', name: 'Ines Arden' }

export function setupOf(saved: SaveSetup, revision: number, version = revision): Setup {
  const { name, headId, ...rest } = saved
  return {
    id: '0a0c1b9e-6c1d-4d58-9a51-0b3a9a7e4c10',
    name,
    partId: '7b1b6d5c-0a7e-4c52-8c7e-5a0f5f3a2b10',
    state: 'draft',
    approvedRevision: null,
    version,
    revision: {
      number: revision,
      state: 'draft',
      hash: 'a'.repeat(64),
      savedBy: person,
      savedAt: '2026-03-02T14:02:11.000Z',
      decisions: [],
      content: {
        format: 1,
        part: {
          id: '7b1b6d5c-0a7e-4c52-8c7e-5a0f5f3a2b10',
          number: 'BP-04',
          name: 'Bearing plate',
          drawingSha256: 'b'.repeat(64),
        },
        head: { id: headId, name: 'North gantry', mechanicalLimit: 60, workingLimit: 55 },
        loops: [ell.map(({ from }) => ({ x: from.x, y: from.y }))],
        ...rest,
      },
    },
  }
}
