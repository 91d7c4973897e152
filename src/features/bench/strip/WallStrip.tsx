import { useState } from 'react'
import { formatLength } from '../../../../shared/units/format.ts'
import { Button } from '../../../ui/Button.tsx'
import { Select } from '../../../ui/Select.tsx'
import { useWidth } from '../../../section/use-width.ts'
import { perimeterOf } from '../model/strip.ts'
import { useActs, useBench } from '../model/store.ts'
import { useScene } from '../scene.ts'
import { StripDrawing } from './StripDrawing.tsx'
import { useStrip } from './use-strip.ts'

const MOST_ZOOM = 32

/** One loop's perimeter unrolled: the tilt that the jet needs above, the walls with their facets below. */
export function WallStrip() {
  const { unit } = useScene()
  const loops = useBench((state) => state.loops)
  const active = useBench((state) => state.active)
  const acts = useActs()
  const [zoom, setZoom] = useState(1)
  const [loop, setLoop] = useState(0)
  const [followed, setFollowed] = useState(active)
  // A selection made elsewhere brings its loop into the strip.
  if (active !== followed) {
    setFollowed(active)
    if (active !== null && active.loop !== loop) setLoop(active.loop)
  }
  const [box, width] = useWidth<HTMLDivElement>(800)
  const strip = useStrip(loop)
  const perimeter = formatLength(perimeterOf(strip.edges), unit, { decimals: 1 })

  return (
    <div className="flex flex-col gap-1">
      <div className="flex flex-wrap items-center gap-2">
        {loops.length > 1 ? (
          <div className="w-56 max-w-full">
            <Select
              aria-label="Loop in the strip"
              value={String(loop)}
              onChange={(event) => {
                const next = Number(event.target.value)
                setLoop(next)
                acts.stand({ loop: next, edge: 0 })
              }}
              options={loops.map((segments, i) => ({
                value: String(i),
                label: `${i === 0 ? 'outer loop' : `hole ${i}`}, ${segments.length} edges`,
              }))}
            />
          </div>
        ) : (
          <span className="text-small">outer loop</span>
        )}
        <span className="text-small">{perimeter} round</span>
        <span className="grow" />
        <span className="text-small text-muted max-sm:hidden">
          above: jet tilt needed · below: walls by tilt
        </span>
        <div role="group" aria-label="Width of the strip" className="flex">
          <Button aria-label="Narrower" disabled={zoom === 1} onClick={() => setZoom(zoom / 2)}>
            −
          </Button>
          <Button aria-label="Wider" disabled={zoom >= MOST_ZOOM} onClick={() => setZoom(zoom * 2)}>
            +
          </Button>
        </div>
      </div>
      <div ref={box} className="overflow-x-auto border border-rule bg-panel">
        <StripDrawing key={loop} strip={strip} width={(width - 2) * zoom} view={width - 2} />
      </div>
    </div>
  )
}
