/** Caps of the strict pass. They bound time and memory, and lie far above any flat part. */

/** Largest file, bytes: the upload limit of the product. */
export const MAX_BYTES = 25 * 1024 * 1024

/** Longest value on one line; the format's own strings end at 2,049 characters. */
export const MAX_LINE = 65_536

/** Entities in the file, and again after blocks are expanded. */
export const MAX_ENTITIES = 200_000

/** Polyline vertices, spline points and knots in the whole file, and again after blocks are expanded. */
export const MAX_VERTICES = 200_000

/** Groups of one entity; a polyline vertex with its widths, bulge and number has six. */
export const MAX_ENTITY_TAGS = 500_000

/** Blocks within blocks. */
export const MAX_NESTING = 32

/** Knots and points of one spline; its evaluation is linear in the degree only. */
export const MAX_SPLINE_DEGREE = 25

/** Largest magnitude of a number in a geometry entity: its square still has all its digits' worth of room. */
export const MAX_MAGNITUDE = 1e12

/** Lines and arcs that one curve may become. */
export const MAX_PIECES = 20_000

/** Lines and arcs that the whole drawing may become. */
export const MAX_SEGMENTS = 500_000

/** Vertices of one loop: what a set-up accepts (shared/geometry/schema.ts). */
export const MAX_LOOP_VERTICES = 20_000

/** Largest coordinate that a set-up accepts, mm (shared/geometry/schema.ts). */
export const MAX_COORDINATE = 100_000

/** Places that one notice shows on the picture (schema.ts). */
export const MAX_PLACES = 200
