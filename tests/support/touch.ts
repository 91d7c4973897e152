import type { CDPSession } from 'playwright-core'

/** Fingers put down at some places and moved to others, as the browser's own touch events. */
export async function drag(
  session: CDPSession,
  from: [number, number][],
  to: [number, number][],
): Promise<void> {
  const points = (share: number) =>
    from.map(([x, y], id) => ({
      x: x + (to[id]![0] - x) * share,
      y: y + (to[id]![1] - y) * share,
      id,
    }))
  await session.send('Input.dispatchTouchEvent', { type: 'touchStart', touchPoints: points(0) })
  for (const share of [0.25, 0.5, 0.75, 1]) {
    await session.send('Input.dispatchTouchEvent', { type: 'touchMove', touchPoints: points(share) })
  }
  await session.send('Input.dispatchTouchEvent', { type: 'touchEnd', touchPoints: [] })
}
