import { describe, expect, it } from 'vitest'
import { jetAt } from '../../../shared/passes/jet-at.ts'
import { passesOf } from '../../../shared/passes/passes.ts'
import { CornerMove, MoveKind, type JetPath, type Pass } from '../../../shared/passes/types.ts'
import { feedFaults } from '../../../shared/process/check.ts'
import { feedAlong, FeedLimit, type FeedAlong } from '../../../shared/process/feed-along.ts'
import { feedFor } from '../../../shared/process/feed.ts'
import { abrasives, workMaterials } from '../../../shared/process/materials.ts'
import { runAtDepth } from '../../../shared/process/move-length.ts'
import type { ProcessSpec } from '../../../shared/process/spec.ts'
import { circle, DEGREE, facets, plate, rectangle, seeded, star } from '../../support/plates.ts'

const spec: ProcessSpec = {
  material: workMaterials['mild-steel'],
  abrasive: abrasives.garnet,
  make: { pressure: 345, orifice: 0.33, mixingTube: 1.02, abrasiveRate: 340 },
  quality: 3,
}
const noSlowing = { distance: 0, share: 1, turn: Math.PI }
const jet = { kerf: 1, taper: 0 }
const FREE = { tilt: null }

/** One move, straight or about the origin. */
function oneMove(
  from: readonly [number, number, number, number],
  to: readonly [number, number, number, number],
  sweep = 0,
  move: number = MoveKind.cut,
): JetPath {
  const column = (k: number) => Float64Array.of(from[k]!, to[k]!)
  return {
    count: 2,
    x: column(0),
    y: column(1),
    p: column(2),
    q: column(3),
    move: Uint8Array.of(move, MoveKind.end),
    edge: Int32Array.of(0, -1),
    facet: Uint8Array.of(0, 0),
    sweep: Float64Array.of(sweep, 0),
    cx: Float64Array.of(0, 0),
    cy: Float64Array.of(0, 0),
  }
}
const onePass: Pass[] = [{ loop: 0, first: 0, last: 1, closed: false, level: 0, reasons: [] }]

function along(path: JetPath, passes: readonly Pass[], thickness: number, with_: ProcessSpec): FeedAlong {
  const answer = feedAlong(path, passes, thickness, with_)
  if (answer.kind === 'refused') throw new Error(answer.code)
  return answer
}

describe('the way of the axis at a depth', () => {
  it('is as long as fine chords tell, extrapolated', () => {
    const random = seeded(3)
    for (let round = 0; round < 60; round++) {
      const sweep = (random() - 0.5) * 6
      const [r0, r1] = [0.01 + 20 * random(), round % 3 === 0 ? 0.02 * random() : 20 * random()]
      const heading = 7 * random()
      const slope = () => (random() - 0.5) * 3
      const path = oneMove(
        [r0 * Math.cos(heading), r0 * Math.sin(heading), slope(), slope()],
        [r1 * Math.cos(heading + sweep), r1 * Math.sin(heading + sweep), slope(), slope()],
        sweep,
      )
      const depth = round % 2 === 0 ? 0 : 15
      const chords = (n: number) => {
        let length = 0
        for (let k = 0; k < n; k++) {
          const [a, b] = [jetAt(path, 0, k / n), jetAt(path, 0, (k + 1) / n)]
          length += Math.hypot(b.x - a.x + depth * (b.p - a.p), b.y - a.y + depth * (b.q - a.q))
        }
        return length
      }
      const run = { length: 0, fastest: 0 }
      runAtDepth(path, 0, depth, run)
      // Richardson: chords fall short by an even series in 1/n.
      const [coarse, fine] = [chords(4000), chords(8000)]
      expect(Math.abs(run.length - (fine + (fine - coarse) / 3))).toBeLessThan(1e-8)
    }
  })

  it('keeps its digits from no change of radius to a large one', () => {
    const run = { length: 0, fastest: 0 }
    for (const rise of [0, 1e-12, 1e-6, 0.0099, 0.0101, 0.5]) {
      const path = oneMove([10, 0, 0, 0], [-10 - 10 * rise, 0, 0, 0], Math.PI)
      runAtDepth(path, 0, 0, run)
      // A spiral's length by its series about an even radius: ∫ √(r² + (dr/dθ)²) dθ with Simpson's 2000 panels.
      const at = (u: number) => Math.hypot(Math.PI * (10 + 10 * rise * u), 10 * rise)
      let sum = at(0) + at(1)
      for (let k = 1; k < 2000; k++) sum += (k % 2 ? 4 : 2) * at(k / 2000)
      expect(Math.abs(run.length - sum / 6000)).toBeLessThan(1e-9)
    }
  })
})

describe('feed along one move', () => {
  it('square: the material’s; tilted: times cos^1.15', () => {
    const upright = along(oneMove([0, 0, 0, 0], [100, 0, 0, 0]), onePass, 25.4, spec)
    expect(upright.feed[0]).toBeCloseTo(41.9, 1)
    expect(upright.minutes[0]).toBeCloseTo(100 / upright.feed[0]!, 12)
    const slope = Math.tan(45 * DEGREE)
    const tilted = along(oneMove([0, 0, 0, slope], [100, 0, 0, slope]), onePass, 25.4, spec)
    expect(tilted.feed[0]! / upright.feed[0]!).toBeCloseTo(Math.cos(45 * DEGREE) ** 1.15, 12)
  })

  it('slows the top where the bottom has further to go', () => {
    // Outward at 45°, 10 mm deep, about a radius of 10: the bottom goes twice as far.
    const path = oneMove([10, 0, 1, 0], [0, 10, 0, 1], Math.PI / 2)
    const feeds = along(path, onePass, 10, spec)
    const material = feedFor(87.6, spec.make, 3, 10 * Math.SQRT2) as number
    expect(feeds.bottomLength[0]).toBeCloseTo(10 * Math.PI, 10)
    expect(feeds.feed[0]).toBeCloseTo(material / 2, 10)
    expect(feeds.limit[0]).toBe(FeedLimit.bottom)
  })

  it('tells a pivot about the axis by its time alone', () => {
    const path = oneMove([0, 0, 1, 0], [0, 0, 0, 1], Math.PI / 2, MoveKind.pivot)
    const feeds = along(path, onePass, 10, { ...spec, corners: noSlowing })
    const material = feedFor(87.6, spec.make, 3, 10 * Math.SQRT2) as number
    expect(feeds.feed[0]).toBe(0)
    expect(feeds.minutes[0]).toBeCloseTo((5 * Math.PI) / material, 12)
  })

  it('takes no less than the head needs', () => {
    const path = oneMove([0, 0, 0, 0], [100, 0, 0, 0])
    const feeds = feedAlong(path, onePass, 10, spec, Float64Array.of(60, 0))
    expect(feeds.kind === 'feeds' && [feeds.minutes[0], feeds.limit[0]]).toEqual([60, FeedLimit.head])
  })

  it('refuses what cannot be cut or told', () => {
    const path = oneMove([0, 0, 0, 0], [100, 0, 0, 0])
    const code = (change: Partial<ProcessSpec>, t = 10) => {
      const answer = feedAlong(path, onePass, t, { ...spec, ...change })
      return answer.kind === 'refused' ? answer.code : null
    }
    expect(code({})).toBeNull()
    expect(code({ material: workMaterials.diamond })).toBe('harder-than-abrasive')
    expect(code({ wasteQuality: 6 })).toBe('quality-out-of-range')
    expect(code({ corners: { distance: 1, share: 0, turn: 0 } })).toBe('corner-slowing-out-of-range')
    expect(code({ pierceSeconds: -1 })).toBe('pierce-out-of-range')
    expect(code({ water: NaN })).toBe('water-out-of-range')
    expect(code({}, 0)).toBe('path-out-of-range')
  })
})

describe('a whole plate', () => {
  const body = plate(20, [rectangle(0, 0, 100, 100)], () => facets([20, 0]))
  const passes = passesOf(body, jet, FREE)

  it('slows for 3 mm on both sides of every corner that it goes round', () => {
    const feeds = along(passes.path, passes.passes, 20, spec)
    const { move } = passes.path
    const cuts = [...move].flatMap((kind, i) => (kind === MoveKind.cut ? [i] : []))
    // Slow lengths before and after each corner: the short leans there count whole.
    const slow = [...move].map((_, i) => {
      const [from, until, length] = [feeds.slowFrom[i]!, feeds.slowUntil[i]!, feeds.topLength[i]!]
      return from === 1 ? [length, length] : [from * length, (1 - until) * length]
    })
    // It begins and ends in the first corner with run-outs: no slowing there.
    expect(slow[cuts[0]!]![0]).toBe(0)
    expect(slow[cuts.at(-1)!]![1]).toBe(0)
    for (let k = 1; k < cuts.length; k++) {
      const seam = (cuts[k - 1]! + cuts[k]! + 1) / 2
      const before = slow.slice(cuts[k - 1], seam).reduce((sum, [, end]) => sum + end!, 0)
      const after = slow.slice(seam, cuts[k]! + 1).reduce((sum, [start]) => sum + start!, 0)
      expect([before, after].map((length) => length.toFixed(9))).toEqual(['3.000000000', '3.000000000'])
    }
    const plain = along(passes.path, passes.passes, 20, { ...spec, corners: noSlowing })
    const lost = 6 * 3 * (1 / plain.feed[cuts[0]!]!)
    expect(feeds.total.minutes - plain.total.minutes).toBeCloseTo(lost, 9)
  })

  it('adds up to time, water and abrasive', () => {
    const feeds = along(passes.path, passes.passes, 20, { ...spec, water: 3 })
    expect(feedFaults(passes.path, passes.passes, 20, spec, feeds)).toEqual([])
    expect(feeds.total.water).toBeCloseTo(3 * feeds.total.minutes, 12)
    expect(feeds.total.abrasive).toBeCloseTo(0.34 * feeds.total.minutes, 12)
    expect(feeds.passes[0]!.pierceMinutes).toBeCloseTo((0.6 * 20) / 60, 12)
  })

  it('is never too fast anywhere in random plates, whichever way it turns corners', () => {
    const random = seeded(17)
    for (let round = 0; round < 24; round++) {
      const n = 5 + Math.floor(random() * 8)
      const tilts = Array.from({ length: n }, () => (random() - 0.4) * 70)
      const loops = [star(random, n, 120, 220), circle(0, 0, 25, true)]
      const random_ = plate(12, loops, (l, e) => facets([12, l === 0 ? tilts[e]! : 15]))
      const moves = [CornerMove.lean, CornerMove.runOut, CornerMove.pivot]
      const corners = new Map(tilts.map((_, g) => [g, moves[Math.floor(3 * random())]!]))
      const cut = passesOf(random_, { kerf: 1, taper: 0.01 }, FREE, { corners })
      const feeds = along(cut.path, cut.passes, 12, spec)
      expect(feedFaults(cut.path, cut.passes, 12, spec, feeds)).toEqual([])
    }
  })

  it('is caught when a bottom is forgotten', () => {
    const path = oneMove([10, 0, 1, 0], [0, 10, 0, 1], Math.PI / 2)
    const feeds = along(path, onePass, 10, { ...spec, corners: noSlowing })
    const hasty = {
      ...feeds,
      feed: feeds.feed.map((u) => 1.01 * u),
      slowFeed: feeds.slowFeed.map((u) => 1.01 * u),
    }
    expect(feedFaults(path, onePass, 10, spec, hasty).map(({ code }) => code)).toContain('too-fast')
  })
})
