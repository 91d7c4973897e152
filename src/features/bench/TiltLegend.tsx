import { TILT_SCALE_END, tiltColour, type Theme } from '../../theme/tilt-colour.ts'

const STEP = 4
const ticks = [-60, -30, 0, 30, 60]

/** The one signed tilt scale, with its words. */
export function TiltLegend({ theme }: { theme: Theme }) {
  const stops = Array.from({ length: (2 * TILT_SCALE_END) / STEP + 1 }, (_, i) => -TILT_SCALE_END + i * STEP)
  return (
    <figure className="m-0" aria-label="Tilt scale: minus is undercut, plus opens downward">
      <div className="flex justify-between text-label text-muted">
        <span>− undercut</span>
        <span>opens downward +</span>
      </div>
      <div className="flex h-2.5" aria-hidden="true">
        {stops.map((tilt) => (
          <span
            key={tilt}
            className="grow border-r border-sheet last:border-r-0"
            style={{ background: tiltColour(tilt, theme) }}
          />
        ))}
      </div>
      <div className="flex justify-between text-label text-muted" aria-hidden="true">
        {ticks.map((tilt) => (
          <span key={tilt}>{tilt === 0 ? '0' : `${tilt > 0 ? '+' : '−'}${Math.abs(tilt)}°`}</span>
        ))}
      </div>
    </figure>
  )
}
