import { describe, expect, it } from 'vitest'
import type { VertexLoop } from '../../../shared/geometry/types.ts'
import { placeNames, type NamePlace } from '../../../src/features/sheet/name-places.ts'

const FONT = 2.6
const options = {
  toPaper: ({ x, y }: { x: number; y: number }) => ({ x: 90 + x, y: 60 - y }),
  width: 180,
  height: 120,
  font: FONT,
  avoid: [],
  first: () => false,
}
const square: VertexLoop = [
  { x: -40, y: -40 },
  { x: 40, y: -40 },
  { x: 40, y: 40 },
  { x: -40, y: 40 },
]
const gear = (teeth: number): VertexLoop =>
  Array.from({ length: teeth * 4 }, (_, i) => {
    const radius = i % 4 < 2 ? 50 : 44
    const angle = (i / (teeth * 4)) * 2 * Math.PI
    return { x: radius * Math.cos(angle), y: radius * Math.sin(angle) }
  })
const boxOf = ({ name, at }: NamePlace) => {
  const width = name.length * FONT * 0.6
  return { left: at.x - width / 2, right: at.x + width / 2, top: at.y - FONT / 2, bottom: at.y + FONT / 2 }
}

describe('names on the outline', () => {
  it('stand outside the material beside the middle of their edge', () => {
    const [first, second] = placeNames([square], options)
    // e1 is the lower edge (y = −40, paper y = 100): its name is below it, centred.
    expect(first).toMatchObject({ name: 'e1', at: { x: 90 } })
    expect(first!.at.y).toBeGreaterThan(100)
    expect(second!.at.x).toBeGreaterThan(130)
  })

  it('go inside when a line is in the way outside', () => {
    const below: VertexLoop = [
      { x: -60, y: -43 },
      { x: 60, y: -43 },
      { x: 60, y: -42 },
      { x: -60, y: -42 },
    ]
    const [first] = placeNames([square], { ...options, avoid: [below] })
    expect(first!.at.y).toBeLessThan(100)
  })

  it('never overlap, however many there are, and leave some out instead', () => {
    const placed = placeNames([gear(40)], options)
    expect(placed.length).toBeGreaterThan(20)
    expect(placed.length).toBeLessThan(160)
    for (const [i, place] of placed.entries()) {
      const a = boxOf(place)
      for (const other of placed.slice(i + 1)) {
        const b = boxOf(other)
        const meet = a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom
        expect(meet, `${place.name} on ${other.name}`).toBe(false)
      }
    }
  })

  it('give the room to edges with a prep', () => {
    const names = (first: (edge: { edge: number }) => boolean) =>
      placeNames([gear(60)], { ...options, first }).map(({ name }) => name)
    const without = names(() => false)
    // A tip (every fourth edge) that lost its place to a neighbour: a flank has none at all.
    const left = Array.from({ length: 240 }, (_, edge) => edge).find(
      (edge) => edge % 4 === 0 && !without.includes(`e${edge + 1}`),
    )!
    expect(names(({ edge }) => edge === left)).toContain(`e${left + 1}`)
  })
})
