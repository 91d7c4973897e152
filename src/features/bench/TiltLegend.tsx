import { TILT_SCALE_END, tiltColour, type Theme } from '../../theme/tilt-colour.ts'

const STEP = 4
const ticks = [-60, 0, 60]

/** The one signed tilt scale, with its words. */
export function TiltLegend({ theme }: { theme: Theme }) {
  const stops = Array.from({ length: (2 * TILT_SCALE_END) / STEP + 1 }, (_, i) => -TILT_SCALE_END + i * STEP)
  return (
    <figure className="m-0" aria-label="Tilt scale: minus is undercut, plus opens downward">
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
          <span key={tilt}>{tickText(tilt)}</span>
        ))}
      </div>
    </figure>
  )
}

function tickText(tilt: number): string {
  if (tilt === ticks[0]) return `−${-tilt}° undercut`
  if (tilt === ticks.at(-1)) return `opens downward +${tilt}°`
  return String(tilt)
}
