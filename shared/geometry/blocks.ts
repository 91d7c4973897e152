/**
 * Long columns summed and searched by blocks, so that a change of a few figures costs a few blocks and not the column.
 * Sums are taken block by block whoever takes them: then a sum that was kept equals one made anew to the last bit.
 */
export const BLOCK_BITS = 6
const BLOCK = 1 << BLOCK_BITS

export function blockCount(count: number): number {
  return (count + BLOCK - 1) >> BLOCK_BITS
}

/** First figure of a block and the one after its last. */
export function blockRange(block: number, count: number): readonly [first: number, end: number] {
  const first = block << BLOCK_BITS
  return [first, Math.min(count, first + BLOCK)]
}

/** The blocks that some places lie in, each once. */
export function blocksOf(places: readonly number[]): number[] {
  return [...new Set(places.map((place) => place >> BLOCK_BITS))]
}
