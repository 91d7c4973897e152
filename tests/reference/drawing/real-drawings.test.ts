import { existsSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { describe, expect, it } from 'vitest'
import { readDrawing } from '../../../shared/drawing/read.ts'
import { readingSchema, type NoticeCode, type Reading } from '../../../shared/drawing/schema.ts'

/**
 * Drawings of flat parts that others published. Their licences may keep them out of this repository, so they lie
 * beside it (or where UNDERCANT_DRAWINGS says) with an index of what an independent reader found in each:
 * closed loops, open chains, branches, and the exact area of the largest loop in drawing units.
 */
const folder =
  process.env.UNDERCANT_DRAWINGS ?? path.resolve(import.meta.dirname, '../../../../shared/drawings')
const indexFile = path.join(folder, 'index.json')
const present = existsSync(indexFile)

interface Row {
  file: string
  declaredUnit: string
  status: 'closed' | 'open' | 'branched' | 'closed-loose'
  closed: number
  open: number
  branched: number
  largestArea: number | null
  largestSegments: number | null
}

const rows: Row[] = present ? JSON.parse(readFileSync(indexFile, 'utf8')) : []

/** The index joins ends at this share of the drawing's size. */
const INDEX_JOIN = 1e-6

function sizeOf({ bounds }: Reading): number {
  return bounds ? Math.max(bounds.maxX - bounds.minX, bounds.maxY - bounds.minY) : 0
}

function counted(reading: Reading, code: NoticeCode): number {
  return reading.notices.filter((notice) => notice.code === code).reduce((sum, n) => sum + n.count, 0)
}

const largest = (reading: Reading) => Math.max(...reading.loops.map((loop) => loop.area))

describe.skipIf(!present)('drawings of others', () => {
  it('are all there', () => {
    expect(rows.length).toBeGreaterThanOrEqual(20)
  })

  for (const row of rows) {
    const bytes = () => readFileSync(path.join(folder, row.file))

    it(`${row.file}: loops and largest area`, () => {
      const first = readDrawing(bytes(), { unit: 'mm', recogniseArcs: false })
      const reading = readDrawing(bytes(), {
        unit: 'mm',
        recogniseArcs: false,
        joinTolerance: INDEX_JOIN * sizeOf(first),
      })
      expect(readingSchema.safeParse(reading).error).toBeUndefined()
      if (row.status === 'closed' || row.status === 'open') {
        expect(reading.loops).toHaveLength(row.closed)
        expect(counted(reading, 'chain-open')).toBe(row.open)
      } else {
        // Where a drawing is not clean, the places where it is not are reported.
        const unclear = reading.notices.filter(
          (notice) => notice.code === 'chain-branched' || notice.code === 'chain-open',
        )
        expect(unclear.some((notice) => notice.places.length > 0)).toBe(true)
      }
      if (row.status === 'branched') {
        expect(reading.loops.length).toBeGreaterThanOrEqual(row.closed)
        expect(counted(reading, 'chain-branched')).toBeGreaterThan(0)
      }
      if (row.largestArea === null) return
      expect(Math.abs(largest(reading) - row.largestArea) / row.largestArea).toBeLessThan(1e-9)
      const loop = reading.loops.find((candidate) => candidate.area === largest(reading))
      expect(loop?.vertices).toHaveLength(row.largestSegments ?? 0)
    })

    it(`${row.file}: arcs recognised stay within their tolerance`, () => {
      const tolerance = 0.01
      const plain = readDrawing(bytes(), { unit: 'mm', recogniseArcs: false })
      const reading = readDrawing(bytes(), { unit: 'mm', arcTolerance: tolerance })
      expect(reading.loops).toHaveLength(plain.loops.length)
      // An outline that moves by the tolerance at most changes its area by its length times that at most.
      const length = plain.loops.find((loop) => loop.area === largest(plain))?.length ?? 0
      expect(Math.abs(largest(reading) - largest(plain))).toBeLessThanOrEqual(tolerance * length)
    })
  }

  it('asks about the unit of the two that declare inches and are millimetres, and of no other inch drawing', () => {
    const asked = rows
      .filter((row) => row.declaredUnit === 'in')
      .map((row) => [row.file, readDrawing(readFileSync(path.join(folder, row.file)), {}).unit.suggested])
    expect(asked.filter(([, unit]) => unit === 'mm').map(([file]) => file)).toEqual([
      'Opentrons__otone_hardware__1009_Z_Motor_Lock.dxf',
      'olkb__olkb_parts__MIDMOL50.dxf',
    ])
    expect(asked).toHaveLength(4)
  })
})
