/**
 * Labels along one line: each wants to stand at its own centre; none may touch its neighbour or leave the
 * line. Order is kept. Positions are those with the least sum of squared moves (pool adjacent violators:
 * labels that touch move as one block to the mean of what they want).
 */
export function stackLabels(
  wanted: readonly { readonly centre: number; readonly size: number }[],
  gap: number,
  from: number,
  to: number,
): number[] {
  const blocks: { start: number; size: number; members: number; sum: number }[] = []
  for (const { centre, size } of wanted) {
    let block = { start: centre - size / 2, size, members: 1, sum: centre - size / 2 }
    for (
      let above = blocks.at(-1);
      above && above.start + above.size + gap > block.start;
      above = blocks.at(-1)
    ) {
      blocks.pop()
      const shift = above.size + gap
      const sum = above.sum + block.sum - block.members * shift
      const members = above.members + block.members
      block = { start: sum / members, size: shift + block.size, members, sum }
    }
    blocks.push(block)
  }
  const starts: number[] = []
  let next = 0
  for (const block of blocks) {
    let start = block.start
    for (let i = 0; i < block.members; i += 1) {
      starts.push(start)
      start += wanted[next]!.size + gap
      next += 1
    }
  }
  return keepWithin(starts, wanted, gap, from, to).map((start, i) => start + wanted[i]!.size / 2)
}

/** Push down from the start, then up from the end; where both cannot hold, the start wins. */
function keepWithin(
  starts: readonly number[],
  wanted: readonly { readonly size: number }[],
  gap: number,
  from: number,
  to: number,
): number[] {
  const kept = [...starts]
  for (let i = kept.length - 1, limit = to; i >= 0; i -= 1) {
    kept[i] = Math.min(kept[i]!, limit - wanted[i]!.size)
    limit = kept[i]! - gap
  }
  for (let i = 0, limit = from; i < kept.length; i += 1) {
    kept[i] = Math.max(kept[i]!, limit)
    limit = kept[i]! + wanted[i]!.size + gap
  }
  return kept
}
