import { formatLength } from '../../../../shared/units/format.ts'
import { Button } from '../../../ui/Button.tsx'
import { Select } from '../../../ui/Select.tsx'
import { useActs, useBench } from '../model/store.ts'
import { useScene } from '../scene.ts'

export const MOST_ZOOM = 32

interface StripHeadProps {
  readonly loop: number
  readonly onLoop: (loop: number) => void
  readonly perimeter: number
  readonly zoom: number
  readonly onZoom: (zoom: number) => void
}

/** Which loop, how long, and how wide it is drawn. */
export function StripHead({ loop, onLoop, perimeter, zoom, onZoom }: StripHeadProps) {
  const { unit } = useScene()
  const loops = useBench((state) => state.loops)
  const acts = useActs()
  const round = `${formatLength(perimeter, unit, { decimals: unit === 'mm' ? 1 : 2 })} round`
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
      {loops.length > 1 ? (
        <div className="w-56 max-w-full">
          <Select
            aria-label="Loop in the strip"
            value={String(loop)}
            onChange={(event) => {
              const next = Number(event.target.value)
              onLoop(next)
              acts.stand({ loop: next, edge: 0 })
            }}
            options={loops.map((segments, i) => ({
              value: String(i),
              label: `${i === 0 ? 'outer loop' : `hole ${i}`}, ${segments.length} edges`,
            }))}
          />
        </div>
      ) : (
        <span>outer loop</span>
      )}
      <span>{round}</span>
      <span className="grow text-right max-lg:hidden">above: jet tilt needed · below: walls by tilt</span>
      <div role="group" aria-label="Width of the strip" className="flex ml-auto">
        <Button aria-label="Narrower" disabled={zoom === 1} onClick={() => onZoom(zoom / 2)}>
          −
        </Button>
        <Button aria-label="Wider" disabled={zoom >= MOST_ZOOM} onClick={() => onZoom(zoom * 2)}>
          +
        </Button>
      </div>
    </div>
  )
}
