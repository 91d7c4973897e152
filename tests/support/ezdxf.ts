import { execFileSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { fileURLToPath } from 'node:url'

/** What the reader found. */
export interface ReadBack {
  version: string
  unit: number
  errors: string[]
  fixes: string[]
  layers: string[]
  polylines: { layer: string; closed: boolean; points: [number, number, number][] }[]
  entities: number
}

export const PYTHON = '/usr/bin/python3'
const SCRIPT = fileURLToPath(new URL('read_back.py', import.meta.url))

/** Reads a DXF with ezdxf (Debian's python3-ezdxf), which shares no code with our writer, and audits it. */
export function ezdxf(text: string): ReadBack {
  const folder = mkdtempSync(join(tmpdir(), 'contours-'))
  try {
    const file = join(folder, 'contours.dxf')
    writeFileSync(file, text)
    return JSON.parse(execFileSync(PYTHON, [SCRIPT, file], { encoding: 'utf8' })) as ReadBack
  } finally {
    rmSync(folder, { recursive: true })
  }
}
