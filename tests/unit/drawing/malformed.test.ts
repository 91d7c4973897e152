import { describe, expect, it } from 'vitest'
import { checkReading } from '../../fuzz/check-reading.ts'
import { malformedDrawing } from '../../fuzz/mutate-dxf.ts'

/** The longer run is `npx tsx tests/fuzz/drawing.ts 100000`. */
const CASES = 500
const LONGEST_MS = 2_000

describe('malformed drawings', () => {
  it(`${CASES} of them: sound geometry or a typed refusal, each in good time`, () => {
    const outcomes = new Set<string>()
    for (let seed = 1; seed <= CASES; seed++) {
      const before = process.cpuUsage()
      outcomes.add(checkReading(malformedDrawing(seed)))
      const { user, system } = process.cpuUsage(before)
      expect((user + system) / 1000, `seed ${seed}`).toBeLessThan(LONGEST_MS)
    }
    // The generator is worth its name only if it breaks drawings in many ways, and not all of them.
    expect([...outcomes]).toEqual(
      expect.arrayContaining(['read', 'drawing-number', 'drawing-malformed', 'drawing-truncated']),
    )
  }, 60_000)
})
