import { expect, test } from 'vitest'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import type { EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import type { Cure, Finding } from '../../../shared/findings/schema.ts'
import { applyTilt } from '../../../shared/prep/preps.ts'
import { randomRequest } from '../../support/requests.ts'

/** The set-up with a finding's one-number cure applied; null where the cure is words. */
function cured(request: EvaluationRequest, cure: Cure | undefined): EvaluationRequest | null {
  if (cure?.set) {
    return { ...request, walls: applyTilt(request.walls, cure.set, request.plate.thickness) }
  }
  if (cure?.standoff !== undefined) return { ...request, jet: { ...request.jet, standoff: cure.standoff } }
  return null
}

const placeOf = ({ code, loop, edge, vertex }: Finding) => [code, loop, edge, vertex].join(' ')

/** Some 800 evaluations, milliseconds each on a quiet core: room for a busy one. */
const TIMEOUT = 60_000

test('every finding is gone once its one-number cure is applied, 400 set-ups', { timeout: TIMEOUT }, () => {
  const tried: Record<string, number> = {}
  for (let seed = 1; seed <= 400; seed++) {
    const drawn = randomRequest(seed, { steepest: 65, arcs: seed % 2 === 0, cuttable: seed % 3 !== 0 })
    if (!drawn) continue
    // Without a kerf there are no passes: the cures in numbers are those of walls, corners and the nozzle.
    const request = { ...drawn, jet: { ...drawn.jet, kerf: undefined } }
    for (const finding of evaluate(request).findings) {
      // Blends have tests of their own (seams/blends): on small arcs their events take seconds.
      if (finding.cure?.set?.endTilt !== undefined) continue
      const after = cured(request, finding.cure)
      if (!after) continue
      tried[finding.code] = (tried[finding.code] ?? 0) + 1
      const left = evaluate(after).findings.map(placeOf)
      expect(left, `seed ${seed}: ${finding.message}`).not.toContain(placeOf(finding))
    }
  }
  for (const code of [
    'edge-over-mechanical-limit',
    'edge-over-working-limit',
    'corner-over-mechanical-limit',
    'corner-over-working-limit',
    'nozzle-touches-plate',
    'wall-vanishes',
  ]) {
    expect(tried[code] ?? 0, code).toBeGreaterThan(5)
  }
})
