import { describe, expect, it } from 'vitest'
import { frameOf, projector, type ViewState } from '../../../src/viewer/camera/view-state.ts'
import { fitView } from '../../../src/viewer/camera/fit.ts'
import { standardView, type StandardViewName } from '../../../src/viewer/camera/standard-views.ts'
import { mix, parseHex, type Palette } from '../../../src/viewer/palette.ts'
import { nearestLine } from '../../../src/viewer/pick/nearest-line.ts'
import { Picker } from '../../../src/viewer/pick/picker.ts'
import { boxOf, segmentsOf } from '../../../src/viewer/scene/line-runs.ts'
import { LineSet, RULED_UP_TO } from '../../../src/viewer/scene/line-set.ts'
import { cornerPoint, indexMesh } from '../../../src/viewer/scene/mesh-index.ts'
import { faceOfVertices, paintVertices } from '../../../src/viewer/scene/paint.ts'
import { PartGeometry } from '../../../src/viewer/scene/part-geometry.ts'
import { tiltRgb } from '../../../src/theme/tilt-colour.ts'
import { BOX, boxMesh } from './box.ts'

const frame = frameOf(800, 600, { top: 0, right: 0, bottom: 0, left: 0 })
const index = indexMesh(boxMesh())
const from = (name: StandardViewName): ViewState =>
  fitView(standardView(name), [index.mesh.positions], frame)!

function pickerOf(mesh = index) {
  const picker = new Picker()
  picker.setIndex(mesh)
  return picker
}

describe('colours of faces', () => {
  const palette: Palette = {
    theme: 'paper',
    tilt: (degrees) => tiltRgb(degrees, 'paper'),
    sheet: [1, 1, 1],
    panel: [2, 2, 2],
    face: [233, 229, 217],
    ink: [0, 0, 0],
    muted: [100, 100, 100],
    rule: [3, 3, 3],
    select: [11, 122, 116],
    breach: [163, 22, 47],
  }
  const tiltOf = (_: number, edge: number) => [30, -20, 0, 0][edge]!
  const paint = (selection: { loop: number; edge: number }[], breachedEdges: typeof selection) => {
    const into = new Uint8Array((index.mesh.positions.length / 3) * 4)
    paintVertices(index.mesh, index.faceOfVertex, { palette, tiltOf, selection, breachedEdges }, into)
    return (face: number) => [...into.subarray(face * 16, face * 16 + 4)]
  }

  it('paints every wall by its signed tilt and the top as the plate', () => {
    const of = paint([], [])
    expect(of(0)).toEqual([233, 229, 217, 0])
    expect(of(2)).toEqual([...tiltRgb(30, 'paper'), 0])
    expect(of(3)).toEqual([...tiltRgb(-20, 'paper'), 0])
    expect(of(4)).toEqual([...tiltRgb(0, 'paper'), 0])
  })

  it('tints what is selected and hatches what is breached, and nothing else', () => {
    const plain = paint([], [])
    const of = paint([{ loop: 0, edge: 0 }], [{ loop: 0, edge: 1 }])
    expect(of(2)).not.toEqual(plain(2))
    expect(of(2)[3]).toBe(0)
    expect(of(3)).toEqual([...plain(3).slice(0, 3), 255])
    expect(of(4)).toEqual(plain(4))
  })

  it('knows the face of every vertex', () => {
    expect([...faceOfVertices(index.mesh)]).toEqual(
      [0, 1, 2, 3, 4, 5].flatMap((face) => [face, face, face, face]),
    )
  })

  it('reads tokens', () => {
    expect(parseHex(' #0b7a74')).toEqual([11, 122, 116])
    expect(parseHex('')).toEqual([128, 128, 128])
    expect(mix([0, 0, 0], [100, 200, 50], 0.5)).toEqual([50, 100, 25])
  })
})

describe('buffers', () => {
  it('takes the origin off before it rounds', () => {
    const far = boxMesh([5_000_000.125, 0, 0])
    const box = boxOf(far.positions)!
    const geometry = new PartGeometry()
    geometry.fill(far, box.centre)
    const positions = geometry.geometry.getAttribute('position').array
    expect(positions[0]).toBe(-BOX.width / 2)
    expect(positions[3]).toBe(BOX.width / 2)
  })

  it('keeps its buffers while the next mesh fits, and draws no more than the mesh has', () => {
    const geometry = new PartGeometry()
    const mesh = boxMesh()
    geometry.fill(mesh, [0, 0, 0])
    const before = geometry.geometry.getAttribute('position')
    geometry.fill({ ...mesh, indices: mesh.indices.subarray(0, 6) }, [0, 0, 0])
    expect(geometry.geometry.getAttribute('position')).toBe(before)
    expect(geometry.geometry.drawRange.count).toBe(6)
  })

  it('cuts polylines to segments whose distance runs on', () => {
    const { positions, distances, count } = segmentsOf(
      [
        new Float64Array([0, 0, 0, 3, 4, 0, 3, 4, -12]),
        new Float64Array([1, 1, 1, 1, 1, 3]),
        new Float64Array(3),
      ],
      [1, 0, 0],
    )
    expect(count).toBe(3)
    expect([...positions.subarray(0, 6)]).toEqual([-1, 0, 0, 2, 4, 0])
    expect([...distances]).toEqual([0, 5, 5, 17, 0, 2])
  })

  it('draws a great many lines without width', () => {
    const set = new LineSet({ width: 2, hidden: { width: 1, opacity: 0.5 }, order: 1 })
    set.fill([new Float64Array(6)], [0, 0, 0])
    expect([set.shown.visible, set.behind!.visible, set.plain.visible]).toEqual([true, true, false])
    set.fill([new Float64Array((RULED_UP_TO + 2) * 3)], [0, 0, 0])
    expect([set.shown.visible, set.behind!.visible, set.plain.visible]).toEqual([false, false, true])
    expect(set.plain.geometry.drawRange.count).toBe((RULED_UP_TO + 1) * 2)
    set.fill([], [0, 0, 0])
    expect([set.shown.visible, set.behind!.visible, set.plain.visible]).toEqual([false, false, false])
  })
})

describe('looking up a mesh', () => {
  it('knows lines, lengths and corners', () => {
    expect(index.edges.size).toBe(4)
    expect(index.edges.get('0-0')!.length).toBe(BOX.width)
    expect(index.runs.seam).toHaveLength(4)
    expect(cornerPoint(index, { loop: 0, vertex: 2 })).toEqual([BOX.width, BOX.depth, 0])
    expect(cornerPoint(index, { loop: 1, vertex: 0 })).toBeNull()
  })

  it('stands an empty mesh', () => {
    const none = {
      ...boxMesh(),
      positions: new Float64Array(0),
      indices: new Uint32Array(0),
      lines: [],
      faces: [],
    }
    const empty = indexMesh({ ...none, normals: new Float64Array(0), faceOfTriangle: new Uint32Array(0) })
    expect(empty.radius).toBe(0)
    expect(pickerOf(empty).edgeAt(from('top'), frame, 400, 300, 8)).toBeNull()
  })
})

describe('picking', () => {
  it('answers the wall under a pixel, by the table of faces', () => {
    const at = (name: StandardViewName) =>
      pickerOf().edgeAt(from(name), frame, frame.centreX, frame.centreY, 8)
    expect(at('front')).toEqual({ loop: 0, edge: 0 })
    expect(at('right')).toEqual({ loop: 0, edge: 1 })
    expect(at('back')).toEqual({ loop: 0, edge: 2 })
    expect(at('left')).toEqual({ loop: 0, edge: 3 })
  })

  it('answers a square wall seen on edge by its rim, and no edge in the middle of the plate', () => {
    const view = from('top')
    const rim = projector(view, frame)([BOX.width / 2, 0, 0])
    const picker = pickerOf()
    expect(picker.edgeAt(view, frame, rim.x, rim.y + 5, 8)).toEqual({ loop: 0, edge: 0 })
    expect(picker.edgeAt(view, frame, rim.x, rim.y - 5, 8)).toEqual({ loop: 0, edge: 0 })
    expect(picker.edgeAt(view, frame, rim.x, rim.y + 20, 8)).toBeNull()
    expect(picker.edgeAt(view, frame, frame.centreX, frame.centreY, 8)).toBeNull()
  })

  it('prefers the rim nearer the eye where two lie over each other', () => {
    const view = from('front')
    const project = projector(view, frame)
    const { x, y } = project([BOX.width / 2, 0, 0])
    expect(nearestLine(index, project, x, y - 3, 8, 'either')).toEqual({ loop: 0, edge: 0 })
  })

  it('knows what the part itself hides', () => {
    const picker = pickerOf()
    const back = { loop: 0, edge: 2 }
    const middle = [BOX.width / 2, BOX.depth, -BOX.thickness / 2] as const
    expect(picker.sees(back, middle, [0, 1, 0])).toBe(true)
    expect(picker.sees(back, middle, [0, -1, 0])).toBe(false)
    expect(picker.sees({ loop: 0, edge: 0 }, [BOX.width / 2, 0, -10], [0, -1, 0])).toBe(true)
  })
})
