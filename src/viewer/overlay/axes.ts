import type { Basis } from '../camera/view-state.ts'

/** Length of an arm seen square on, px. */
const ARM = 15
/** How far a letter stands beyond its arm, px. */
const LETTER = 7
/** An arm shorter than this on screen points at the eye, px: its letter would lie on the others. */
const END_ON = 2.5

export interface AxisArm {
  readonly name: 'X' | 'Y' | 'Z'
  readonly x: number
  readonly y: number
  readonly letter: { readonly x: number; readonly y: number } | null
  /** Points away from the eye. */
  readonly away: boolean
}

/** The plate's axes as the view shows them, px from their origin, y downward: X right along the plate, Y away, Z up. */
export function axisArms({ right, up, toward }: Basis): readonly AxisArm[] {
  return (['X', 'Y', 'Z'] as const).map((name, axis) => {
    const [x, y] = [ARM * right[axis]!, -ARM * up[axis]!]
    const length = Math.hypot(x, y)
    const reach = (length + LETTER) / length
    return {
      name,
      x,
      y,
      letter: length < END_ON ? null : { x: x * reach, y: y * reach },
      away: toward[axis]! < -1e-9,
    }
  })
}

/** Writes the arms to a group that holds a line and a letter for each. */
export function drawAxes(group: SVGGElement, basis: Basis): void {
  for (const arm of axisArms(basis)) {
    const line = group.querySelector(`[data-arm=${arm.name}]`)
    const letter = group.querySelector<SVGTextElement>(`[data-letter=${arm.name}]`)
    line?.setAttribute('d', `M0 0L${arm.x.toFixed(2)} ${arm.y.toFixed(2)}`)
    line?.setAttribute('stroke-dasharray', arm.away ? '2 2' : 'none')
    if (!letter) continue
    letter.style.visibility = arm.letter ? 'visible' : 'hidden'
    letter.setAttribute('x', (arm.letter?.x ?? 0).toFixed(2))
    letter.setAttribute('y', (arm.letter?.y ?? 0).toFixed(2))
  }
}
