import { describe, expect, it } from 'vitest'
import type { Finding } from '../../../shared/findings/schema.ts'
import { GATHER_ABOVE, notesOf, type NoteFormat } from '../../../src/features/bench/model/notes.ts'

const format: NoteFormat = {
  unit: 'mm',
  length: (mm) => `${mm} mm`,
  angle: (degrees) => `${degrees}°`,
  edgesIn: () => 20,
}

const fillet = (vertex: number, value = 0.55): Finding => ({
  code: 'concave-fillet',
  severity: 'note',
  loop: 0,
  vertex,
  value,
  message: `Corner C${vertex + 1} keeps a fillet of ${value} mm.`,
})

const edgeOver = (edge: number, value = 57): Finding => ({
  code: 'edge-over-working-limit',
  severity: 'warning',
  loop: 0,
  edge,
  value,
  limit: 55,
  message: `Edge e${edge + 1} needs ${value}°.`,
  cure: { message: `Set e${edge + 1} to 55°`, set: { edges: [{ loop: 0, edge }], facet: 0, tilt: 55 } },
})

describe('margin notes', () => {
  it('puts what stops first and numbers from one', () => {
    const stop: Finding = {
      code: 'wall-vanishes',
      severity: 'stop',
      loop: 0,
      edge: 3,
      message: 'e4 vanishes.',
    }
    const notes = notesOf([fillet(2), edgeOver(1), stop], format)
    expect(notes.map(({ number, code }) => [number, code])).toEqual([
      [1, 'wall-vanishes'],
      [2, 'edge-over-working-limit'],
      [3, 'concave-fillet'],
    ])
  })

  it('keeps a few apart and gathers many of one kind with their places', () => {
    const few = Array.from({ length: GATHER_ABOVE }, (_, i) => fillet(i))
    expect(notesOf(few, format)).toHaveLength(GATHER_ABOVE)
    const [note, ...rest] = notesOf(
      Array.from({ length: 12 }, (_, i) => fillet(i)),
      format,
    )
    expect(rest).toEqual([])
    expect(note!.message).toBe('12 concave corners keep a fillet: 0.55 mm.')
    expect(note!.places.slice(0, 2).map(({ name }) => name)).toEqual(['C1', 'C2'])
  })

  it('adds the lengths in inches when inches are shown, from the exact numbers', () => {
    const inches: NoteFormat = { ...format, unit: 'in', length: (mm) => `${(mm / 25.4).toFixed(4)} in` }
    const event: Finding = {
      code: 'walls-break-through',
      severity: 'stop',
      value: 17.1383,
      limit: 25.4,
      message: 'They meet at 17.14 mm; the plate is 25.4 mm thick.',
    }
    expect(notesOf([event], format)[0]!.message).toBe(event.message)
    expect(notesOf([event], inches)[0]!.message).toBe(`${event.message} That is 0.6747 in against 1.0000 in.`)
    expect(notesOf([edgeOver(1)], inches)[0]!.message).toBe('Edge e2 needs 57°.')
  })

  it('says the range and the limit of gathered angles', () => {
    const [note] = notesOf(
      [56, 57, 58, 59].map((value, i) => edgeOver(i, value)),
      format,
    )
    expect(note!.message).toBe('4 edges pass the working limit of 55°: 56° to 59°.')
  })

  it('applies every cure of a gathered note at once', () => {
    const [note] = notesOf(
      [0, 1, 2, 3].map((edge) => edgeOver(edge)),
      format,
    )
    expect(note!.cure!.cures).toHaveLength(4)
    expect(note!.cure!.message).toBe('Apply the cure of each of the 4')
  })

  it('offers no button when one of them has no number to set', () => {
    const bare: Finding = { ...edgeOver(3), cure: undefined }
    const [note] = notesOf([...[0, 1, 2].map((edge) => edgeOver(edge)), bare], format)
    expect(note!.cure).toBeNull()
  })

  it('gives the words of a cure that is not a number', () => {
    const [note] = notesOf([{ ...fillet(1), cure: { message: 'Relieve the mating corner.' } }], format)
    expect(note!.cure).toBeNull()
    expect(note!.advice).toBe('Relieve the mating corner.')
  })

  it('selects both edges of a corner, round the loop’s start', () => {
    const [note] = notesOf([fillet(0)], format)
    expect(note!.places[0]!.edges).toEqual([
      { loop: 0, edge: 19 },
      { loop: 0, edge: 0 },
    ])
  })
})
