import { describe, expect, it } from 'vitest'
import { inForm, readForm, withRootFace } from '../../../src/features/bench/model/prep-form.ts'
import { roomFor, withHeight } from '../../../src/features/bench/model/walls.ts'

const square = [{ depth: 25, tilt: 0 }]
const top = [
  { depth: 19, tilt: 30 },
  { depth: 25, tilt: 0 },
]
const bottom = [
  { depth: 8, tilt: 0 },
  { depth: 25, tilt: -35 },
]
const double = [
  { depth: 10, tilt: 37.5 },
  { depth: 13, tilt: 0 },
  { depth: 25, tilt: -40 },
]

describe('the form of a prep', () => {
  it('reads each form with its angles as sizes and its root face', () => {
    expect(readForm(square)).toEqual({ form: 'square', top: 0, bottom: 0, rootFace: 0 })
    expect(readForm(top)).toEqual({ form: 'top', top: 30, bottom: 0, rootFace: 6 })
    expect(readForm(bottom)).toEqual({ form: 'bottom', top: 0, bottom: 35, rootFace: 8 })
    expect(readForm(double)).toEqual({ form: 'double', top: 37.5, bottom: 40, rootFace: 3 })
  })

  it('calls any other chain its own', () => {
    const compound = [
      { depth: 10, tilt: 45 },
      { depth: 25, tilt: 20 },
    ]
    expect(readForm(compound).form).toBe('own')
  })

  it('keeps angle and root face when the form turns over', () => {
    expect(inForm(top, 'bottom', 25)).toEqual([
      { depth: 6, tilt: 0 },
      { depth: 25, tilt: -30 },
    ])
    expect(inForm(double, 'top', 25)).toEqual([
      { depth: 22, tilt: 37.5 },
      { depth: 25, tilt: 0 },
    ])
    expect(inForm(double, 'square', 25)).toEqual(square)
  })

  it('begins a bevel on a square edge, and both sides of a double one', () => {
    expect(inForm(square, 'top', 25)).toEqual([{ depth: 25, tilt: 30 }])
    expect(inForm(square, 'double', 25)).toEqual([
      { depth: 12.5, tilt: 30 },
      { depth: 25, tilt: -30 },
    ])
  })

  it('gives every form another root face, or says that it does not fit', () => {
    expect(withRootFace([{ depth: 25, tilt: 30 }], 4)).toEqual([
      { depth: 21, tilt: 30 },
      { depth: 25, tilt: 0 },
    ])
    expect(withRootFace(top, 0)).toEqual([{ depth: 25, tilt: 30 }])
    expect(withRootFace(top, 25)).toBeNull()
    // 10 of 22 mm of bevel lie above: with 14 mm of root face left 11 mm are bevel, 5 of them above
    expect(withRootFace(double, 14)).toEqual([
      { depth: 5, tilt: 37.5 },
      { depth: 19, tilt: 0 },
      { depth: 25, tilt: -40 },
    ])
  })
})

describe('the height of a facet', () => {
  it('is taken from the facet below, for the last one from the facet above', () => {
    expect(withHeight(top, 0, 15).map(({ depth }) => depth)).toEqual([15, 25])
    expect(withHeight(top, 1, 4).map(({ depth }) => depth)).toEqual([21, 25])
    expect(withHeight(double, 1, 5).map(({ depth }) => depth)).toEqual([10, 15, 25])
    expect(withHeight(double, 2, 8).map(({ depth }) => depth)).toEqual([10, 17, 25])
  })

  it('has the room of both', () => {
    expect(roomFor(top, 0)).toBe(25)
    expect(roomFor(double, 1)).toBe(15)
    expect(roomFor(double, 2)).toBe(15)
  })
})
