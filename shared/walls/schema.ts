import * as z from 'zod'

/** Walls as requests and set-ups write them: mm, degrees from vertical, positive outward. */

export const datumSchema = z.enum(['top', 'bottom', 'root'])

export const facetSchema = z.strictObject({
  depth: z.number().positive().max(1_000).describe('depth at which the facet ends, mm'),
  tilt: z.number().gt(-90).lt(90).describe('degrees from vertical, positive outward'),
  endTilt: z.number().gt(-90).lt(90).optional().describe("tilt at the edge's end, where the wall blends"),
})

export const wallSchema = z.strictObject({
  loop: z.int().min(0).max(2_000),
  edge: z.int().min(0).max(20_000).describe('edge i starts at vertex i'),
  facets: z.array(facetSchema).min(1).max(3),
})

export type WallSpec = z.infer<typeof wallSchema>
export type FacetSpec = z.infer<typeof facetSchema>
