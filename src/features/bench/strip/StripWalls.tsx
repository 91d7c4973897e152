import { memo, useCallback, useEffect, useMemo, useRef, type KeyboardEvent, type MouseEvent } from 'react'
import { edgeKey, edgeName, parseEdgeKey } from '../../../../shared/walls/names.ts'
import { tiltColour, type Theme } from '../../../theme/tilt-colour.ts'
import { labelled, type DrawnCell } from '../model/strip.ts'
import { useActs, useBench, useContent } from '../model/store.ts'
import { facetsOf, type Facets } from '../model/walls.ts'
import { wallWords } from '../model/words.ts'
import { moveKeys } from '../move-keys.ts'
import { useScene } from '../scene.ts'
import { NAMES, WALLS, type StripScale } from './measures.ts'
import type { Strip } from './use-strip.ts'

/** Width of one character of a name, px: 10 px text in a fixed pitch of 0.6. */
const CHARACTER = 6
const NAME_ROOM = 8
/** Strokes that show the lean stand this far apart, px. */
const STROKE_PITCH = 18
/** Cells narrower than this carry no strokes, px. */
const LEAST_STROKED = 22

interface StripWallsProps {
  readonly strip: Strip
  readonly cells: readonly DrawnCell[]
  readonly scale: StripScale
}

/** The walls side by side: a list of edges to choose from, each with its facets at their depths. */
export function StripWalls({ strip, cells, scale }: StripWallsProps) {
  const { unit, theme } = useScene()
  const content = useContent()
  const selection = useBench((state) => state.selection)
  const active = useBench((state) => state.active)
  const acts = useActs()
  const list = useRef<SVGGElement>(null)
  const { loop } = strip
  const edges = useMemo(() => strip.edges.map(({ edge }) => ({ loop, edge })), [strip, loop])
  const selected = useMemo(() => new Set(selection.map(edgeKey)), [selection])
  const at = active !== null && active.loop === loop ? active.edge : 0
  const names = labelled(cells, (edge) => scale.mm(edgeName({ loop, edge }).length * CHARACTER + NAME_ROOM))

  useEffect(() => {
    const group = list.current
    if (group === null || !group.contains(document.activeElement)) return
    group.querySelector<SVGElement>('[tabindex="0"]')?.focus()
  }, [at])

  function keyed(event: KeyboardEvent) {
    moveKeys(event, { edges, at, back: 'ArrowLeft', forth: 'ArrowRight', acts })
  }

  const pick = useCallback(
    (key: string, event: MouseEvent) => {
      const how = event.shiftKey ? 'range' : event.ctrlKey || event.metaKey ? 'toggle' : 'replace'
      acts.select(parseEdgeKey(key), how)
    },
    [acts],
  )

  return (
    <g ref={list} role="listbox" aria-multiselectable="true" aria-label="Walls of the loop" onKeyDown={keyed}>
      {cells.map((cell) => {
        const here = cell.edges.includes(at)
        const edge = here ? at : cell.edges[0]!
        const facets = steepest(cell.edges.map((each) => facetsOf(content, { loop, edge: each })))
        const own = cell.edges.length === 1 ? facets : facetsOf(content, { loop, edge })
        return (
          <Cell
            key={cell.edges[0]}
            x={scale.x(cell.from)}
            width={scale.x(cell.to) - scale.x(cell.from)}
            facets={facets}
            thickness={content.plate.thickness}
            theme={theme}
            name={names.has(edge) ? edgeName({ loop, edge }) : null}
            label={`${edgeName({ loop, edge })}, ${wallWords(own, unit)}`}
            edge={edgeKey({ loop, edge })}
            selected={cell.edges.some((each) => selected.has(edgeKey({ loop, edge: each })))}
            tabbable={here}
            onPick={pick}
          />
        )
      })}
    </g>
  )
}

/** Of several walls drawn as one, the one that leans most. */
function steepest(walls: readonly Facets[]): Facets {
  const lean = (facets: Facets) => Math.max(...facets.map(({ tilt }) => Math.abs(tilt)))
  return walls.reduce((most, facets) => (lean(facets) > lean(most) ? facets : most))
}

interface CellProps {
  readonly x: number
  readonly width: number
  readonly facets: Facets
  readonly thickness: number
  readonly theme: Theme
  readonly name: string | null
  readonly label: string
  readonly edge: string
  readonly selected: boolean
  readonly tabbable: boolean
  readonly onPick: (edge: string, event: MouseEvent) => void
}

/** Kept as it is while its own numbers stay: a loop may have a thousand. */
const Cell = memo(function Cell(props: CellProps) {
  const { x, width, facets, thickness, theme, name, selected, tabbable } = props
  const depth = (mm: number) => WALLS.top + (mm / thickness) * (WALLS.bottom - WALLS.top)
  const bands = facets.map(({ depth: end, tilt }, i) => ({
    top: depth(facets[i - 1]?.depth ?? 0),
    bottom: depth(end),
    tilt,
  }))
  return (
    <g
      role="option"
      aria-selected={selected}
      aria-label={props.label}
      data-edge={props.edge}
      tabIndex={tabbable ? 0 : -1}
      onClick={(event) => props.onPick(props.edge, event)}
      className="group cursor-pointer outline-none"
    >
      {bands.map(({ top, bottom, tilt }) => (
        <rect
          key={top}
          x={x}
          y={top}
          width={width}
          height={Math.max(0, bottom - top)}
          fill={tiltColour(tilt, theme)}
        />
      ))}
      {width >= LEAST_STROKED && bands.map((band) => <Lean key={band.top} x={x} width={width} {...band} />)}
      <line
        x1={x}
        x2={x}
        y1={WALLS.top}
        y2={WALLS.bottom}
        className="stroke-ink"
        strokeWidth={width > 4 ? 1 : 0}
      />
      <rect
        x={x + 1.25}
        y={WALLS.top}
        width={Math.max(1, width - 2.5)}
        height={WALLS.bottom - WALLS.top}
        fill="none"
        className={`${selected ? 'stroke-select' : 'stroke-transparent'} group-focus-visible:stroke-ink`}
        strokeWidth={2.5}
      />
      {tabbable && (
        <path
          d={`M${x + width / 2 - 4} ${WALLS.top - 1}h8l-4 5Z`}
          className="fill-select opacity-0 group-focus-visible:opacity-100"
        />
      )}
      {name !== null && (
        <text
          x={x + width / 2}
          y={NAMES}
          textAnchor="middle"
          className={`text-[10px] ${selected ? 'fill-select font-bold' : 'fill-muted'}`}
        >
          {name}
        </text>
      )}
    </g>
  )
})

/** Strokes that lean as the facet does, so that a print without colour tells the same. */
function Lean({
  x,
  width,
  top,
  bottom,
  tilt,
}: {
  x: number
  width: number
  top: number
  bottom: number
  tilt: number
}) {
  const count = Math.floor(width / STROKE_PITCH)
  const pitch = width / (count + 1)
  const run = Math.max(-pitch, Math.min(pitch, Math.tan((tilt * Math.PI) / 180) * (bottom - top) * 0.25))
  return (
    <g className="stroke-ink" strokeWidth={0.6} opacity={0.45}>
      {Array.from({ length: count }, (_, i) => {
        const at = x + pitch * (i + 1)
        return <line key={i} x1={at - run / 2} x2={at + run / 2} y1={top + 2} y2={bottom - 2} />
      })}
    </g>
  )
}
