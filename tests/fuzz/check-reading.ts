import { DrawingError } from '../../shared/drawing/errors.ts'
import { readDrawing } from '../../shared/drawing/read.ts'
import { readingSchema, type Reading } from '../../shared/drawing/schema.ts'
import { loopFromVertices } from '../../shared/geometry/bulge.ts'
import { signedArea } from '../../shared/geometry/loop.ts'

export type Outcome = 'read' | DrawingError['code']

/**
 * Reads the bytes and makes sure that what comes out is sound: the form promised, finite, outlines
 * counter-clockwise and holes clockwise with the areas stated, every loop in exactly one part. Returns the
 * code of a refusal; throws for anything else.
 */
export function checkReading(bytes: Uint8Array): Outcome {
  let reading: Reading
  try {
    reading = readDrawing(bytes, {})
  } catch (error) {
    if (error instanceof DrawingError) return error.code
    throw error
  }
  readingSchema.parse(reading)
  const owners = new Map<number, number>()
  for (const part of reading.parts) {
    for (const loop of [part.outer, ...part.holes]) owners.set(loop, (owners.get(loop) ?? 0) + 1)
  }
  reading.loops.forEach((loop, i) => {
    if (owners.get(i) !== 1) throw new Error(`loop ${i} is in ${owners.get(i) ?? 0} parts`)
    const area = signedArea(loopFromVertices(loop.vertices))
    const expected = loop.role === 'outer' ? loop.area : -loop.area
    if (!(Math.abs(area - expected) <= 1e-6 * loop.area + 1e-9 * loop.length ** 2)) {
      throw new Error(`loop ${i} states ${expected} mm², its vertices ${area}`)
    }
  })
  return 'read'
}
