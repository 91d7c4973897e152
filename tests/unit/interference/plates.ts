import type { Body } from '../../../shared/walls/types.ts'
import { circle, facets, plate, rectangle, reversed, seeded, star } from '../../support/plates.ts'

/** Plates on which jets that know nothing of each other bite often: notched stars, narrow slots, holes near edges, arcs. */
export function randomPlate(seed: number): Body {
  const random = seeded(seed)
  const n = 5 + Math.floor(7 * random())
  const outline = star(random, n, 15, 30).map((v, i) =>
    i % 4 === 3 && random() < 0.6 ? { ...v, bulge: 0.4 * random() - 0.2 } : v,
  )
  const loops = [outline]
  const r = random()
  if (r < 0.4) loops.push(circle(2 * random(), 2 * random(), 1 + 6 * random(), true))
  else if (r < 0.7) loops.push(reversed(rectangle(-5, -1, 10, 0.8 + 2 * random())))
  const t = 2 + 8 * random()
  const lean = () => 50 * (random() - 0.5)
  return plate(t, loops, () => {
    const first = lean()
    return random() < 0.7 ? facets([t, first]) : facets([t / 3, first], [t, first - 15 * random()])
  })
}
