import { spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { readDrawing } from '../../../shared/drawing/read.ts'

/**
 * ezdxf, a general-purpose DXF library, writes files with splines, ellipses and nested inserts and states the
 * area of each outline by its own reading: entities of expanded blocks flattened to chords.
 */
const PYTHON = process.env.UNDERCANT_PYTHON ?? '/usr/bin/python3'
const present = spawnSync(PYTHON, ['-c', 'import ezdxf']).status === 0

interface Row {
  file: string
  area: number
  length: number
}

describe.skipIf(!present)('files written by ezdxf', () => {
  let folder = ''
  let rows: Row[] = []

  beforeAll(() => {
    folder = mkdtempSync(path.join(tmpdir(), 'undercant-ezdxf-'))
    const script = path.join(import.meta.dirname, 'write-with-ezdxf.py')
    const run = spawnSync(PYTHON, [script, folder], { encoding: 'utf8' })
    if (run.status !== 0) throw new Error(run.stderr)
    rows = JSON.parse(run.stdout)
  }, 60_000)

  afterAll(() => rmSync(folder, { recursive: true, force: true }))

  for (const arcTolerance of [0.01, 0.001]) {
    it(`outlines have ezdxf's areas within ${arcTolerance} mm of their length`, () => {
      expect(rows.length).toBeGreaterThanOrEqual(14)
      for (const { file, area, length } of rows) {
        const reading = readDrawing(readFileSync(path.join(folder, file)), { arcTolerance, unit: 'mm' })
        const total = reading.loops.reduce((sum, loop) => sum + loop.area, 0)
        // The chords of ezdxf stand off by 1e-5 mm, ours by the tolerance.
        expect(Math.abs(total - area), file).toBeLessThan((arcTolerance + 1e-5) * length)
        expect(reading.open, file).toEqual([])
      }
    })
  }
})
