import { useState } from 'react'
import { useWidth } from '../../../section/use-width.ts'
import { perimeterOf } from '../model/strip.ts'
import { useBench } from '../model/store.ts'
import { Region } from '../Region.tsx'
import { StripDrawing } from './StripDrawing.tsx'
import { StripHead } from './StripHead.tsx'
import { useStrip } from './use-strip.ts'

/** One loop's perimeter unrolled: the tilt that the jet needs above, the walls with their facets below. */
export function WallStrip() {
  const active = useBench((state) => state.active)
  const [zoom, setZoom] = useState(1)
  const [loop, setLoop] = useState(active?.loop ?? 0)
  const [followed, setFollowed] = useState(active)
  // A selection made elsewhere brings its loop into the strip.
  if (active !== followed) {
    setFollowed(active)
    if (active !== null && active.loop !== loop) setLoop(active.loop)
  }
  const [box, width] = useWidth<HTMLDivElement>(800)
  const strip = useStrip(loop)
  return (
    <Region
      id="bench-strip"
      title="Wall strip"
      className="bench-strip"
      aside={
        <StripHead
          loop={loop}
          onLoop={setLoop}
          perimeter={perimeterOf(strip.edges)}
          zoom={zoom}
          onZoom={setZoom}
        />
      }
    >
      {/* Its drawing must not hold a narrowing page open: it follows the page. */}
      <div ref={box} className="overflow-x-auto border border-rule bg-panel [contain:inline-size]">
        <StripDrawing key={loop} strip={strip} width={(width - 2) * zoom} view={width - 2} />
      </div>
    </Region>
  )
}
