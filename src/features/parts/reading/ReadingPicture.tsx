import { useMemo } from 'react'
import type { Reading } from '../../../../shared/drawing/schema.ts'
import { outlinePath, polylinePath } from '../../../ui/outline-path.ts'
import { useWidth } from '../../../ui/use-width.ts'
import { frameOf } from './frame.ts'
import { NoticeBalloons } from './NoticeBalloons.tsx'

interface ReadingPictureProps {
  readonly reading: Reading
  readonly pick: number
  readonly onPick: (index: number) => void
  readonly notice: number | null
  readonly onNotice: (index: number | null) => void
}

/** The drawing as it was read: the picked part in full tone, open chains dashed in the breach colour. */
export function ReadingPicture({ reading, pick, onPick, notice, onNotice }: ReadingPictureProps) {
  const [box, width] = useWidth<HTMLDivElement>()
  const bounds = reading.bounds
  const paths = useMemo(() => pathsOf(reading), [reading])
  if (bounds === null) return <p>Nothing was read that could be drawn.</p>
  const frame = frameOf(bounds, width)
  return (
    <div ref={box} className="bg-panel border border-rule">
      {width > 0 && (
        <svg
          width={width}
          height={frame.height}
          className="block"
          role="group"
          aria-label={inWords(reading, pick)}
        >
          <g transform={`translate(${frame.originX} ${frame.originY}) scale(${frame.scale})`}>
            {paths.parts.map((d, index) => (
              <path
                key={index}
                d={d}
                fill="var(--face)"
                fillRule="evenodd"
                fillOpacity={index === pick ? 1 : 0.35}
                stroke={index === pick ? 'var(--select)' : 'var(--ink)'}
                strokeWidth={index === pick ? 2.5 : 1.25}
                vectorEffect="non-scaling-stroke"
                className={paths.parts.length > 1 ? 'cursor-pointer' : undefined}
                onClick={() => onPick(index)}
              />
            ))}
            {paths.loose.map((d, index) => (
              <path
                key={index}
                d={d}
                fill="none"
                stroke="var(--muted)"
                strokeDasharray="2 3"
                vectorEffect="non-scaling-stroke"
              />
            ))}
            {paths.open.map((d, index) => (
              <path
                key={index}
                d={d}
                fill="none"
                stroke="var(--breach)"
                strokeWidth={2}
                strokeDasharray="6 4"
                vectorEffect="non-scaling-stroke"
              />
            ))}
          </g>
          <NoticeBalloons notices={reading.notices} frame={frame} at={notice} onAt={onNotice} />
        </svg>
      )}
      {paths.open.length > 0 && (
        <p className="px-3 py-2 border-t border-rule text-breach">
          Dashed: {paths.open.length} {paths.open.length === 1 ? 'chain that does' : 'chains that do'} not
          close
        </p>
      )}
    </div>
  )
}

function pathsOf({ loops, parts, open }: Reading) {
  const used = new Set(parts.flatMap(({ outer, holes }) => [outer, ...holes]))
  const pathOf = (index: number) => loops[index]!.vertices
  return {
    parts: parts.map(({ outer, holes }) => outlinePath([outer, ...holes].map(pathOf))),
    loose: loops.filter((_, index) => !used.has(index)).map(({ vertices }) => outlinePath([vertices])),
    open: open.map(({ points }) => polylinePath(points)),
  }
}

function inWords({ parts, loops, open }: Reading, pick: number): string {
  const picked = parts.length > 1 ? `, part ${pick + 1} picked` : ''
  return `Drawing with ${parts.length} parts, ${loops.length} closed loops, ${open.length} open chains${picked}`
}
