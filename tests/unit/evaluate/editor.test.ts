import { expect, test } from 'vitest'
import { openEditor } from '../../../shared/evaluate/editor.ts'
import { EvaluationError } from '../../../shared/evaluate/error.ts'
import { evaluate } from '../../../shared/evaluate/evaluate.ts'
import type { EvaluationRequest } from '../../../shared/evaluate/schema.ts'
import type { Vertex } from '../../../shared/geometry/types.ts'
import { reversed, seeded, star } from '../../support/plates.ts'
import { randomRequest } from '../../support/requests.ts'
import { plate, rectangle, tilted } from './shapes.ts'

/** An editor after many edits against a fresh evaluation of the same request: the same to the last bit. */

const JET = { kerf: 1, taper: 0.3, standoff: 3, nozzleDiameter: 7.14 }
const HEAD = { mechanicalLimit: 60, workingLimit: 40 }

/** All of it, as it goes over the wire. */
const whole = (value: unknown): unknown => JSON.parse(JSON.stringify(value))

function editsAgreeWith(request: EvaluationRequest, seed: number, edits: number, steepest: number): number {
  const random = seeded(seed)
  const { thickness } = request.plate
  const editor = openEditor(request)
  let withEvent = 0
  for (let i = 0; i < edits; i++) {
    const loop = Math.floor(random() * request.loops.length)
    const edge = Math.floor(random() * request.loops[loop]!.length)
    const tilt = Math.round(20 * steepest * (random() - 0.5)) / 10
    const facets =
      random() < 0.8
        ? [{ depth: thickness, tilt }]
        : [
            { depth: thickness / 3, tilt },
            { depth: thickness, tilt: tilt - 10 * random() },
          ]
    const answer = editor.setWall({ loop, edge }, facets)
    if (answer.firstEvent) withEvent++
    expect(whole(answer), `seed ${seed}, edit ${i}`).toEqual(whole(evaluate(editor.request)))
  }
  return withEvent
}

function holed(random: () => number): Vertex[][] {
  const outer = star(random, 12, 60, 90)
  const holes = [star(random, 5, 8, 14), star(random, 7, 8, 14)]
  const at = (loop: Vertex[], x: number) => loop.map((v) => ({ x: v.x + x, y: v.y }))
  return [random() < 0.5 ? outer : reversed(outer), at(holes[0]!, -25), at(reversed(holes[1]!), 25)]
}

test('random edits of plates of straight edges, holes either way round', () => {
  let withEvent = 0
  let edits = 0
  for (let seed = 1; seed <= 15; seed++) {
    const random = seeded(seed)
    const loops = seed % 3 === 0 ? [star(random, 40, 60, 90)] : holed(random)
    const request = plate(loops, tilted([10, 5, 0, -5], 8), 8, { jet: JET, head: HEAD })
    withEvent += editsAgreeWith(request, seed, 12, seed % 2 === 0 ? 20 : 60)
    edits += 12
  }
  // Both kinds must come up often.
  expect(withEvent).toBeGreaterThan(edits / 20)
  expect(edits - withEvent).toBeGreaterThan(edits / 4)
}, 30_000)

test('random edits of whatever else a plate may be: arcs, steps, facets, any datum', () => {
  for (let seed = 1; seed <= 8; seed++) {
    const request = randomRequest(seed, { steepest: 30, arcs: seed % 2 === 0, cuttable: true })
    if (request) editsAgreeWith(request, seed, 3, 30)
  }
})

test('an answer read only after later edits is still that of its own request', () => {
  const editor = openEditor(plate([rectangle(100, 60)], [], 10, { jet: JET }))
  const first = editor.setWall({ loop: 0, edge: 0 }, [{ depth: 10, tilt: 30 }])
  const { request } = editor
  editor.setWall({ loop: 0, edge: 1 }, [{ depth: 10, tilt: -20 }])
  expect(whole(first)).toEqual(whole(evaluate(request)))
})

test('a wall without a sound meaning is refused and changes nothing', () => {
  const editor = openEditor(plate([rectangle(100, 60), rectangle(10, 10, 40, 20)], tilted([5], 10)))
  const before = whole(editor.evaluation)
  expect(() => editor.setWall({ loop: 0, edge: 0 }, [{ depth: 9, tilt: 30 }])).toThrow(EvaluationError)
  expect(() => editor.setWall({ loop: 0, edge: 4 }, [{ depth: 10, tilt: 30 }])).toThrow(EvaluationError)
  expect(() => editor.setWall({ loop: 2, edge: 0 }, [{ depth: 10, tilt: 30 }])).toThrow(EvaluationError)
  expect(whole(editor.evaluation)).toEqual(before)
  expect(whole(editor.setWall({ loop: 0, edge: 0 }, [{ depth: 10, tilt: 30 }]))).toEqual(
    whole(evaluate(editor.request)),
  )
})
