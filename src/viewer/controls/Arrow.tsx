import type { Heading } from './acts.ts'

const QUARTERS: Record<Heading, number> = { right: 0, down: 90, left: 180, up: 270 }

/** An arrow in the hand of the drawing: straight to move, on a bow to turn. */
export function Arrow({ heading, bent }: { heading: Heading; bent: boolean }) {
  // The bow stays above its chord for left and right, so that both look like going round the same post.
  const flip = heading === 'left' || heading === 'up' ? ' scale(1 -1)' : ''
  return (
    <svg
      width={18}
      height={18}
      viewBox="-9 -9 18 18"
      fill="none"
      stroke="currentColor"
      strokeWidth={1.4}
      className="mx-auto block"
      aria-hidden="true"
    >
      <g transform={`rotate(${QUARTERS[heading]})${flip}`}>
        {bent ? <path d="M-7 -3Q0 7 6.5 -2M6.8 3.4V-2.6H1" /> : <path d="M-7 0H7M2.5 -4.5L7 0L2.5 4.5" />}
      </g>
    </svg>
  )
}
