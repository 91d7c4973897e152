import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { dirname, join } from 'node:path'
import clipper from 'clipper2-wasm/dist/es/clipper2z.js'
import type { MainModule } from 'clipper2-wasm/dist/clipper2z.d.ts'
import type { Vertex } from '../../shared/geometry/types.ts'

/** The yardstick: one uniform offset of the outline by Clipper2, compiled to WebAssembly. */
export type UniformOffset = (outline: Float64Array, distance: number) => number

const MITRE_LIMIT = 10
const DECIMALS = 4

/** Loads the module once. What is made answers how many loops came out, so that the work cannot be left out. */
export async function loadUniformOffset(): Promise<UniformOffset> {
  const folder = dirname(createRequire(import.meta.url).resolve('clipper2-wasm/dist/es/clipper2z.js'))
  const c: MainModule = await clipper({ wasmBinary: readFileSync(join(folder, 'clipper2z.wasm')) })
  return (outline, distance) => {
    const paths = new c.PathsD()
    const path = c.MakePathD(outline as unknown as number[])
    paths.push_back(path)
    const out = c.InflatePathsD(
      paths,
      distance,
      c.JoinType.Miter,
      c.EndType.Polygon,
      MITRE_LIMIT,
      DECIMALS,
      0,
    )
    const loops = out.size()
    for (const made of [out, path, paths]) made.delete()
    return loops
  }
}

export function flat(outline: readonly Vertex[]): Float64Array {
  return Float64Array.from(outline.flatMap(({ x, y }) => [x, y]))
}
