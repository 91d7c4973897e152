import type { FacetSpec } from '../../../shared/walls/schema.ts'
import type { SectionSpec } from '../../../src/section/types.ts'

const facets = (...runs: [depth: number, tilt: number][]): FacetSpec[] =>
  runs.map(([depth, tilt]) => ({ depth, tilt }))

/** Preps that are hard on a drawing: flat and steep, both signs, thin and thick, a root face of a hair. */
export const hardPreps: Record<string, SectionSpec> = {
  square: { thickness: 25, facets: facets([25, 0]) },
  'outward 5°': { thickness: 25, facets: facets([25, 5]) },
  'inward 5°': { thickness: 25, facets: facets([25, -5]) },
  'outward 60°': { thickness: 25, facets: facets([25, 60]) },
  'inward 60°': { thickness: 25, facets: facets([25, -60]) },
  'bevel with root face': { thickness: 25, facets: facets([19, 30], [25, 0]) },
  'root face at the top': { thickness: 20, facets: facets([5, 0], [20, -35]) },
  'double bevel, tiny root face': { thickness: 25, facets: facets([12.4, 45], [12.6, 0], [25, -45]) },
  'double bevel 60°, 100 mm': { thickness: 100, facets: facets([49.7, 60], [50.3, 0], [100, -60]) },
  'double bevel without root face': { thickness: 40, facets: facets([20, 30], [40, -30]) },
  'three tilts': { thickness: 25, facets: facets([12, 60], [13, 1], [25, -5]) },
  'thin plate': { thickness: 3, facets: facets([2, 30], [3, 0]) },
  'long reach': { thickness: 100, facets: facets([100, 60]) },
}
