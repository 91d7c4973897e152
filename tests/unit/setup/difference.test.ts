import { describe, expect, it } from 'vitest'
import { differenceOf } from '../../../shared/setup/difference.ts'
import { content } from './content.ts'

describe('what changed', () => {
  it('is nothing between equal contents, nor when a square wall is written out', () => {
    expect(differenceOf(content(), content())).toEqual([])
    const spelled = [...content().walls, { loop: 1, edge: 0, facets: [{ depth: 20, tilt: 0 }] }]
    expect(differenceOf(content(), content({ walls: spelled }))).toEqual([])
  })

  it('names plate, head, jet, datum and note', () => {
    const before = content()
    const after = content({
      plate: { material: 'S460', thickness: 25 },
      head: { ...before.head, workingLimit: null },
      jet: { ...before.jet, taper: 0.25 },
      datum: 'root',
      note: 'mind the clamps',
    })
    expect(differenceOf(before, after)).toEqual([
      { kind: 'plate', what: 'Material', before: 'S355', after: 'S460' },
      { kind: 'plate', what: 'Thickness', before: '20 mm', after: '25 mm' },
      { kind: 'head', what: 'Working limit', before: '55°', after: 'none' },
      { kind: 'jet', what: 'Taper', before: '0°', after: '0.25°' },
      { kind: 'datum', what: 'Drawing is', before: 'the top edge', after: 'the root line' },
      { kind: 'note', what: 'Note', before: '', after: 'mind the clamps' },
    ])
  })

  it('names walls added, changed and made square, edge by edge', () => {
    const before = content()
    const after = content({
      walls: [
        { loop: 0, edge: 0, facets: [{ depth: 20, tilt: 35 }] },
        { loop: 1, edge: 1, facets: [{ depth: 20, tilt: -10 }] },
      ],
    })
    expect(differenceOf(before, after)).toEqual([
      {
        kind: 'wall',
        what: 'e1',
        before: '+30° with 3 mm root face',
        after: '+35°',
        edge: { loop: 0, edge: 0 },
      },
      { kind: 'wall', what: 'e3', before: '−45°', after: 'square', edge: { loop: 0, edge: 2 } },
      { kind: 'wall', what: 'h1.e2', before: 'square', after: '−10°', edge: { loop: 1, edge: 1 } },
    ])
  })

  it('shows more digits when rounding would hide a change', () => {
    const before = content()
    const after = content({ plate: { ...before.plate, thickness: 20.000001 } })
    expect(differenceOf(before, after)).toEqual([
      { kind: 'plate', what: 'Thickness', before: '20', after: '20.000001' },
    ])
    const wall = content({
      walls: [before.walls[0]!, { loop: 0, edge: 2, facets: [{ depth: 20, tilt: -45.0001 }] }],
    })
    expect(differenceOf(before, wall)).toMatchObject([
      { before: '-45° to 20 mm', after: '-45.0001° to 20 mm' },
    ])
  })

  it('names joints and their tolerances', () => {
    const before = content()
    const [joint] = before.joints
    if (!joint) throw new Error('the content has a joint')
    const after = content({ joints: [{ ...joint, rootOpening: 3, tolerance: undefined }] })
    expect(differenceOf(before, after)).toEqual([
      {
        kind: 'joint',
        what: 'e1 joint',
        before: 'J1, gap 2 mm, same prep opposite, angle +5 −2.5, gap +1 −0.5, root face +0.5 −0.5',
        after: 'J1, gap 3 mm, same prep opposite',
        edge: { loop: 0, edge: 0 },
      },
    ])
    expect(differenceOf(before, content({ joints: [] }))).toMatchObject([{ after: 'none' }])
  })

  it('sees another profile and another head of the same name', () => {
    const before = content()
    const moved = content({ loops: [before.loops[0]!.map(({ x, y }) => ({ x: x + 1, y }))] })
    expect(differenceOf(before, moved)).toEqual([
      { kind: 'profile', what: 'Profile', before: '2 loops, 6 edges', after: '1 loop, 4 edges' },
    ])
    const head = content({ head: { ...before.head, id: '7c0a9c66-0d0e-4a35-8f5b-7b8f0f5f6a03' } })
    expect(differenceOf(before, head)).toMatchObject([{ kind: 'head', what: 'Head', before: 'North table' }])
  })
})
