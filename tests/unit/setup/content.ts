import type { SetupContent } from '../../../shared/setup/schema.ts'

/** A small set-up for the tests: invented. */
export function content(change: Partial<SetupContent> = {}): SetupContent {
  return {
    format: 1,
    part: {
      id: '7c0a9c66-0d0e-4a35-8f5b-7b8f0f5f6a01',
      number: 'SW-104',
      name: 'Bearing plate',
      drawingSha256: 'ab'.repeat(32),
    },
    plate: { material: 'S355', thickness: 20 },
    head: {
      id: '7c0a9c66-0d0e-4a35-8f5b-7b8f0f5f6a02',
      name: 'North table',
      mechanicalLimit: 60,
      workingLimit: 55,
    },
    jet: { kerf: 1, taper: 0, standoff: 3, nozzleDiameter: 7.14 },
    datum: 'top',
    loops: [
      [
        { x: 0, y: 0 },
        { x: 200, y: 0 },
        { x: 200, y: 120 },
        { x: 0, y: 120 },
      ],
      [
        { x: 50, y: 60, bulge: -1 },
        { x: 70, y: 60, bulge: -1 },
      ],
    ],
    walls: [
      {
        loop: 0,
        edge: 0,
        facets: [
          { depth: 17, tilt: 30 },
          { depth: 20, tilt: 0 },
        ],
      },
      { loop: 0, edge: 2, facets: [{ depth: 20, tilt: -45 }] },
    ],
    joints: [
      {
        loop: 0,
        edge: 0,
        label: 'J1',
        rootOpening: 2,
        mate: 'same',
        tolerance: {
          angle: { plus: 5, minus: 2.5 },
          rootOpening: { plus: 1, minus: 0.5 },
          rootFace: { plus: 0.5, minus: 0.5 },
        },
      },
    ],
    note: '',
    ...change,
  }
}
