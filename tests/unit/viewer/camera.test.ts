import fc from 'fast-check'
import { OrthographicCamera, Matrix4, Vector3 } from 'three'
import { describe, expect, it } from 'vitest'
import { edgeView } from '../../../src/viewer/camera/edge-view.ts'
import { FIT_AIR, fitView } from '../../../src/viewer/camera/fit.ts'
import { STANDARD_VIEWS, standardView } from '../../../src/viewer/camera/standard-views.ts'
import { decodeView, encodeView } from '../../../src/viewer/camera/view-code.ts'
import {
  basisOf,
  between,
  dot,
  frameOf,
  orbit,
  pan,
  projector,
  scaleOf,
  unproject,
  zoomAt,
  type Vec3,
  type ViewState,
} from '../../../src/viewer/camera/view-state.ts'
import { indexMesh } from '../../../src/viewer/scene/mesh-index.ts'
import { BOX, boxMesh } from './box.ts'

const SEED = { seed: 20, numRuns: 200 }
const NO_INSETS = { top: 0, right: 0, bottom: 0, left: 0 }
const frame = frameOf(800, 600, { ...NO_INSETS, left: 100 })
const coordinate = fc.double({ min: -500, max: 500, noNaN: true })
const point = fc.tuple(coordinate, coordinate, coordinate)
const anyView = fc.record({
  azimuth: fc.double({ min: -3.1, max: 3.1, noNaN: true }),
  elevation: fc.double({ min: -1.57, max: 1.57, noNaN: true }),
  target: point,
  span: fc.double({ min: 1, max: 5000, noNaN: true }),
})
const some: ViewState = { azimuth: 0.5, elevation: 0.6, target: [10, 20, -5], span: 200 }

describe('projection', () => {
  it('agrees with an orthographic camera of three', () => {
    fc.assert(
      fc.property(anyView, point, (view, p) => {
        const { right, up, toward } = basisOf(view)
        const scale = scaleOf(view, frame)
        const camera = new OrthographicCamera(
          -frame.centreX / scale,
          (frame.width - frame.centreX) / scale,
          frame.centreY / scale,
          (frame.centreY - frame.height) / scale,
          -1e4,
          1e4,
        )
        camera.position.set(...view.target)
        camera.quaternion.setFromRotationMatrix(
          new Matrix4().makeBasis(new Vector3(...right), new Vector3(...up), new Vector3(...toward)),
        )
        camera.updateMatrixWorld()
        camera.updateProjectionMatrix()
        const ndc = new Vector3(...p).project(camera)
        const seen = projector(view, frame)(p)
        const size = Math.max(1, scale * 2000)
        expect(Math.abs(((ndc.x + 1) / 2) * frame.width - seen.x) / size).toBeLessThan(1e-9)
        expect(Math.abs(((1 - ndc.y) / 2) * frame.height - seen.y) / size).toBeLessThan(1e-9)
      }),
      SEED,
    )
  })

  it('puts the target in the middle of what the insets leave', () => {
    const { x, y } = projector(some, frame)(some.target)
    expect([x, y]).toEqual([450, 300])
  })

  it('looks at the front with X to the right and Z up, and from the top with Y up', () => {
    const front = projector({ ...standardView('front'), target: [0, 0, 0], span: 100 }, frame)
    expect(front([10, 0, 0]).x).toBeGreaterThan(450)
    expect(front([0, 0, 10]).y).toBeLessThan(300)
    expect(front([0, -10, 0]).nearness).toBeCloseTo(10, 12)
    const top = projector({ ...standardView('top'), target: [0, 0, 0], span: 100 }, frame)
    expect(top([0, 10, 0]).y).toBeLessThan(300)
    expect(top([0, 0, 10]).nearness).toBeCloseTo(10, 12)
    const right = projector({ ...standardView('right'), target: [0, 0, 0], span: 100 }, frame)
    expect(right([10, 0, 0]).nearness).toBeCloseTo(10, 12)
  })

  it('finds the point under a pixel again', () => {
    const under = unproject(some, frame, 123, 456)
    const seen = projector(some, frame)(under)
    expect(seen.x).toBeCloseTo(123, 9)
    expect(seen.y).toBeCloseTo(456, 9)
  })
})

describe('movements', () => {
  it('zoom keeps the point under the pointer where it is', () => {
    fc.assert(
      fc.property(anyView, fc.double({ min: 0.2, max: 5, noNaN: true }), (view, factor) => {
        const zoomed = zoomAt(view, frame, factor, 600, 100, { least: 1e-3, most: 1e6 })
        const seen = projector(zoomed, frame)(unproject(view, frame, 600, 100))
        expect(seen.x).toBeCloseTo(600, 5)
        expect(seen.y).toBeCloseTo(100, 5)
        expect(zoomed.span).toBeCloseTo(view.span / factor, 9)
      }),
      SEED,
    )
  })

  it('zoom stops at its limits', () => {
    expect(zoomAt(some, frame, 1e9, 0, 0, { least: 2, most: 900 }).span).toBe(2)
    expect(zoomAt(some, frame, 1e-9, 0, 0, { least: 2, most: 900 }).span).toBe(900)
  })

  it('pan carries the part with the pointer', () => {
    const before = projector(some, frame)([1, 2, 3])
    const after = projector(pan(some, frame, 40, -25), frame)([1, 2, 3])
    expect(after.x - before.x).toBeCloseTo(40, 9)
    expect(after.y - before.y).toBeCloseTo(-25, 9)
  })

  it('orbit stops at straight down and wraps round', () => {
    expect(orbit(some, 0, 9).elevation).toBe(Math.PI / 2)
    expect(orbit(some, 0, -9).elevation).toBe(-Math.PI / 2)
    expect(orbit({ ...some, azimuth: 3 }, 1, 0).azimuth).toBeCloseTo(4 - 2 * Math.PI, 12)
  })

  it('glides by the shorter turn', () => {
    const half = between({ ...some, azimuth: 3 }, { ...some, azimuth: -3 }, 0.5)
    expect(Math.abs(half.azimuth)).toBeCloseTo(Math.PI, 9)
    expect(between(some, { ...some, span: 800 }, 0.5).span).toBeCloseTo(400, 9)
  })
})

describe('fit', () => {
  it('shows the whole part, filling the free area in one direction', () => {
    const mesh = boxMesh([3000, -2000, 0])
    for (const direction of STANDARD_VIEWS) {
      const view = fitView(direction, [mesh.positions], frame)!
      const project = projector(view, frame)
      const seen = Array.from({ length: mesh.positions.length / 3 }, (_, i) =>
        project([...mesh.positions.subarray(i * 3, i * 3 + 3)] as unknown as Vec3),
      )
      const xs = seen.map(({ x }) => x)
      const ys = seen.map(({ y }) => y)
      const wide = (Math.max(...xs) - Math.min(...xs)) / frame.freeWidth
      const high = (Math.max(...ys) - Math.min(...ys)) / frame.freeHeight
      expect(Math.max(wide, high)).toBeCloseTo(1 - 2 * FIT_AIR, 9)
      expect((Math.max(...xs) + Math.min(...xs)) / 2).toBeCloseTo(frame.centreX, 6)
      expect((Math.max(...ys) + Math.min(...ys)) / 2).toBeCloseTo(frame.centreY, 6)
    }
  })

  it('has no view of nothing', () => {
    expect(fitView(standardView('top'), [], frame)).toBeNull()
    expect(fitView(standardView('top'), [new Float64Array(0)], frame)).toBeNull()
  })

  it('faces the edge in focus', () => {
    const index = indexMesh(boxMesh())
    const view = edgeView(index.edges.get('0-1')!, index.radius, frame)!
    expect(dot(basisOf(view).toward, [1, 0, 0])).toBeGreaterThan(0.7)
    expect(view.target[0]).toBeCloseTo(BOX.width, 6)
  })
})

describe('view in a link', () => {
  it('comes back as it was, to a hundredth', () => {
    fc.assert(
      fc.property(anyView, (view) => {
        const back = decodeView(encodeView(view))!
        expect(Math.abs(back.azimuth - view.azimuth)).toBeLessThan(1e-4)
        expect(Math.abs(back.elevation - view.elevation)).toBeLessThan(1e-4)
        expect(Math.abs(back.span - view.span)).toBeLessThanOrEqual(0.0050001)
        expect(encodeView(back)).toBe(encodeView(view))
      }),
      SEED,
    )
  })

  it('is short and needs no escaping', () => {
    const code = encodeView({ ...standardView('corner'), target: [150.3212, -0.001, -15], span: 310 })
    expect(code).toBe('28_38_150.32_0_-15_310')
    expect(encodeURIComponent(code)).toBe(code)
  })

  it.each([
    '',
    '1_2_3',
    '0_0_0_0_0_0',
    '0_91_0_0_0_1',
    '181_0_0_0_0_1',
    '0_0_1e9_0_0_1',
    '0_0_NaN_0_0_1',
    '0_0_0_0_0_-1',
  ])('refuses %j', (code) => {
    expect(decodeView(code)).toBeNull()
  })
})
