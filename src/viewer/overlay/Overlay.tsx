import { useLayoutEffect, useMemo, useRef } from 'react'
import { edgeKey } from '../../../shared/walls/names.ts'
import { cornerPoint, type MeshIndex } from '../scene/mesh-index.ts'
import type { PartViewerProps } from '../types.ts'
import { BALLOON_RADIUS } from './balloon.ts'
import { chooseLabels, type ChosenLabel } from './choose.ts'
import type { OverlayLayer } from './layer.ts'
import { stationsOf } from './stations.ts'

type Shown = Pick<
  PartViewerProps,
  'selection' | 'breaches' | 'labels' | 'balloons' | 'onBalloon' | 'event' | 'scaleBar'
>

interface OverlayProps extends Shown {
  readonly layer: OverlayLayer
  readonly index: MeshIndex | null
  /** Asks for a frame, in which the layer puts everything in its place. */
  readonly onChange: () => void
}

const TONES: Record<ChosenLabel['tone'], string> = {
  selected: 'text-select font-medium',
  breach: 'text-breach',
  plain: 'text-muted',
}

/** Lines behind a text give way to it, as on a map. */
const HALO = '[text-shadow:0_0_2px_var(--sheet),0_0_2px_var(--sheet)]'

const AXES = ['X', 'Y', 'Z'] as const

/** Balloons that are worth drawing at once; the list of findings has them all. */
const BALLOON_CAP = 60

/** Texts over the picture. They are placed by `OverlayLayer`, not by React. */
export function Overlay({ layer, index, onChange, ...shown }: OverlayProps) {
  const { selection, breaches, labels, event, scaleBar } = shown
  const root = useRef<HTMLDivElement>(null)
  const leaders = useRef<SVGPathElement>(null)
  const eventNode = useRef<HTMLDivElement>(null)
  const eventText = useRef<HTMLSpanElement>(null)
  const bar = useRef<HTMLDivElement>(null)
  const barText = useRef<HTMLSpanElement>(null)
  const reading = useRef<HTMLDivElement>(null)
  const axes = useRef<SVGGElement>(null)

  const chosen = useMemo(
    () =>
      index
        ? chooseLabels(labels, selection, breaches.edges, (key) => index.edges.get(key)?.length ?? 0).filter(
            ({ key }) => index.edges.has(key),
          )
        : [],
    [labels, selection, breaches.edges, index],
  )
  const balloons = useMemo(
    () => [...shown.balloons].sort((a, b) => Number(b.selected) - Number(a.selected)).slice(0, BALLOON_CAP),
    [shown.balloons],
  )

  useLayoutEffect(() => {
    const labelNodes = nodesBy(root.current!, 'edge')
    // One note may stand at many places, so its number does not tell its balloons apart: their order does.
    const balloonNodes = root.current!.querySelectorAll<HTMLElement>('[data-balloon]')
    layer.setFixed({
      leaders: leaders.current,
      event: eventNode.current,
      eventText: eventText.current,
      bar: bar.current,
      barText: barText.current,
      reading: reading.current,
      axes: axes.current,
    })
    layer.setUnit(scaleBar ?? null)
    layer.setLabels(
      chosen.flatMap(({ key, edge, tone }) => {
        const element = labelNodes.get(key)
        const lines = index?.edges.get(edgeKey(edge))
        const stations = lines ? stationsOf(lines) : []
        return element && lines && stations.length > 0
          ? [{ element, edge, stations, length: lines.length, must: tone !== 'plain' }]
          : []
      }),
    )
    layer.setBalloons(
      balloons.flatMap(({ at }, i) => {
        const element = balloonNodes[i]
        return element ? [{ element, at: [at.x, at.y, -at.depth] as const }] : []
      }),
    )
    layer.setMarks({
      event: event ? [event.at.x, event.at.y, -event.depth] : null,
      corners: index
        ? breaches.corners.map((corner) => cornerPoint(index, corner)).filter((at) => at !== null)
        : [],
      triangles: index ? index.mesh.indices.length / 3 : 0,
    })
    onChange()
  }, [layer, index, chosen, balloons, event, scaleBar, breaches.corners, onChange])

  return (
    <div
      ref={root}
      className="pointer-events-none absolute inset-0 overflow-hidden text-[0.6875rem] leading-4"
    >
      <svg className="absolute inset-0 h-full w-full" aria-hidden="true">
        <path ref={leaders} className="stroke-muted" fill="none" strokeWidth={0.75} />
      </svg>
      {chosen.map(({ key, text, tone }) => (
        <span
          key={key}
          aria-hidden="true"
          data-tone={tone}
          data-edge={key}
          className={`invisible absolute top-0 left-0 px-0.5 whitespace-nowrap ${HALO} ${TONES[tone]}`}
        >
          {text}
        </span>
      ))}
      {balloons.map(({ number, tone, selected }, i) => (
        <button
          key={`${number} ${i}`}
          type="button"
          data-balloon={number}
          // The list of findings holds the same buttons; a second row of stops would be in the way.
          tabIndex={-1}
          aria-label={`note ${number}`}
          aria-pressed={selected}
          onClick={() => shown.onBalloon?.(number)}
          className="pointer-events-auto invisible absolute top-0 left-0 grid size-6 cursor-pointer place-items-center pointer-coarse:size-11"
        >
          <BalloonFace number={number} tone={tone} selected={selected} />
        </button>
      ))}
      {event && (
        <div ref={eventNode} className="absolute top-0 left-0 text-breach" aria-hidden="true">
          <svg
            width={22}
            height={22}
            viewBox="-11 -11 22 22"
            className="block"
            fill="none"
            stroke="currentColor"
          >
            <circle r={6} strokeWidth={1.25} className="fill-panel" />
            <path d="M-10 0H10M0 -10V10" strokeWidth={1} />
          </svg>
        </div>
      )}
      {event?.text && (
        <span
          ref={eventText}
          aria-hidden="true"
          className={`absolute top-0 left-0 px-0.5 whitespace-nowrap text-breach ${HALO}`}
        >
          {event.text}
        </span>
      )}
      {scaleBar && (
        <div className={`absolute bottom-2 left-3 text-muted ${HALO}`} aria-hidden="true">
          <span ref={barText} />
          <div ref={bar} className="h-1.5 border-x border-b border-muted" />
        </div>
      )}
      <div ref={reading} className={`absolute right-3 bottom-1.5 text-muted ${HALO}`} aria-hidden="true" />
      <svg
        width={52}
        height={52}
        viewBox="-26 -26 52 52"
        fill="none"
        stroke="currentColor"
        aria-hidden="true"
        className="absolute bottom-9 left-1 text-muted"
      >
        <g ref={axes}>
          {AXES.map((name) => (
            <path key={name} data-arm={name} />
          ))}
          {AXES.map((name) => (
            <text
              key={name}
              data-letter={name}
              textAnchor="middle"
              dominantBaseline="central"
              fontSize={9}
              stroke="none"
              fill="currentColor"
            >
              {name}
            </text>
          ))}
        </g>
      </svg>
    </div>
  )
}

function BalloonFace({
  number,
  tone,
  selected,
}: {
  number: number
  tone: 'breach' | 'plain'
  selected: boolean
}) {
  const stroke = tone === 'breach' ? 'var(--breach)' : 'var(--ink)'
  const size = BALLOON_RADIUS * 2 + 2
  return (
    <svg width={size} height={size} viewBox={`${-size / 2} ${-size / 2} ${size} ${size}`} aria-hidden="true">
      <circle
        r={BALLOON_RADIUS - 0.5}
        fill={selected ? stroke : 'var(--panel)'}
        stroke={stroke}
        strokeWidth={1.25}
      />
      <text
        textAnchor="middle"
        dominantBaseline="central"
        fontSize={number > 99 ? 8.5 : 11}
        fontWeight={700}
        fill={selected ? (tone === 'breach' ? 'var(--on-breach)' : 'var(--sheet)') : stroke}
      >
        {number}
      </text>
    </svg>
  )
}

/** Elements under a root by the value of one of their data attributes. */
function nodesBy(root: HTMLElement, name: 'edge' | 'balloon'): Map<string, HTMLElement> {
  const nodes = root.querySelectorAll<HTMLElement>(`[data-${name}]`)
  return new Map([...nodes].map((node) => [node.dataset[name]!, node]))
}
