import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { frameOf, projector, scaleOf } from '../../../src/viewer/camera/view-state.ts'
import { fitView } from '../../../src/viewer/camera/fit.ts'
import { standardView } from '../../../src/viewer/camera/standard-views.ts'
import { ACTS, actOfKey } from '../../../src/viewer/controls/acts.ts'
import { balloonLeader, labelLeader } from '../../../src/viewer/overlay/balloon.ts'
import { chooseLabels } from '../../../src/viewer/overlay/choose.ts'
import { collide, placeAll, rectOf, type Wish } from '../../../src/viewer/overlay/place.ts'
import { readingOf } from '../../../src/viewer/overlay/reading.ts'
import { barLength, LONGEST_BAR } from '../../../src/viewer/overlay/scale-bar.ts'
import { labelPlaces, pointAt, stationsOf } from '../../../src/viewer/overlay/stations.ts'
import { indexMesh } from '../../../src/viewer/scene/mesh-index.ts'
import { BOX, boxMesh } from './box.ts'

const bounds = { left: 0, top: 0, width: 800, height: 600 }
const wish = (places: [number, number][], last: number | null = null, must = false): Wish => ({
  width: 60,
  height: 14,
  places: places.map(([x, y]) => ({ x, y })),
  last,
  must,
})

describe('room for texts', () => {
  it('never lets two texts that were placed collide, nor leave the picture', () => {
    const spot = fc.tuple(fc.integer({ min: -50, max: 850 }), fc.integer({ min: -50, max: 650 }))
    fc.assert(
      fc.property(fc.array(fc.array(spot, { minLength: 1, maxLength: 6 }), { maxLength: 40 }), (lists) => {
        const wishes = lists.map((places) => wish(places))
        const rects = placeAll(wishes, [], bounds).flatMap((place, i) =>
          place === null ? [] : [rectOf(wishes[i]!, place)],
        )
        rects.forEach((a, i) => {
          expect(a.left >= 0 && a.top >= 0 && a.left + a.width <= 800 && a.top + a.height <= 600).toBe(true)
          for (const b of rects.slice(i + 1)) expect(collide(a, b)).toBe(false)
        })
      }),
      { seed: 20, numRuns: 100 },
    )
  })

  it('shifts the later one, or leaves it out', () => {
    const first = wish([[100, 100]])
    expect(
      placeAll(
        [
          first,
          wish([
            [110, 100],
            [110, 130],
          ]),
        ],
        [],
        bounds,
      ),
    ).toEqual([0, 1])
    expect(placeAll([first, wish([[110, 100]])], [], bounds)).toEqual([0, null])
    expect(placeAll([first, wish([[110, 100]], null, true)], [], bounds)).toEqual([0, 0])
    expect(placeAll([wish([[100, 100]])], [{ left: 90, top: 90, width: 20, height: 20 }], bounds)).toEqual([
      null,
    ])
  })

  it('stays where it was while that is free', () => {
    const places: [number, number][] = [
      [100, 100],
      [100, 200],
    ]
    expect(placeAll([wish(places, 1)], [], bounds)).toEqual([1])
    expect(placeAll([wish([[100, 200]]), wish(places, 1)], [], bounds)).toEqual([0, 0])
  })
})

describe('which labels', () => {
  const labels = [0, 1, 2, 3].map((edge) => ({ edge: { loop: 0, edge }, text: `e${edge + 1}` }))
  const length = (key: string) => ({ '0-0': 10, '0-1': 40, '0-2': 30, '0-3': 20 })[key] ?? 0

  it('puts selected before breached before long, up to the cap', () => {
    const chosen = chooseLabels(labels, [{ loop: 0, edge: 0 }], [{ loop: 0, edge: 3 }], length, 3)
    expect(chosen.map(({ text, tone }) => `${text} ${tone}`)).toEqual([
      'e1 selected',
      'e4 breach',
      'e2 plain',
    ])
  })
})

describe('beside an edge', () => {
  const index = indexMesh(boxMesh())
  const frame = frameOf(800, 600, { top: 0, right: 0, bottom: 0, left: 0 })
  const size = { width: 60, height: 14 }

  it('has stations on both rims, with the normal into the waste', () => {
    const [middle] = stationsOf(index.edges.get('0-1')!)
    expect(middle!.top).toEqual([BOX.width, BOX.depth / 2, 0])
    expect(middle!.rims.at(-1)).toEqual([BOX.width, BOX.depth / 2, -BOX.thickness])
    expect(middle!.outward.map((v) => v || 0)).toEqual([1, 0, 0])
    expect(middle!.middle[2]).toBe(-BOX.thickness / 2)
  })

  it('stands clear of the part, whichever way it is seen', () => {
    for (const name of ['top', 'corner', 'front'] as const) {
      const view = fitView(standardView(name), [index.mesh.positions], frame)!
      const project = projector(view, frame)
      const place = labelPlaces(stationsOf(index.edges.get('0-0')!), project, scaleOf(view, frame), size)[0]!
      const lowest = Math.max(project([BOX.width / 2, 0, 0]).y, project([BOX.width / 2, 0, -BOX.thickness]).y)
      expect(place.y - size.height / 2).toBeGreaterThan(lowest)
    }
  })

  it('goes along a polyline by length', () => {
    const run = new Float64Array([0, 0, 0, 10, 0, 0, 10, 30, 0])
    expect(pointAt(run, 0.5)).toEqual({ at: [10, 10, 0], tangent: [0, 1, 0] })
    expect(pointAt(run, 1).at).toEqual([10, 30, 0])
  })

  it('ends leaders at the rim of what they point from', () => {
    expect(labelLeader({ x: 0, y: 0 }, { x: 0, y: 50 }, { width: 60, height: 20 })).toBe('M0.0 0.0L0.0 40.0')
    expect(balloonLeader({ x: 0, y: 0 }, { x: 34, y: 0 }).path).toBe('M0.0 0.0L23.0 0.0')
  })
})

describe('scale bar and reading', () => {
  it('is a 1, 2 or 5 of the unit, no longer than the limit and more than a third of it', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.001, max: 1000, noNaN: true }),
        fc.constantFrom(1, 25.4),
        (scale, unit) => {
          const { value, pixels } = barLength(scale, unit)
          expect(['1', '2', '5']).toContain(value.toExponential().replace(/e.*/, ''))
          expect(pixels).toBeLessThanOrEqual(LONGEST_BAR * (1 + 1e-9))
          expect(pixels).toBeGreaterThan(LONGEST_BAR / 3)
          expect(pixels).toBeCloseTo(value * unit * scale, 6)
        },
      ),
      { seed: 20, numRuns: 200 },
    )
  })

  it('says where the eye is', () => {
    expect(readingOf(standardView('corner'))).toBe('from 28° right, 38° above')
    expect(readingOf(standardView('below'))).toBe('from the front, 90° below')
    expect(readingOf(standardView('left'))).toBe('from 90° left, 0° above')
  })
})

describe('acts', () => {
  const plain = { shiftKey: false, ctrlKey: false, metaKey: false, altKey: false }

  it('every act has a name of its own and a key of its own', () => {
    expect(new Set(ACTS.map(({ name }) => name)).size).toBe(ACTS.length)
    expect(new Set(ACTS.map(({ key }) => key)).size).toBe(ACTS.length)
  })

  it('a written word on a button is part of its name', () => {
    for (const { text, alone, name, arrow } of ACTS) {
      if (arrow || text === '+' || text === '−') continue
      expect(name).toContain(text)
      if (alone) expect(name).toContain(alone)
    }
  })

  it.each([
    ['ArrowLeft', false, 'turn left'],
    ['ArrowLeft', true, 'move left'],
    ['ArrowDown', true, 'move down'],
    ['f', false, 'fit all'],
    ['F', true, 'fit selected'],
    ['=', false, 'zoom in'],
    ['+', true, 'zoom in'],
    ['-', false, 'zoom out'],
    ['7', false, 'look from the corner'],
  ])('%s with shift %s: %s', (key, shiftKey, name) => {
    const run = actOfKey({ ...plain, key, shiftKey })
    expect(run).not.toBeNull()
    expect(run).toBe(ACTS.find((act) => act.name === name)!.run)
  })

  it('leaves other keys, and keys with ctrl, to the page', () => {
    for (const key of ['Tab', 'Enter', 'a', '8', 'Shift']) expect(actOfKey({ ...plain, key })).toBeNull()
    expect(actOfKey({ ...plain, key: 'f', ctrlKey: true })).toBeNull()
  })
})
